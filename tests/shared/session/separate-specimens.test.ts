import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { studyDraft } from '#shared/contracts/studies.ts';
import { publicationParts } from '#shared/ledger/publication-parts.ts';
import { verifyStudy } from '#shared/ledger/verify.ts';
import { methodIds, methodOf, methods } from '#shared/methods/methods.ts';
import { blindingRung } from '#shared/session/blinding-rung.ts';
import type { CodeKeyRow } from '#shared/session/commitments.ts';
import { type Draw, drawSeed, drawSession } from '#shared/session/draw.ts';
import { fairNumber } from '#shared/session/fair-number.ts';
import { fittedBy } from '#shared/session/fitting.ts';
import { sessionsInRecord } from '#shared/session/read-record.ts';
import type { SessionState } from '#shared/session/state.ts';
import { chainedAgain, closedStudy, people } from '../../support/closed-study.ts';
import { plainStudy } from '../../support/people.ts';

const separable = methodIds.filter((id) => methods[id].separate !== null);
const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`;

function draftWith(method: string, specimens: readonly [number, number], separateSpecimens = true) {
  const cable = (at: number, count: number) => ({
    cableId: id(at),
    specimenIds: Array.from({ length: count }, (_, n) => id(at * 10 + n)),
  });
  const attribute = method === 'directional-comparison' ? 'bass' : '';
  const cables = [cable(1, specimens[0]), cable(2, specimens[1])];
  return studyDraft.safeParse({
    ...plainStudy,
    method,
    attribute,
    cables,
    codeHolderId: id(9),
    separateSpecimens,
  });
}

describe('separate specimens in a plan', () => {
  it.each(separable)('need two of each cable: %s [S40]', (method) => {
    expect(draftWith(method, [2, 3]).success).toBe(true);
    expect(draftWith(method, [1, 1], false).success).toBe(true);
    const { error } = draftWith(method, [2, 1]);
    expect(error?.issues.map(({ path }) => path.join('/'))).toEqual(['cables/1/specimenIds']);
  });

  it('are offered by every method that fits a cable again within a trial, and by no other [S40]', () => {
    for (const method of Object.values(methods)) {
      const repeats = method.truths.some((truth) => {
        const cables = method.presentations.map((presentation) => method.fitted(presentation, truth, 0));
        return new Set(cables).size < cables.length;
      });
      expect([method.id, method.separate !== null]).toEqual([method.id, repeats]);
    }
    const { error } = draftWith('paired-preference', [2, 2]);
    expect(error?.issues.map(({ message }) => message)).toEqual([expect.stringContaining('nothing to hide')]);
  });
});

// Codes of two cables with two specimens each, and the same with the cables of the second ones exchanged.
const key: CodeKeyRow[] = ['317', '355', '528', '566'].map((code, index) => ({
  code,
  specimen: '',
  serial: '',
  cable: index < 2 ? 0 : 1,
}));
const exchanged = [key[0], key[3], key[2], key[1]].map((row, index) => ({ ...row, cable: index < 2 ? 0 : 1 }));

/** Every draw of a session of two trials that is possible, each as likely as every other. */
function everyDraw(method: (typeof methods)[(typeof methodIds)[number]]): Draw[] {
  const deals = Array.from({ length: method.separate?.deals ?? 1 }, (_, deal) => deal);
  const trials = method.truths.flatMap((truth) => deals.map((deal) => ({ truth, deal })));
  return [0, 1].flatMap((first) =>
    ([0, 1] as const).flatMap((firstSide) =>
      trials.flatMap((one) =>
        trials.map((two) => ({
          firstSide,
          specimens: [first, first] as const,
          truths: [one.truth, two.truth],
          separate: { specimen: 1 - first, deals: [one.deal, two.deal] },
        })),
      ),
    ),
  );
}

describe.each(separable)('the codes of a session, %s', (methodId) => {
  const method = methods[methodId];
  const codesOf = (draw: Draw, rows: readonly { code?: string; cable: number }[], trial: number) =>
    (trial === 0 ? method.familiarisation : method.presentations).map((presentation) => {
      const { cable, specimen } = fittedBy(draw, {
        method,
        state: { plan: {} as SessionState['plan'], ended: [] },
        trial,
        presentation,
      });
      return rows.filter((row) => row.cable === cable)[specimen]?.code ?? 'none';
    });
  const seen = (draw: Draw, rows: readonly { code?: string; cable: number }[]) =>
    [0, 1, 2].map((trial) => codesOf(draw, rows, trial).join(' ')).join(' | ');

  it('never come twice in a trial [S41]', () => {
    const trials = everyDraw(method).flatMap((draw) => [0, 1, 2].map((trial) => codesOf(draw, key, trial)));
    expect(trials.filter((codes) => new Set(codes).size < codes.length)).toEqual([]);
    expect(trials.length).toBeGreaterThan(40);
  });

  it('are as likely when the two cables of the separate specimens are exchanged, though another answer is right [S42]', () => {
    const count = (rows: readonly { code?: string; cable: number }[]) => {
      const counts = new Map<string, number>();
      for (const draw of everyDraw(method)) counts.set(seen(draw, rows), (counts.get(seen(draw, rows)) ?? 0) + 1);
      return counts;
    };
    expect([...count(exchanged)].sort()).toEqual([...count(key)].sort());
    // The same codes come of other truths: in no trial is what is right the same under both keys.
    const truthsBySeen = new Map<string, string[][]>();
    for (const draw of everyDraw(method))
      truthsBySeen.set(seen(draw, key), [...(truthsBySeen.get(seen(draw, key)) ?? []), [...draw.truths]]);
    const right = (truth: string) => (method.trials.isRight === null ? isSame(truth) : rightOf(truth));
    const isSame = (truth: string) => String(truth.charAt(0) === truth.charAt(1));
    const rightOf = (truth: string) =>
      method.options({}).find(({ value }) => method.trials.isRight?.(value, truth))?.value ?? '';
    const alike = everyDraw(method).filter((draw) => {
      const underKey = truthsBySeen.get(seen(draw, exchanged)) ?? [];
      const agrees = (truths: readonly string[]) =>
        [0, 1].some((index) => right(truths[index] ?? '') === right(draw.truths[index] ?? ''));
      return underKey.length === 0 || underKey.some(agrees);
    });
    expect(alike).toEqual([]);
  });

  it('follow from the seed under labels of their own, and leave other draws as they were [S41]', () => {
    const seed = drawSeed('01'.repeat(32), ['02'.repeat(32)]);
    const shape = { specimenCounts: [3, 2] as const, trials: 6 };
    const plain = drawSession(seed, method, shape);
    const separate = drawSession(seed, method, { ...shape, isSeparate: true });
    expect(plain).not.toHaveProperty('separate');
    expect([separate.firstSide, separate.truths]).toEqual([plain.firstSide, plain.truths]);
    const first = fairNumber(seed, 'separate/first', 2);
    expect(separate.specimens).toEqual([first, first]);
    expect(separate.separate?.specimen).toBe(1 - first);
    const ways = method.separate?.deals ?? 1;
    const deals = separate.truths.map((_, index) => fairNumber(seed, `separate/trial/${index + 1}`, ways));
    expect(separate.separate?.deals).toEqual(ways === 1 ? undefined : deals);
    expect(() => drawSession(seed, method, { specimenCounts: [2, 1], trials: 5, isSeparate: true })).toThrow(
      RangeError,
    );
  });

  it('verify from the document, and an altered place of the separate specimens is caught [S41]', () => {
    const parts = publicationParts(closedStudy(1, methodId, undefined, false, { separateSpecimens: true }));
    expect(verifyStudy(parts).filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
    const draws = (parts.draws as Draw[]).map((draw) => ({
      ...draw,
      separate: { ...draw.separate, specimen: draw.specimens[0] },
    }));
    expect(verifyStudy({ ...parts, draws }).find(({ id: check }) => check === 'draws')?.outcome).toBe('fail');
  });
});

describe('the vectors of separate specimens', () => {
  it('are what this program computes [S41]', () => {
    const range = (from: number) =>
      Array.from({ length: 32 }, (_, n) => (from + n).toString(16).padStart(2, '0')).join('');
    const seed = drawSeed(range(0), [range(32)]);
    const spec = readFileSync('docs/spec/blind.md', 'utf8');
    const places = ['separate/first', 'separate/other'].map((label) => fairNumber(seed, label, 2));
    const deals = Array.from({ length: 8 }, (_, index) => fairNumber(seed, `separate/trial/${index + 1}`, 4));
    expect(spec).toContain(`\`${places.join('; ')}\``);
    expect(spec).toContain(`\`${deals.join(' ')}\``);
  });
});

describe('the rung of separate specimens', () => {
  const { entries } = closedStudy(2, 'abx', undefined, false, { separateSpecimens: true });
  const method = methodOf('abx');
  const states = sessionsInRecord(entries, method);

  it('is fully double-blind, and says what the codes still tell [S43]', () => {
    const rung = blindingRung(entries, states, method);
    expect(rung.name).toBe('fully double-blind');
    expect(rung.why).toContain('could still see in which trials X was the same cable, and not which one it was');
  });

  it('is less where one session went without them, and where a duty was doubled [S43]', () => {
    const mixed = states.map((state, index) =>
      index === 0 ? state : { ...state, plan: { ...state.plan, separateSpecimens: undefined } },
    );
    expect(blindingRung(entries, mixed, method).name).toBe('double-blind to the cable');
    const doubled = chainedAgain(
      entries.map((entry) =>
        entry.kind === 'study-closed' ? { ...entry, payload: { ...entry.payload, codeHolder: people.proctor } } : entry,
      ),
    );
    expect(blindingRung(doubled, states, method).name).toBe('listener-blind');
  });
});
