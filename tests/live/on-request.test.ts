import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Report } from '#shared/contracts/reports.ts';
import { abx } from '#shared/methods/abx.ts';
import { drawSeed, drawSession } from '#shared/session/draw.ts';
import { DrawSecret } from '../../server/blind/draw-secret.entity.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { PresentationRequest } from '../../server/features/sessions/request.entity.ts';
import { serve } from '../../server/serve.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, readyStudy, signedIn } from '../support/people.ts';
import { repeatableRandom } from '../support/random.ts';
import { begin, present } from '../support/run-session.ts';
import { testServer } from '../support/test-server.ts';

const ways = { listenersPerSession: 1, onRequest: { most: 4 } };
const tooEarly = { ok: false, problem: { type: 'urn:fairlead:problem:too-early' } };
const wrongPhase = { ok: false, problem: { type: 'urn:fairlead:problem:wrong-phase' } };

async function seated(random?: ReturnType<typeof repeatableRandom>) {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  const server = await testServer(random === undefined ? { clock } : { clock, random });
  const people = await makeOrganisation(server, 'Harbour');
  const study = await readyStudy(server, people, ways);
  const desk = await Console.open(server.address, people.proctor.email, study.sessionId);
  const code = await desk.openSeating();
  const phone = await Phone.join(server.address, code, 'sofa');
  const { deps } = server;
  /** What X is in each trial, worked out from the secret as it lies in the database. */
  const truths = async (): Promise<readonly string[]> => {
    const { secret } = await deps.db.manager.findOneByOrFail(DrawSecret, { sessionId: study.sessionId });
    return drawSession(drawSeed(secret, [phone.contribution]), abx, { specimenCounts: [1, 1], trials: 7 }).truths;
  };
  return { clock, server, people, study, desk, code, phone, truths };
}

