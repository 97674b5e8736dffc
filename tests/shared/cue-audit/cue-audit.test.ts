import { describe, expect, it } from 'vitest';
import { cueAudit } from '#shared/cue-audit/cue-audit.ts';
import { type CueTrial, clockedTrials } from '#shared/cue-audit/cue-trials.ts';
import { foundWords } from '#shared/cue-audit/cue-words.ts';
import { portrayCueAudit, withCueCautions } from '#shared/cue-audit/portray-cue-audit.ts';
import { methodIds, methods } from '#shared/methods/methods.ts';
import { isFirstCable, type Room, type Simulated, simulatedSession } from '../../support/simulated-cues.ts';

const cables = ['Northern run', 'Southern run'] as const;
const { abx, triangle } = methods;
const orders = 999;

/** In how many of so many simulated sessions a line is found that `isMeant`. */
function foundIn(room: Room, sessions: number, isMeant: (cue: string, question: string) => boolean): number {
  let found = 0;
  for (let seed = 1; seed <= sessions; seed += 1) {
    const { lines } = cueAudit(room.method, simulatedSession(room, seed * 7919), orders);
    if (lines.some((line) => line.isFound && isMeant(line.cue, line.question))) found += 1;
  }
  return found;
}

const any = () => true;
const fitLonger =
  (ms: number) =>
  (step: string, place: number, { truth }: Simulated) =>
    step === 'fit' && place === 2 && truth === 'A' ? ms : 0;

describe('the cue audit over simulated sessions of 30 trials', () => {
  it('finds something in at most 5 % of 180 sessions without a cue, alone, in a group, and by listeners who hear [S101]', () => {
    const alone = foundIn({ method: abx, trials: 30, listeners: 1 }, 60, any);
    const group = foundIn({ method: abx, trials: 30, listeners: 6, shared: 0.8 }, 60, any);
    const hears: Room['answer'] = ({ truth }, uniform) => (uniform() < 0.85 ? truth : truth === 'A' ? 'B' : 'A');
    const hearing = foundIn({ method: abx, trials: 30, listeners: 1, answer: hears }, 60, any);
    // Of 180 sessions at 5 % nine are found, give or take 2.9 (one standard error).
    expect(alone + group + hearing).toBeLessThanOrEqual(9 + 2.9);
  });

  it('finds a fitting of X that takes 2 s longer when X is A in more than 90 % of 100 sessions [S102]', () => {
    const room = { method: abx, trials: 30, listeners: 1, longer: fitLonger(2_000) };
    // Standard error 2.4 at 94 of 100.
    expect(foundIn(room, 100, (cue, question) => cue === 'step/fit' && question === 'truth')).toBeGreaterThan(90);
  });

  it('finds a cable that always takes 2 s longer, wherever it is fitted [S102]', () => {
    const longer: Room['longer'] = (step, place, trial) =>
      step === 'fit' && isFirstCable(triangle, place, trial) ? 2_000 : 0;
    const room = { method: triangle, trials: 30, listeners: 1, longer };
    expect(foundIn(room, 20, (cue, question) => cue === 'step/fit' && question === 'truth')).toBe(20);
  });

  it('finds answers that alternate [S103]', () => {
    const room: Room = { method: abx, trials: 30, listeners: 1, answer: ({ index }) => (index % 2 ? 'A' : 'B') };
    expect(foundIn(room, 20, (cue) => cue === 'alternation')).toBe(20);
  });

  it('finds answers that name what was right in the trial before [S103]', () => {
    const sessions = Array.from({ length: 20 }, (_, seed) => {
      const trials = simulatedSession({ method: abx, trials: 30, listeners: 2 }, (seed + 1) * 7919);
      const told = trials.map((trial, index): CueTrial => {
        const choice = trials[index - 1]?.truth ?? 'A';
        return { ...trial, answers: trial.answers.map(({ listener }) => ({ listener, choice })) };
      });
      return cueAudit(abx, told, orders).lines.some((line) => line.isFound && line.cue === 'previous');
    });
    expect(sessions.filter(Boolean).length).toBe(20);
  });

  it('finds an answering time that goes with what X was [S102]', () => {
    const answersLater: Room['answersLater'] = ({ truth }) => (truth === 'A' ? 8_000 : 0);
    const room = { method: abx, trials: 30, listeners: 1, answersLater };
    expect(foundIn(room, 40, (cue) => cue === 'answering')).toBeGreaterThan(36);
  });

  it('finds answers that follow the time of fitting, which tells nothing of X [S103]', () => {
    const room: Room = { method: abx, trials: 30, listeners: 1, answer: (_, __, fitMs) => (fitMs > 6_000 ? 'A' : 'B') };
    expect(foundIn(room, 20, (cue, question) => cue === 'step/fit' && question === 'answers')).toBe(20);
  });
});

