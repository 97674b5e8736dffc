import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Report } from '#shared/contracts/reports.ts';
import { CodeKey } from '../../server/blind/code-key.entity.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { addLadder } from '../support/check-cables.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, plainStudy, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { begin, presentTrial } from '../support/run-session.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

// Two listeners who hear a known difference of 1 dB and nothing else, from the plan to the report.

const ladder = { steps: [{ milliDb: 1000, trials: 6 }], same: 1, excludes: true } as const;
const main = 5;
const inAll = main + 6 + 1;

describe('a study with check trials', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  let server: TestServer;
  let people: TestOrganisation;
  let study: Awaited<ReturnType<typeof readyStudy>>;
  let report: Report;
  let voided = 0;
  const seen: { of: number | undefined; kind: string }[] = [];

  beforeAll(async () => {
    server = await testServer({ clock });
    people = await makeOrganisation(server, 'Harbour');
    study = await readyStudy(server, people, { listenersPerSession: 2, trials: main }, ladder);
    const { rows } = await server.deps.db.manager.findOneByOrFail(CodeKey, { studyId: study.studyId });
    const check = (JSON.parse(rows) as { code: string; cable: number }[]).find(({ cable }) => cable === 2)?.code ?? '';
    const desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    const code = await desk.openSeating();
    const phones = [await Phone.join(server.address, code, 'left'), await Phone.join(server.address, code, 'right')];
    await begin(desk, phones, clock);
    for (let trial = 1; trial <= inAll + 1; trial += 1) {
      const codes = await presentTrial(desk, clock);
      const kind = codes.includes(check) ? 'check' : new Set(codes).size === 1 ? 'same' : 'main';
      seen.push({ of: desk.now.trial?.of, kind });
      if (kind === 'check' && voided === 0) {
        voided = trial;
        await desk.act({ kind: 'void-trial', reason: 'noise', note: '' });
        continue;
      }
      const right = codes[2] === codes[0] ? 'A' : 'B';
      const answer = kind === 'check' ? right : trial % 2 ? 'A' : 'B';
      for (const phone of phones) await phone.answer(trial, answer);
      await desk.sees('all in', (view) => view.trial?.answered === phones.length);
      await desk.act({ kind: 'lock-trial' });
    }
    await desk.act({ kind: 'finish' });
    for (const page of [desk, ...phones]) page.close();
    await study.manager.post(`${study.at}/close`).send({ reason: '' }).expect(200);
    report = (await study.manager.get(`${study.at}/report`).expect(200)).body;
  }, 120_000);
  afterAll(() => server.stop());

  it('counts trials in one, on every screen, and replaces a void check trial by a spare of its kind [S86] [S87]', () => {
    expect(seen.map(({ of }) => of)).toEqual(seen.map((_, index) => (index < voided ? inAll : inAll + 1)));
    expect(seen.filter(({ kind }) => kind === 'check')).toHaveLength(7);
    expect(seen.at(-1)?.kind).toBe('check');
  });

  it('reads the main trials alone for the result, and accounts for every other [S88]', () => {
    expect(report.result).toMatchObject({ trials: main, answers: 2 * main });
    expect(report.flow).toMatchObject({
      trialsCounted: main,
      trialsChecked: 7,
      trialsVoid: 1,
      trialsOpened: inAll + 1,
    });
    expect(report.record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
  });

  it('says how small a step the panel heard, and what the same with the same was answered [S88] [T80] [T82]', () => {
    const known = report.knownDifferences;
    expect(known).toMatchObject({
      sensitiveTo: 1000,
      steps: [{ milliDb: 1000, trials: 6, answers: 12, isHeard: true }],
    });
    // Six shared coins, both right each time: 1/64.
    expect(known?.steps[0]?.test?.p).toMatchObject({ numerator: '1', denominator: '64' });
    expect(known?.same).toMatchObject({ trials: 1, answers: 2 });
    expect(known?.second).toMatchObject({ excluded: [], result: { answers: 2 * main } });
    expect(report.finding.modifiers.join(' ')).toContain('heard a step of 1\u00a0dB');
  });

  it('tells check trials apart in the report, with the cables that they compared [S88]', () => {
    const trials = report.sessions[0]?.trials ?? [];
    const names = trials.map(({ check }) => check?.name ?? 'main');
    expect(names.filter((name) => name === 'main')).toHaveLength(main);
    expect(trials.find(({ check }) => check?.name.startsWith('known'))?.check?.pair).toEqual([
      'Northern run',
      'Check 1000',
    ]);
    expect(trials.find(({ check }) => check?.name.startsWith('the same'))?.check?.pair).toEqual([
      'Northern run',
      'Northern run',
    ]);
  });
});

describe('the check trials of a draft', () => {
  let server: TestServer;
  let people: TestOrganisation;
  beforeAll(async () => {
    server = await testServer({});
    people = await makeOrganisation(server, 'Harbour');
  });
  afterAll(() => server.stop());

  it('are refused at their fields where they cannot be [S89]', async () => {
    const manager = await signedIn(server, people.manager.email);
    const base = `/api/organisations/${people.organisationId}`;
    const checks = await addLadder(manager, base, { steps: [{ milliDb: 1000, trials: 6 }], same: 0 });
    const [step] = checks.steps;
    const plain = { name: 'Northern run', kind: 'loudspeaker', lengthMm: 3000, description: '' };
    const ids: { cableId: string; specimenIds: string[] }[] = [];
    for (const name of ['Northern run', 'Southern run', 'Western run']) {
      const { body } = await manager
        .post(`${base}/cables`)
        .send({ ...plain, name })
        .expect(200);
      const full = await manager.post(`${base}/cables/${body.id}/specimens`).send({ serial: 'S', note: '' });
      ids.push({ cableId: body.id, specimenIds: [full.body.specimens[0].id] });
    }
    const draft = { ...plainStudy, cables: [ids[0], ids[1]], codeHolderId: people.codeHolder.id };
    const faultsOf = async (change: object) => {
      const reply = await manager.post(`${base}/studies`).send({ ...draft, ...change });
      return (reply.body.errors ?? []).map(({ pointer }: { pointer: string }) => pointer);
    };
    expect(await faultsOf({ checks })).toEqual([]);
    expect(await faultsOf({ checks: { ...checks, steps: [step, { ...step, milliDb: 500 }] } })).toEqual([
      '/checks/steps/1/cableId',
    ]);
    expect(await faultsOf({ checks: { ...checks, steps: [{ ...step, ...ids[2] }] } })).toEqual([
      '/checks/steps/0/cableId',
    ]);
    expect(await faultsOf({ cables: [ids[0], { cableId: step?.cableId, specimenIds: step?.specimenIds }] })).toEqual([
      '/cables/1/cableId',
    ]);
    expect(await faultsOf({ checks: { ...checks, steps: [] } })).toEqual(['/checks/same']);
    expect(await faultsOf({ checks: { ...checks, steps: [], same: 2, excludes: true } })).toEqual(['/checks/excludes']);
    expect(await faultsOf({ checks, method: 'paired-preference' })).toEqual(['/checks/steps']);
    expect(await faultsOf({ checks, method: 'directional-comparison', attribute: 'bass' })).toEqual(['/checks/steps']);
    expect(await faultsOf({ checks, method: 'directional-comparison', attribute: 'loudness' })).toEqual([]);
  });
});
