import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { observerView } from '#shared/contracts/observer-live.ts';
import type { Report } from '#shared/contracts/reports.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { observerTokenOf } from '../../server/features/attendances/personal-link.ts';
import { Console, ObserverPage, Phone } from '../support/live.ts';
import { makeOrganisation, readyStudy, type TestOrganisation } from '../support/people.ts';
import { begin, presentTrial } from '../support/run-session.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

describe('a session with two observers', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  let server: TestServer;
  let people: TestOrganisation;
  let study: Awaited<ReturnType<typeof readyStudy>>;
  let desk: Console;
  let phone: Phone;
  let witness: ObserverPage;
  let doubled: ObserverPage;
  const at = () => `${study.base}/sessions/${study.sessionId}/observers`;

  beforeAll(async () => {
    server = await testServer({ clock });
    people = await makeOrganisation(server, 'Harbour');
    study = await readyStudy(server, people);
  });
  afterAll(async () => {
    for (const page of [desk, phone, witness, doubled]) page?.close();
    await server.stop();
  });

  it('sends each a link of their own under the neutral title, and asks nobody twice [S124]', async () => {
    await study.manager.post(at()).send({ name: 'Ada Brook', email: 'ada@witness.example' }).expect(200);
    await study.manager.post(at()).send({ name: 'Proctor', email: people.proctor.email }).expect(200);
    const again = await study.manager.post(at()).send({ name: 'Ada', email: 'ada@witness.example' });
    expect(again.body.errors).toEqual([{ pointer: '/email', detail: 'This address is asked to watch already' }]);
    const { rows } = (await study.manager.get(at()).expect(200)).body;
    expect(rows.map(({ label }: { label: string }) => label)).toEqual(['W1', 'W2']);
    const mails: { text: string }[] = await server.deps.db.query(
      "select text from outbox where recipient = 'ada@witness.example'",
    );
    const token = observerTokenOf(server.deps.config, rows[0].id);
    expect(mails.map(({ text }) => text.includes(`/observe#${token}`))).toEqual([true]);
    witness = await ObserverPage.open(server.address, token);
    doubled = await ObserverPage.open(server.address, observerTokenOf(server.deps.config, rows[1].id));
    const stranger = new ObserverPage(server.address, { audience: 'observer', token: `${token.slice(0, -2)}xx` });
    const refused = await new Promise<Error>((resolve) => stranger.socket.on('connect_error', resolve));
    expect(refused.message).toBe('refused');
    stranger.close();
  });

  it('shows phase, trial, steps and who has answered, and has no field for more [S125]', async () => {
    desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    const code = await desk.openSeating();
    phone = await Phone.join(server.address, code, 'left');
    await witness.sees('seating', ({ phase, seats }) => phase === 'seating' && seats.length === 1);
    await begin(desk, [phone], clock);
    for (let trial = 1; trial <= 5; trial += 1) {
      if (trial === 3) {
        const { version } = desk.now;
        witness.socket.disconnect();
        await desk.sees('that one of them is gone', (view) => view.version > version);
      }
      await presentTrial(desk, clock);
      await phone.answer(trial, 'A');
      await doubled.sees('the answer', ({ seats }) => seats[0]?.state === 'answered');
      await desk.act({ kind: 'lock-trial' });
      if (trial !== 3) continue;
      const { version } = desk.now;
      witness.socket.connect();
      await desk.sees('that they are back', (view) => view.version > version);
    }
    const fields = Object.keys(observerView.shape.trial.unwrap().shape);
    for (const secret of ['code', 'excerpt', 'truth', 'choice', 'levels']) expect(fields).not.toContain(secret);
  });

  it('takes "I watched" once, at the end, with what the socket measured [S126]', async () => {
    const early = await witness.send({ kind: 'sign', remarks: '', isNamed: false });
    expect(early).toMatchObject({ ok: false, problem: { type: 'urn:fairlead:problem:wrong-phase' } });
    await desk.act({ kind: 'finish' });
    await witness.sees('the end', ({ canSign }) => canSign);
    expect(witness.view?.watched).toEqual([1, 2, 4, 5]);
    await witness.ask({ kind: 'sign', remarks: 'Nobody spoke.', isNamed: true });
    await doubled.ask({ kind: 'sign', remarks: '', isNamed: false });
    await witness.sees('the signature', ({ signed }) => signed);
    const twice = await witness.send({ kind: 'sign', remarks: 'Again.', isNamed: true });
    expect(twice).toMatchObject({ ok: false, problem: { detail: 'You have signed already.' } });
  });

  it('stands in the report, with the name only where they agreed and with any other duty [S127]', async () => {
    await study.manager.post(`${study.at}/close`).send({ reason: '' }).expect(200);
    const report: Report = (await study.manager.get(`${study.at}/report`).expect(200)).body;
    expect(report.record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
    expect(report.observers).toEqual([
      {
        session: 1,
        observer: 'W1',
        name: 'Ada Brook',
        duties: [],
        watched: [1, 2, 4, 5],
        of: 5,
        remarks: 'Nobody spoke.',
      },
      { session: 1, observer: 'W2', name: null, duties: ['proctor'], watched: [1, 2, 3, 4, 5], of: 5, remarks: '' },
    ]);
    expect(report.rung.why).toContain('Not witnessed: not every counted trial of session 1 was watched.');
  });
});
