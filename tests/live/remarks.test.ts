import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Report } from '#shared/contracts/reports.ts';
import { remarkLeaf } from '#shared/session/remark-leaf.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, readyStudy } from '../support/people.ts';
import { begin, presentTrial } from '../support/run-session.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

describe('what listeners say beside the trials', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  let server: TestServer;
  let study: Awaited<ReturnType<typeof readyStudy>>;
  let desk: Console;
  let phones: Phone[];
  let report: Report;

  beforeAll(async () => {
    server = await testServer({ clock });
    const people = await makeOrganisation(server, 'Harbour');
    const breaks = { trials: 3, leastMinutes: 10, blocksPerDay: 2 };
    study = await readyStudy(server, people, { listenersPerSession: 2, breaks });
    desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    const code = await desk.openSeating();
    phones = [await Phone.join(server.address, code, 'left'), await Phone.join(server.address, code, 'right')];
    await begin(desk, phones, clock);
    for (let trial = 1; trial <= 5; trial += 1) {
      await presentTrial(desk, clock);
      for (const phone of phones) await phone.answer(trial, 'A');
      await desk.sees('all in', (view) => view.trial?.answered === phones.length);
      await desk.act({ kind: 'lock-trial' });
      if (trial === 3) await desk.sees('the break', (view) => view.block?.break?.number === 1);
      if (trial !== 3) continue;
      for (const [index, phone] of phones.entries()) await phone.sayFatigue(1, index === 0 ? 'tired' : 'fresh');
      await desk.sees('both said it', (view) => view.block?.break?.said === 2);
      const refused = await desk.send({ kind: 'resume', expectVersion: desk.now.version });
      expect(refused).toMatchObject({ ok: false, problem: { type: 'urn:fairlead:problem:too-early' } });
      await desk.act({ kind: 'resume', reason: 'A listener has a train to catch.' });
    }
    await desk.act({ kind: 'finish' });
  });

  afterAll(async () => {
    for (const page of [desk, ...phones]) page.close();
    await server.stop();
  });

  const said = { wentBy: 'The cymbals.', noticed: 'yes', what: 'A click.', guesses: ['Copper', ''] };

  it('is asked once the session is over and held under the leaf that the phone computes [S110] [S112]', async () => {
    const [first] = phones;
    if (first === undefined) throw new Error('no phone');
    const asked = await first.sees('the exit questions', ({ exit }) => exit !== null);
    expect(asked.exit).toEqual({ guesses: ['What do you think A was?', 'What do you think B was?'], held: null });
    await first.sayAtExit(said);
    const held = await first.sees('the leaf', ({ exit }) => exit?.held);
    const salt = first.exitSalt;
    expect(held.exit?.held).toBe(
      remarkLeaf({ salt, session: study.sessionId, seat: 'L01', about: 'exit', said: said as never }),
    );
    await first.sayAtExit(said);
    await expect(first.sayAtExit({ wentBy: 'Something else.' })).rejects.toThrow('the first answer stands');
    await desk.sees('one of two', ({ exit }) => exit?.said === 1 && exit.of === 2);
  });

  it('refuses what is too long, with the field [S111]', async () => {
    const tooLong = await phones[1]?.send({
      kind: 'exit',
      salt: '0'.repeat(32),
      answers: { wentBy: 'x'.repeat(501), noticed: null, what: '', guesses: [] },
    });
    expect(tooLong).toMatchObject({ ok: false, problem: { errors: [{ pointer: '/answers/wentBy' }] } });
  });

  it('stands in the report by label after closing, unabridged, and verifies [S113]', async () => {
    await study.manager.post(`${study.at}/close`).send({ reason: '' }).expect(200);
    report = (await study.manager.get(`${study.at}/report`).expect(200)).body;
    expect(report.record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
    expect(report.said.exits).toEqual([
      {
        session: 1,
        listener: 'L01',
        wentBy: 'The cymbals.',
        noticed: 'yes',
        what: 'A click.',
        guesses: [
          { question: 'What do you think A was?', text: 'Copper' },
          { question: 'What do you think B was?', text: '' },
        ],
      },
    ]);
    expect(report.said.fatigue.map(({ listener, fatigue }) => `${listener} ${fatigue}`)).toEqual([
      'L01 tired',
      'L02 fresh',
    ]);
    expect(report.deviations.map(({ text }) => text)).toEqual([
      'The session went on before its registered break was over: A listener has a train to catch.',
    ]);
    expect(report.cueAudit.rows.map(({ cue }) => cue)).toContain('The place in the session');
  });

  it('is not taken any more once the study is closed [S112]', async () => {
    await expect(phones[1]?.sayAtExit(said)).rejects.toThrow('The study is closed');
  });
});
