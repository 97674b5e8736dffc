import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Report } from '#shared/contracts/reports.ts';
import { recordCheckNames } from '#shared/ledger/check-names.ts';
import { answerLeaf } from '#shared/session/answer-leaf.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { begin, presentTrial } from '../support/run-session.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

describe('a session with a proctor and three phones', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  let server: TestServer;
  let people: TestOrganisation;
  let study: Awaited<ReturnType<typeof readyStudy>>;
  let desk: Console;
  let phones: Phone[];
  const codesOfX: string[][] = [];

  beforeAll(async () => {
    server = await testServer({ clock });
    people = await makeOrganisation(server, 'Harbour');
    study = await readyStudy(server, people);
    desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    const code = await desk.openSeating();
    phones = [];
    for (const name of ['left', 'middle', 'right']) phones.push(await Phone.join(server.address, code, name));
    await begin(desk, phones, clock);
  });

  afterAll(async () => {
    for (const page of [desk, ...phones]) page.close();
    await server.stop();
  });

  const phone = (index: number): Phone => {
    const found = phones[index];
    if (found === undefined) throw new Error(`no phone ${index}`);
    return found;
  };

  it('plans no more sessions than the protocol registers [S15]', async () => {
    const manager = await signedIn(server, people.manager.email);
    const more = await manager
      .post(`/api/organisations/${people.organisationId}/studies/${study.studyId}/sessions`)
      .send({ plannedAt: '2026-12-06T18:00:00.000Z', room: 'Room C', proctorId: people.proctor.id });
    expect(more.status).toBe(409);
    expect(more.body.detail).toContain('registers one session');
  });

  it('gives labels in the order of joining, and every phone counts in the draw [S3]', () => {
    expect(phones.map(({ seat }) => seat)).toEqual(['L01', 'L02', 'L03']);
    expect(phones.map(({ view }) => view?.contributes)).toEqual([true, true, true]);
  });

  it('refuses an answer before the last presentation is over [S6]', async () => {
    const early = await phone(0).send(phone(0).answerCommand(1, 'A', 1));
    expect(early).toMatchObject({ ok: false, problem: { type: 'urn:fairlead:problem:too-early' } });
  });

  it('acknowledges an answer with the leaf that the phone computes itself [S7]', async () => {
    codesOfX.push(await presentTrial(desk, clock));
    const command = phone(0).answerCommand(1, 'A', 1);
    const { held } = await phone(0).ask(command);
    const { salt, trial, choice, confidence } = command;
    expect(held?.leaf).toBe(answerLeaf({ salt, session: study.sessionId, seat: 'L01', trial, choice, confidence }));
  });

  it('counts a repeated answer once and lets a later one replace it until the lock [S7]', async () => {
    const again = await phone(0).ask(phone(0).answerCommand(1, 'A', 1));
    expect(again.held?.revision).toBe(1);
    const changed = await phone(0).ask(phone(0).answerCommand(1, 'B', 2));
    expect(changed.held?.choice).toBe('B');
    const stale = await phone(0).ask(phone(0).answerCommand(1, 'A', 1));
    expect(stale.held).toMatchObject({ choice: 'B', revision: 2 });
    await desk.sees('one answer', (view) => view.trial?.answered === 1);
  });

  it('does not lock while a seat is out and its window is open [S8]', async () => {
    const refused = await desk.send({ kind: 'lock-trial', expectVersion: desk.now.version });
    expect(refused).toMatchObject({ ok: false, problem: { type: 'urn:fairlead:problem:too-early' } });
  });

  it('locks when all are in, and each phone gets its receipt [S9]', async () => {
    const second = await phone(1).answer(1, 'A');
    await phone(2).answer(1, 'B');
    await desk.sees('three answers', (view) => view.trial?.answered === 3);
    await desk.act({ kind: 'lock-trial' });
    const view = await phone(1).sees('a receipt', ({ lastLock }) => lastLock?.trial === 1);
    expect(view.lastLock?.leaf).toBe(second.leaf);
    expect(view.lastOutcome).toEqual({ trial: 1, outcome: 'locked', counted: true });
  });

  it('refuses a command on a view that is out of date [S10]', async () => {
    const refused = await desk.send({ kind: 'begin-trial', expectVersion: desk.now.version - 1 });
    expect(refused).toMatchObject({ ok: false, problem: { type: 'urn:fairlead:problem:stale-view' } });
  });

  it('ends every change at its registered length, or at the next whole one [S5]', async () => {
    await desk.act({ kind: 'begin-trial' });
    const started = clock.now();
    await desk.act({ kind: 'confirm-step', step: 'mute' });
    await desk.act({ kind: 'confirm-step', step: 'unplug' });
    await desk.act({ kind: 'confirm-step', step: 'fit' });
    clock.advance(3_500);
    await desk.act({ kind: 'confirm-step', step: 'check' });
    expect(desk.now.trial).toMatchObject({ endsAt: started + 6_000, longChange: true });
    const early = await desk.send({ kind: 'confirm-step', step: 'unmute', expectVersion: desk.now.version });
    expect(early).toMatchObject({ ok: false, problem: { type: 'urn:fairlead:problem:too-early' } });
  });

  it('pauses at once when a phone says too loud, and starts the presentation again after it [S11]', async () => {
    await phone(2).ask({ kind: 'too-loud' });
    await desk.sees('the pause', (view) => view.paused?.reason === 'too-loud');
    expect(desk.now.paused?.seat).toBe('L03');
    expect(desk.now.trial?.step).toBeNull();
    await desk.act({ kind: 'resume' });
    expect(desk.now.trial?.step).toBe('mute');
  });

  it('sets a trial aside with a reason, and a spare with its excerpt takes its place [S12]', async () => {
    expect(desk.now.trial?.excerpt).toBe('Noise');
    await desk.act({ kind: 'void-trial', reason: 'noise', note: 'A door.' });
    expect(desk.now.course.map(({ state }) => state)).toEqual(['locked', 'void', 'now', 'open', 'open', 'open']);
  });

  it('keeps a trial open for a phone that was away and back within the window [S13]', async () => {
    codesOfX.push(await presentTrial(desk, clock));
    phone(1).socket.disconnect();
    await desk.sees('a seat away', (view) => view.seats.some(({ seat, state }) => seat === 'L02' && state === 'away'));
    await phone(0).answer(3, 'A');
    await phone(2).answer(3, 'B');
    phone(1).socket.connect();
    await desk.sees('the seat back', (view) =>
      view.seats.some(({ seat, state }) => seat === 'L02' && state === 'ready'),
    );
    await phone(1).answer(3, 'A');
    await desk.sees('all in', (view) => view.trial?.answered === 3);
    await desk.act({ kind: 'lock-trial' });
  });

  it('locks at the end of the window without a silent seat, and calls its answer late [S8]', async () => {
    codesOfX.push(await presentTrial(desk, clock));
    await phone(0).answer(4, 'B');
    await phone(2).answer(4, 'B');
    clock.advance(20_000);
    await desk.sees('the lock', (view) => view.trial === null);
    const late = await phone(1).send(phone(1).answerCommand(4, 'A', 9));
    expect(late).toMatchObject({ ok: false, problem: { type: 'urn:fairlead:problem:too-late' } });
    await desk.sees('the late mark', (view) => view.seats.some(({ seat, late: isLate }) => seat === 'L02' && isLate));
  });

  it('finishes after the spare, closes, and the report verifies and counts by the code key [R1] [L3]', async () => {
    for (const trial of [5, 6]) {
      const codes = await presentTrial(desk, clock);
      codesOfX.push(codes);
      // These two hear it: X matches whichever of A and B bears its code.
      const heard = codes[2] === codes[0] ? 'A' : 'B';
      for (const one of phones) await one.answer(trial, heard);
      await desk.sees('all in', (view) => view.trial?.answered === 3);
      await desk.act({ kind: 'lock-trial' });
    }
    expect(desk.now.nextTrial).toBeNull();
    expect(desk.now.trial).toBeNull();
    await desk.act({ kind: 'finish' });
    await phone(0).sees('the end', (view) => view.phase === 'finished');
    await study.manager.post(`${study.at}/close`).send({ reason: '' }).expect(200);
    const report: Report = (await study.manager.get(`${study.at}/report`).expect(200)).body;
    expect(report.record.checks).toEqual(
      recordCheckNames.slice(1).map(({ name }) => ({ name, outcome: 'pass', reason: expect.stringMatching(/\.$/) })),
    );
    const truths = codesOfX.map((codes) => (codes[2] === codes[0] ? 'A' : 'B'));
    const locked = report.sessions[0]?.trials.filter(({ outcome }) => outcome === 'locked') ?? [];
    expect(locked.map(({ truth }) => truth)).toEqual(truths);
    const expected = locked.reduce(
      (sum, { truth, answers }) => sum + answers.filter(({ choice }) => choice === truth).length,
      0,
    );
    expect(report.result).toMatchObject({ trials: 5, answers: 15, missing: 1, correct: expected, coins: 5 });
    expect(report.flow).toMatchObject({ trialsOpened: 6, trialsVoid: 1, trialsCounted: 5, answersMissing: 1 });
    expect(report.missing).toEqual([
      { session: 1, trial: 4, listener: 'L02', why: 'arrived after the trial had locked' },
    ]);
    expect(report.rung.name).toBe('double-blind to the cable');
  });

  it('shows nothing of a study to another organisation [A2]', async () => {
    const others = await makeOrganisation(server, 'Elsewhere');
    const stranger = await signedIn(server, others.manager.email);
    const absent = await stranger.get(`/api/organisations/${others.organisationId}/studies/${crypto.randomUUID()}`);
    const foreign = await stranger.get(`/api/organisations/${others.organisationId}/studies/${study.studyId}`);
    const without = (body: Record<string, unknown>) => ({ ...body, instance: '' });
    expect(foreign.status).toBe(404);
    expect(without(foreign.body)).toEqual(without(absent.body));
  });
});
