import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { StudyDraft } from '#shared/contracts/studies.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, plainStudy, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { begin, presentTrial } from '../support/run-session.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

const treatment: StudyDraft['treatment'] = {
  kind: 'hours-of-use',
  what: 'Pink noise through the treated pieces, the others lie beside them.',
  by: 'Una of the workshop',
  duration: '100 h',
  signal: 'pink noise, 10 V into 8 Ω',
};

describe('a study of a treatment', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00Z'));
  let server: TestServer;
  let people: TestOrganisation;
  let cableId: string;
  let pieces: string[];
  const groups = (first: string[], second: string[]): StudyDraft['cables'] => [
    { cableId, specimenIds: first },
    { cableId, specimenIds: second },
  ];

  beforeAll(async () => {
    server = await testServer({ clock });
    people = await makeOrganisation(server, 'Harbour');
    const manager = await signedIn(server, people.manager.email);
    const base = `/api/organisations/${people.organisationId}/cables`;
    const plain = { name: 'Outer run', kind: 'loudspeaker', lengthMm: 5000, description: '' };
    cableId = (await manager.post(base).send(plain).expect(200)).body.id;
    for (const serial of ['O-1', 'O-2', 'O-3', 'O-4'])
      await manager.post(`${base}/${cableId}/specimens`).send({ serial, note: '' }).expect(200);
    pieces = (await manager.get(`${base}/${cableId}`).expect(200)).body.specimens.map(({ id }: { id: string }) => id);
  });
  afterAll(() => server.stop());

  it('compares pieces of one cable, each treated or not, and says what is done [Q26]', async () => {
    const manager = await signedIn(server, people.manager.email);
    const at = `/api/organisations/${people.organisationId}/studies`;
    const draft = { ...plainStudy, codeHolderId: people.codeHolder.id };
    const [one = '', two = '', three = '', four = ''] = pieces;
    const refused = async (body: object) => (await manager.post(at).send(body).expect(400)).body.errors;
    const apart = groups([one, two], [three, four]);
    expect(await refused({ ...draft, cables: apart })).toMatchObject([{ pointer: '/cables/1/cableId' }]);
    expect(await refused({ ...draft, cables: groups([one, two], [two, three]), treatment })).toEqual([
      { pointer: '/cables/1/specimenIds', detail: 'A piece is either treated or not: choose others than above' },
    ]);
    const vague = { ...treatment, what: '', by: '' };
    expect(
      (await refused({ ...draft, cables: apart, treatment: vague })).map(({ pointer }: { pointer: string }) => pointer),
    ).toEqual(['/treatment/what', '/treatment/by']);
    const { body } = await manager
      .post(at)
      .send({ ...draft, cables: apart, treatment })
      .expect(200);
    expect(body.cableNames).toEqual(['Outer run, untreated', 'Outer run, treated']);
  });

  it('is sealed, run and reported as any other, its groups under names of their own [Q26]', async () => {
    const [one = '', two = '', three = '', four = ''] = pieces;
    const cables = groups([one, two], [three, four]);
    const study = await readyStudy(server, people, { cables, treatment, listenersPerSession: 1 });
    const desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    const phone = await Phone.join(server.address, await desk.openSeating(), 'window seat');
    await begin(desk, [phone], clock);
    for (let trial = 1; trial <= 5; trial += 1) {
      const [a, , x] = await presentTrial(desk, clock);
      await phone.answer(trial, x === a ? 'A' : 'B');
      await desk.sees('all in', (view) => view.trial?.answered === 1);
      await desk.act({ kind: 'lock-trial' });
    }
    await desk.act({ kind: 'finish' });
    for (const page of [desk, phone]) page.close();
    await study.manager.post(`${study.at}/close`).send({ reason: '' }).expect(200);
    const report = (await study.manager.get(`${study.at}/report`).expect(200)).body;
    expect(report.cables).toEqual(['Outer run, untreated', 'Outer run, treated']);
    expect(report.result).toMatchObject({ correct: 5 });
    expect(report.protocol.facts).toContainEqual({
      label: 'Specimens',
      value: 'Outer run, untreated: O-1, O-2; Outer run, treated: O-3, O-4',
    });
    expect(report.protocol.facts).toContainEqual({ label: 'For how long', value: '100 h' });
  });
});
