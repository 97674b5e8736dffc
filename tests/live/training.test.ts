import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ListenerView } from '#shared/contracts/listener-live.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { Answer } from '../../server/features/sessions/answer.entity.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, readyStudy, signedIn } from '../support/people.ts';
import { repeatableRandom } from '../support/random.ts';
import { begin, presentOpen, presentTrial } from '../support/run-session.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

// One session with everything that may be heard before its first trial, to its report.

let server: TestServer;
const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
let study: Awaited<ReturnType<typeof readyStudy>>;
let desk: Console;
let left: Phone;
let right: Phone;

/** A cable that makes a known difference, coded with the others. */
async function checkCable(base: string, email: string) {
  const manager = await signedIn(server, email);
  const made = { name: 'Series resistor', kind: 'check', lengthMm: 3000, description: '' };
  const { id } = (await manager.post(`${base}/cables`).send(made).expect(200)).body;
  const { specimens } = (
    await manager.post(`${base}/cables/${id}/specimens`).send({ serial: 'R-1', note: '' }).expect(200)
  ).body;
  return { milliDb: 1000, cableId: id, specimenIds: [specimens[0].id], trials: 1 };
}

beforeAll(async () => {
  server = await testServer({ clock, random: repeatableRandom({}) });
  const people = await makeOrganisation(server, 'Harbour');
  const step = await checkCable(`/api/organisations/${people.organisationId}`, people.manager.email);
  study = await readyStudy(server, people, {
    listenersPerSession: 2,
    checks: { reference: 0, steps: [step], same: 0, excludes: false },
  });
  desk = await Console.open(server.address, people.proctor.email, study.sessionId);
  const code = await desk.openSeating();
  left = await Phone.join(server.address, code, 'left');
  right = await Phone.join(server.address, code, 'right');
  await begin(desk, [left, right], clock);
});
afterAll(async () => {
  for (const page of [desk, left, right]) page.close();
  await server.stop();
});

/** A practice trial with what the two phones answer, to its end. */
async function practise(form: 'blind' | 'feedback', choices: readonly [string, string | null]): Promise<string[]> {
  const number = -((desk.now.training?.practised ?? 0) + 1);
  await desk.act({ kind: 'begin-practice', form, step: form === 'blind' ? null : 0 });
  const codes = await presentOpen(desk, clock);
  for (const [index, phone] of [left, right].entries()) {
    const choice = choices[index] ?? null;
    if (choice !== null) await phone.answer(number, choice);
  }
  if (choices[1] === null) clock.advance((desk.now.trial?.endsAt ?? 0) - clock.now());
  else await desk.act({ kind: 'lock-trial' });
  await desk.sees('the practice over', ({ trial }) => trial === null);
  return codes;
}
const told = async (phone: Phone): Promise<ListenerView['told']> =>
  (await phone.sees('the practice over', ({ trial }) => trial === null)).told;

describe('before the first trial', () => {
  it('tells each phone what was right, and whether it said so [S133]', async () => {
    const [a, , x] = await practise('feedback', ['A', null]);
    const right_ = a === x ? 'A' : 'B';
    const sentence = `X was the same as ${right_}`;
    expect(await told(left)).toEqual({ practice: 1, right: sentence, isRight: right_ === 'A' });
    expect(await told(right)).toEqual({ practice: 1, right: sentence, isRight: null });
  });

  it('tells nothing after blind practice, and shows no ring of a trial in either [S131] [S133]', async () => {
    await practise('blind', ['B', 'A']);
    expect(await told(left)).toBeNull();
    expect(desk.now.course.every(({ state }) => state === 'open' || state === 'now')).toBe(true);
    expect(desk.now.nextTrial).toBe(1);
  });

  it('hears both cables again, labelled [S130]', async () => {
    await desk.act({ kind: 'begin-familiarisation' });
    await presentOpen(desk, clock);
    await desk.sees('the familiarisation over', ({ trial }) => trial === null);
    expect(desk.now.training).toEqual({ practised: 2, steps: 1 });
  });

  it('keeps no answer of practice [S132]', async () => {
    expect(await server.deps.db.manager.count(Answer)).toBe(0);
  });

  it('comes to a report that names it, over a record that holds [S134] [S131]', async () => {
    for (let trial = 1; trial <= 6; trial += 1) {
      await presentTrial(desk, clock);
      for (const phone of [left, right]) await phone.answer(trial, 'A');
      await desk.sees('all in', (view) => view.trial?.answered === 2);
      await desk.act({ kind: 'lock-trial' });
      await left.sees('the lock', ({ lastLock }) => lastLock?.trial === trial);
      expect(left.view?.told).toBeNull();
    }
    await desk.act({ kind: 'finish' });
    await study.manager.post(`${study.at}/close`).send({ reason: '' }).expect(200);
    const report = (await study.manager.get(`${study.at}/report`).expect(200)).body;
    expect(report.sessions[0].training).toEqual({ labelled: 2, blind: 1, feedback: 1 });
    expect(report.record.checks.filter(({ outcome }: { outcome: string }) => outcome !== 'pass')).toEqual([]);
    expect(report.sessions[0].trials).toHaveLength(6);
  });
});