describe('a session on request', () => {
  let at: Awaited<ReturnType<typeof seated>>;
  let phone: Phone;
  let desk: Console;
  let truths: readonly string[];
  let again: Awaited<ReturnType<typeof serve>> | null = null;

  beforeAll(async () => {
    at = await seated();
    ({ phone, desk } = at);
    await begin(desk, [phone], at.clock);
    truths = await at.truths();
  }, 60_000);
  afterAll(async () => {
    for (const page of [desk, phone]) page.close();
    await again?.stop();
    await at.server.stop();
  });

  const hear = async (trial: number, labels: readonly string[]) => {
    const codes: string[] = [];
    for (const label of labels) {
      await phone.ask(phone.requestCommand(trial, phone.view?.trial?.presentationNumber ?? 0, label));
      codes.push(await present(desk, at.clock));
      await phone.sees('its turn', (view) => view.trial?.stage === 'asking');
    }
    return codes;
  };
  const lock = async (trial: number) => {
    await phone.answer(trial, truths[trial - 1] ?? '');
    await desk.sees('the answer', (view) => view.trial?.answered === 1);
    await desk.act({ kind: 'lock-trial' });
  };

  it('has one seat [S50]', async () => {
    await expect(Phone.join(at.server.address, at.code, 'door')).rejects.toThrow('409');
  });

  it('shows the phone what it asked for and the console the code alone, and answers once each was heard [S51] [S54]', async () => {
    await desk.act({ kind: 'begin-trial' });
    expect(desk.now.trial).toMatchObject({ stage: 'asking', code: null, presentationNumber: 0, presentations: 4 });
    expect(await phone.send(phone.answerCommand(1, 'A', 1))).toMatchObject(tooEarly);
    const asked = phone.requestCommand(1, 0, 'X');
    await phone.ask(asked);
    expect(await phone.send(asked)).toEqual({ ok: true });
    await phone.sees('the change', (view) => view.trial?.stage === 'change' && view.trial.presentation === 'X');
    await desk.sees('the code', (view) => /^\d{3}$/.test(view.trial?.code ?? ''));
    expect(await phone.send(phone.requestCommand(1, 1, 'A'))).toMatchObject(wrongPhase);
    await present(desk, at.clock);
    await phone.sees('its turn', (view) => view.trial?.stage === 'asking');
    const codes = await hear(1, ['X']);
    expect(await phone.send(phone.requestCommand(1, 2, 'X'))).toMatchObject(wrongPhase);
    expect(phone.view?.trial?.requests?.labels.map(({ canRequest }) => canRequest)).toEqual([true, true, false]);
    codes.push(...(await hear(1, ['A', 'B'])));
    // The same code is fitted again, and X bears that of the one it is.
    expect(codes[truths[0] === 'A' ? 1 : 2]).toBe(codes[0]);
    expect(phone.view?.trial?.requests).toMatchObject({ left: 0, takesAnswers: true });
    await lock(1);
  });

  it('takes up an asked change after the server was stopped and started [S52] [S53]', async () => {
    await desk.act({ kind: 'begin-trial' });
    await phone.ask(phone.requestCommand(2, 0, 'B'));
    for (const page of [desk, phone]) page.close();
    await at.server.server.stop();
    again = await serve(at.server.deps);
    const address = `http://127.0.0.1:${again.port}`;
    const back = new Phone(address, { token: phone.token, seat: phone.seat }, phone.contribution);
    phone = back;
    desk = await Console.open(address, at.people.proctor.email, at.study.sessionId);
    const view = await phone.sees('what it asked for', ({ trial }) => trial?.stage === 'change');
    expect(view.trial).toMatchObject({ presentation: 'B', presentationNumber: 1 });
    expect(await phone.send(phone.requestCommand(2, 0, 'B'))).toEqual({ ok: true });
    await present(desk, at.clock);
    await hear(2, ['A', 'X']);
    await phone.ask({ kind: 'too-loud' });
    await desk.sees('the pause', (now) => now.paused?.reason === 'too-loud');
    expect(await phone.send(phone.requestCommand(2, 3, 'A'))).toMatchObject(wrongPhase);
    await desk.act({ kind: 'resume' });
    await phone.answer(2, truths[1] ?? '');
    await desk.sees('the answer', (now) => now.trial?.answered === 1);
    await desk.act({ kind: 'lock-trial' });
  });

  it('sets a trial aside, and locks one whose listener asks for nothing [S53]', async () => {
    await desk.act({ kind: 'begin-trial' });
    await hear(3, ['A']);
    await desk.act({ kind: 'void-trial', reason: 'noise', note: '' });
    await desk.act({ kind: 'begin-trial' });
    at.clock.advance(20_000);
    await desk.sees('the lock', (view) => view.trial === null);
  });

  it('keeps every request as it was made [S55]', async () => {
    const db = at.server.deps.db.manager;
    expect(await db.countBy(PresentationRequest, { sessionId: at.study.sessionId })).toBe(8);
    await expect(db.update(PresentationRequest, { trial: 1, presentation: 0 }, { label: 'A' })).rejects.toThrow(
      'record',
    );
    await expect(db.delete(PresentationRequest, { trial: 1 })).rejects.toThrow('record');
  });

  it('says in the report how it was run and how often each was asked for [S56]', async () => {
    for (const trial of [5, 6]) {
      await desk.act({ kind: 'begin-trial' });
      await hear(trial, ['A', 'B', 'X']);
      await lock(trial);
    }
    await desk.act({ kind: 'finish' });
    await phone.sees('the end', (view) => view.phase === 'finished');
    const address = `http://127.0.0.1:${again?.port}`;
    const manager = await signedIn({ ...at.server, address }, at.people.manager.email);
    await manager.post(`${at.study.at}/close`).send({ reason: '' }).expect(200);
    const report: Report = (await manager.get(`${at.study.at}/report`).expect(200)).body;
    expect(report.record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
    expect(report.conditions[1]).toBe(
      'Run on request of a single listener: 2.6 presentations in a trial on average (A 0.8, B 0.8, X 1.0), at most 4.',
    );
    expect(report.sessions[0]?.trials[0]?.requested).toEqual([
      { label: 'A', times: 1 },
      { label: 'B', times: 1 },
      { label: 'X', times: 2 },
    ]);
    expect(report.result).toMatchObject({ trials: 5, answers: 5, missing: 1, correct: 4 });
  });
});

describe('what leaves the server before closing, on request', () => {
  const withoutDigests = (text: string) => text.replace(/[0-9a-f]{64}/g, '#').replace(/urn:uuid:[0-9a-f-]{36}/g, 'urn');

  /** Three trials; `ask` says by which names the three codes of a trial are asked for. */
  async function run(drawSecret: string, ask: (truth: string) => readonly string[]) {
    const at = await seated(repeatableRandom({ 'code-key': 'key', 'draw-secret': drawSecret }));
    const { desk, phone, clock, study } = at;
    const managed: string[] = [];
    const look = async () => {
      for (const path of [study.at, `${study.base}/sessions`, `${study.base}/sessions/${study.sessionId}`]) {
        const reply = await study.manager.get(path);
        managed.push(withoutDigests(`${reply.status} ${reply.text}`));
      }
    };
    await begin(desk, [phone], clock);
    const truths = (await at.truths()).slice(0, 3);
    const codes: string[] = [];
    for (const [index, truth] of truths.entries()) {
      await desk.act({ kind: 'begin-trial' });
      for (const [place, label] of ask(truth).entries()) {
        await phone.ask(phone.requestCommand(index + 1, place, label));
        codes.push(await present(desk, clock));
        await desk.sees('the listener’s turn', (view) => view.trial?.stage === 'asking');
        await phone.sees('its turn', (view) => view.trial?.stage === 'asking');
        await look();
      }
      await phone.answer(index + 1, 'A');
      await desk.sees('the answer', (view) => view.trial?.answered === 1);
      await desk.act({ kind: 'lock-trial' });
      await look();
    }
    for (const page of [desk, phone]) page.close();
    await at.server.stop();
    const seen = (page: Console | Phone) => page.received.map(withoutDigests);
    return { proctor: seen(desk), phone: seen(phone), managed, codes, truths };
  }

  const plainly = () => ['A', 'B', 'X'];
  /** The same two codes in the same order: whichever X is, it and its like change places. */
  const otherwise = (truth: string) => (truth === 'A' ? ['X', 'B', 'A'] : ['A', 'X', 'B']);
  let runs: Awaited<ReturnType<typeof run>>[] = [];
  beforeAll(async () => {
    runs = [await run('one', plainly), await run('one', otherwise), await run('three', plainly)];
  }, 120_000);

  it('is the same for the proctor and the manager, byte for byte, when the same codes are asked for by other names [S54]', () => {
    const [first, second] = runs;
    expect(second?.codes).toEqual(first?.codes);
    expect(second?.phone).not.toEqual(first?.phone);
    expect(second?.proctor).toEqual(first?.proctor);
    expect(second?.managed).toEqual(first?.managed);
    expect(first?.proctor.length).toBeGreaterThan(40);
  });

  it('is the same for the listener and the manager whatever X is, and for the proctor but for the code [S54] [B1] [B2]', () => {
    const [first, , third] = runs;
    expect(third?.truths).not.toEqual(first?.truths);
    expect(third?.phone).toEqual(first?.phone);
    expect(third?.managed).toEqual(first?.managed);
    const withoutCode = (texts: readonly string[] = []) =>
      texts.map((text) => text.replace(/"code":"\d{3}"/g, '"code":""'));
    expect(withoutCode(third?.proctor)).toEqual(withoutCode(first?.proctor));
  });
});
