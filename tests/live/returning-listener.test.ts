import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { linkTokenOf } from '../../server/features/attendances/personal-link.ts';
import { readRecord } from '../../server/ledger/ledger.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { begin, presentTrial } from '../support/run-session.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

// A study of two sessions: Ada comes to both by her links, Bo to the first by his, somebody to the second by code.
describe('a listener who comes back by a personal link', () => {
  let server: TestServer;
  let people: TestOrganisation;
  let study: Awaited<ReturnType<typeof readyStudy>>;
  const clock = new HandClock(Date.parse('2026-12-01T09:00:00.000Z'));
  const seats: Record<string, string> = {};

  const linksOf = async (sessionId: string, addresses: string) => {
    const at = `${study.base}/sessions/${sessionId}/attendances`;
    await study.manager.post(at).send({ addresses }).expect(200);
    const { rows } = (await study.manager.get(at).expect(200)).body;
    return rows.map(({ id }: { id: string }) => linkTokenOf(server.deps.config, id)) as string[];
  };

  /** One trial in which everybody answers, and the end. */
  const run = async (desk: Console, phones: Phone[]) => {
    await begin(desk, phones, clock);
    await presentTrial(desk, clock);
    for (const phone of phones) await phone.answer(1, 'A');
    await desk.sees('all in', (view) => view.trial?.answered === phones.length);
    await desk.act({ kind: 'lock-trial' });
    await desk.act({ kind: 'abandon', reason: 'Enough for this test.' });
    for (const page of [desk, ...phones]) page.close();
  };

  beforeAll(async () => {
    server = await testServer({ clock });
    people = await makeOrganisation(server, 'Harbour');
    study = await readyStudy(server, people, { sessions: 2 });
  }, 60_000);
  afterAll(() => server.stop());

  it('finds the same seat on every phone that opens the link, and nobody sits there twice [G7]', async () => {
    const [ada = '', bo = ''] = await linksOf(study.sessionId, 'ada@listeners.example, bo@listeners.example');
    const early = await request(server.address)
      .post('/api/personal-link/seat')
      .send({ token: ada, place: '', adult: true, agreed: true, consentVersion: 2, commitment: 'a'.repeat(64) });
    expect([early.status, early.body.detail]).toEqual([409, expect.stringContaining('once the proctor opens')]);
    const desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    const code = await desk.openSeating();
    // At once, and with one contribution: it does not matter whose commitment came first.
    const [sofa, elsewhere] = await Promise.all([
      Phone.joinByLink(server.address, ada, 'sofa'),
      Phone.joinByLink(server.address, ada, 'sofa'),
    ]);
    expect([elsewhere.seat, elsewhere.token]).toEqual([sofa.seat, sofa.token]);
    elsewhere.close();
    const look = await request(server.address).post('/api/personal-link/look').send({ token: ada }).expect(200);
    expect(look.body).toMatchObject({ phase: 'open', seat: sofa.token });
    const other = await Phone.joinByLink(server.address, bo, 'chair');
    const byCode = await Phone.join(server.address, code, 'stool');
    seats.ada = sofa.seat;
    seats.bo = other.seat;
    seats.stool = byCode.seat;
    expect(new Set(Object.values(seats)).size).toBe(3);
    await desk.sees('three seats', (view) => view.seats.length === 3);
    await run(desk, [sofa, other, byCode]);
  }, 60_000);

  it('keeps the label over the sessions of a study; whoever comes by code gets a new one [S3] [G7]', async () => {
    const planned = await study.manager
      .post(`${study.at}/sessions`)
      .send({ plannedAt: '2026-12-06T18:00:00.000Z', timeZone: 'UTC', room: 'Room B', proctorId: people.proctor.id })
      .expect(200);
    const [ada = ''] = await linksOf(planned.body.id, 'ADA@listeners.example');
    const desk = await Console.open(server.address, people.proctor.email, planned.body.id);
    const code = await desk.openSeating();
    const byCode = await Phone.join(server.address, code, 'stool');
    const again = await Phone.joinByLink(server.address, ada, 'sofa');
    expect(again.seat).toBe(seats.ada);
    expect(Object.values(seats)).not.toContain(byCode.seat);
    await run(desk, [again, byCode]);
  }, 60_000);

  it('is one listener in record, report and checks; who joined by code alone is counted beside [G7]', async () => {
    const entries = await readRecord(server.deps.db.manager, study.studyId);
    const joined = entries.filter(({ kind }) => kind === 'listener-joined').map(({ payload }) => payload);
    expect(joined.map(({ seat, joinedBy }) => `${seat} ${joinedBy}`)).toEqual([
      `${seats.ada} personal-link`,
      `${seats.bo} personal-link`,
      `${seats.stool} code`,
      'L04 code',
      `${seats.ada} personal-link`,
    ]);
    await study.manager.post(`${study.at}/close`).send({ reason: 'Enough for this test.' }).expect(200);
    const { body: report } = await study.manager.get(`${study.at}/report`).expect(200);
    expect(report.flow).toMatchObject({ listeners: 4, listenersUnlinked: 2 });
    expect(report.result.listeners).toBe(4);
    const ada = report.result.byListener.find(({ listener }: { listener: string }) => listener === seats.ada);
    expect(ada.answers).toBe(2);
    expect(report.record.checks).toContainEqual({
      name: 'One label to a listener',
      outcome: 'pass',
      reason: '2 of 4 listeners joined by code alone, so it is not certain that each is a different person.',
    });
    expect(report.record.checks.filter(({ outcome }: { outcome: string }) => outcome !== 'pass')).toEqual([]);
  }, 60_000);

  it('stands by address in no view of the study, in its record nowhere, and by label in no list of invitations [G8]', async () => {
    const owner = await signedIn(server, people.owner.email);
    const views: string[] = [];
    for (const path of [study.at, `${study.at}/report`, `${study.base}/studies`, `${study.base}/reports`])
      views.push((await owner.get(path).expect(200)).text);
    views.push(JSON.stringify(await readRecord(server.deps.db.manager, study.studyId)));
    for (const text of views) expect(text).not.toContain('listeners.example');
    const { text } = await owner.get(`${study.base}/sessions/${study.sessionId}/attendances`).expect(200);
    expect(text).toContain('ada@listeners.example');
    expect(text).not.toMatch(/"L\d\d"/);
  });
});