describe('the cue audit', () => {
  const leaky = simulatedSession({ method: abx, trials: 30, listeners: 2, longer: fitLonger(4_000) }, 7919);
  const clean = simulatedSession({ method: abx, trials: 30, listeners: 2 }, 7919);

  it('says what it found with its figure and what it means, and draws it [S104]', () => {
    const audit = cueAudit(abx, leaky, orders);
    const line = audit.lines.find(({ cue, question }) => cue === 'step/fit' && question === 'truth');
    expect(line?.isFound).toBe(true);
    if (line === undefined) return;
    const mean = (truth: string) => {
      const own = leaky.filter((trial) => trial.truth === truth);
      return own.reduce((sum, { presentations }) => sum + (presentations[2]?.steps.get('fit') ?? 0), 0) / own.length;
    };
    const seconds = ((mean('A') - mean('B')) / 1000).toFixed(1);
    expect(foundWords(line, abx, cables)).toBe(
      `Fitting took ${seconds}\u00a0s longer when X was A than when X was B, on the average. Anyone in the room could have heard that.`,
    );
    const { found, rows, isFound } = portrayCueAudit(audit, abx, cables, leaky);
    expect(isFound).toBe(true);
    expect(rows.find(({ cue }) => cue === 'Fitting')?.words).toBe('A trace that fitting told what was drawn.');
    expect(rows.find(({ cue }) => cue === 'Muting')?.words).toBe(
      'No trace that muting told what was drawn, or that answers went with it.',
    );
    const [first] = found;
    expect(first?.picture).toMatchObject({
      kind: 'values',
      sides: [{ label: 'When X was A' }, { label: 'When X was B' }],
    });
    const drawn = first?.picture?.kind === 'values' ? first.picture.sides.flatMap(({ values }) => values) : [];
    expect(drawn.length).toBe(30);
  });

  it('adds a caution to the finding and changes nothing else of it [S105]', () => {
    const finding = { row: '2', headline: 'h', modifiers: ['m'], scope: 's', maySay: 'x', mustNotSay: [] };
    const cautioned = withCueCautions(finding, cueAudit(abx, leaky, orders), abx, cables);
    expect({ ...cautioned, modifiers: [] }).toEqual({ ...finding, modifiers: [] });
    expect(cautioned.modifiers[0]).toBe('m');
    expect(cautioned.modifiers.length).toBeGreaterThan(1);
    expect(cautioned.modifiers.slice(1).every((words) => words.startsWith('Caution, from the cue audit: '))).toBe(true);
    expect(withCueCautions(finding, cueAudit(abx, clean, orders), abx, cables)).toEqual(finding);
  });

  it('comes to the same whenever it is made, and hangs on no listener’s label [S106]', () => {
    const again = cueAudit(abx, clean, orders);
    expect(cueAudit(abx, clean, orders)).toEqual(again);
    const swapped = clean.map((trial): CueTrial => ({ ...trial, answers: [...trial.answers].reverse() }));
    expect(cueAudit(abx, swapped, orders)).toEqual(again);
  });

  it.each(methodIds)('asks of every method, %s, and counts a question once [S100]', (id) => {
    const method = methods[id];
    const trials = simulatedSession({ method, trials: 16, listeners: 1 }, 99);
    const { lines, couldFind } = cueAudit(method, trials, 99);
    const names = lines.map(({ cue, question }) => `${cue} ${question}`);
    expect(new Set(names).size).toBe(names.length);
    for (const cue of ['step/mute', 'step/unplug', 'step/fit', 'step/check', 'change', 'listening', 'gap', 'position'])
      expect(names).toEqual(expect.arrayContaining([`${cue} truth`, `${cue} answers`]));
    expect(names).toEqual(expect.arrayContaining(['answering truth', 'previous truth', 'previous answers']));
    expect(names).toContain('alternation answers');
    expect(names).not.toContain('answering answers');
    expect(couldFind).toBe(true);
  });

  it('says so where there are too few trials to find anything, or none [S104]', () => {
    const few = cueAudit(abx, clean.slice(0, 6), orders);
    expect(few.couldFind).toBe(false);
    expect(few.lines.filter(({ isFound }) => isFound)).toEqual([]);
    expect(portrayCueAudit(few, abx, cables, clean.slice(0, 6)).summary).toContain('could show no trace');
    expect(portrayCueAudit(cueAudit(abx, [], orders), abx, cables, []).summary).toContain('nothing to audit');
  });
});

describe('the times of a trial', () => {
  const at = (second: number) => new Date(Date.parse('2026-12-05T18:00:00Z') + second * 1000).toISOString();
  const entry = (second: number, kind: string, payload: object = {}) => ({
    at: at(second),
    kind,
    payload: { ...payload },
  });

  it('are read from the record; a presentation that a pause cut short counts from its new change [S100]', () => {
    const trials = clockedTrials([
      entry(0, 'trial-opened', { trial: 1 }),
      entry(3, 'step-confirmed', { step: 'mute' }),
      entry(10, 'paused'),
      entry(60, 'resumed'),
      entry(64, 'step-confirmed', { step: 'mute' }),
      entry(70, 'step-confirmed', { step: 'fit' }),
      entry(90, 'listening-started'),
      entry(102, 'listening-ended'),
      entry(110, 'trial-locked', { trial: 1 }),
      entry(125, 'trial-opened', { trial: 2 }),
      entry(130, 'trial-voided', { trial: 2 }),
    ]);
    expect(trials.get(1)).toEqual({
      presentations: [
        {
          steps: new Map([
            ['mute', 4_000],
            ['fit', 6_000],
          ]),
          ready: 10_000,
          change: 30_000,
          listening: 12_000,
        },
      ],
      gap: null,
      answering: 8_000,
    });
    expect(trials.get(2)?.gap).toBe(15_000);
  });
});
