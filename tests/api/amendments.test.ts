import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { cautions } from '#shared/contracts/proctor-live.ts';
import { confirmationIds } from '#shared/contracts/publications.ts';
import type { InclusionFile } from '#shared/contracts/registry.ts';
import type { Study, StudyDraft } from '#shared/contracts/studies.ts';
import { inclusionFault } from '#shared/ledger/registry.ts';
import { checksOfFile } from '#shared/ledger/verify.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { amendStudy } from '../../server/features/studies/amending.service.ts';
import { signaturesOf } from '../../server/ledger/head-signatures.ts';
import { readRecord } from '../../server/ledger/ledger.ts';
import { Sittings } from '../../server/live/sittings.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { begin, presentTrial } from '../support/run-session.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

describe('an amended protocol', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  let server: TestServer;
  let people: TestOrganisation;
  let study: Awaited<ReturnType<typeof readyStudy>>;
  let desk: Console;
  beforeAll(async () => {
    server = await testServer({ clock });
    people = await makeOrganisation(server, 'Harbour');
    study = await readyStudy(server, people, { sessions: 2, listenersPerSession: 1 });
    const cancelled = { plannedAt: '2026-12-06T18:00:00.000Z', room: 'Room C', proctorId: people.proctor.id };
    const { body } = await study.manager.post(`${study.at}/sessions`).send(cancelled).expect(200);
    const where = `${study.base}/sessions/${body.id}`;
    await study.manager.post(`${where}/cancel`).send({ reason: 'The room is taken.' }).expect(200);
    desk = await Console.open(server.address, people.proctor.email, study.sessionId);
  }, 120_000);
  afterAll(async () => {
    desk.close();
    await server.stop();
  });

  const view = async (): Promise<Study> => (await study.manager.get(study.at).expect(200)).body;
  const record = () => readRecord(server.deps.db.manager, study.studyId);
  const changed = async (change: Partial<StudyDraft>) => ({ ...(await view()).draft, ...change });
  const preview = (draft: object) => study.manager.post(`${study.at}/amendment/preview`).send(draft);
  const amend = (draft: object, amends: number, reason = 'The amplifier was sold.') =>
    study.manager.post(`${study.at}/amendment`).send({ draft, reason, amends });

  it('is shown with every difference before it is sealed, and stores nothing until then [J2]', async () => {
    const before = await record();
    const seen = await preview(await changed({ chain: 'Player, another amplifier, loudspeakers', trials: 6 })).expect(
      200,
    );
    expect(seen.body).toEqual({
      amends: 1,
      changes: [
        { label: 'Trials per session', before: '5', after: '6' },
        {
          label: 'Chain',
          before: 'Player, amplifier, loudspeakers',
          after: 'Player, another amplifier, loudspeakers',
        },
      ],
      codes: 'kept',
      sessionsReplanned: 1,
    });
    expect(await record()).toEqual(before);
    const none = await preview(await changed({})).expect(200);
    expect(none.body.changes).toEqual([]);
  });

  it('needs a reason, a change, the version that was seen, and room for what is planned [J1] [J2]', async () => {
    const draft = await changed({ trials: 6 });
    const silent = await amend(draft, 1, ' ');
    expect([silent.status, silent.body.errors[0].pointer]).toEqual([400, '/reason']);
    const same = await amend(await changed({}), 1);
    expect([same.status, same.body.detail]).toEqual([400, 'Nothing differs from the sealed protocol.']);
    const stale = await amend(draft, 2);
    expect([stale.status, stale.body.type]).toEqual([409, 'urn:fairlead:problem:stale-view']);
    const wrong = await amend({ ...draft, cables: [draft.cables[0], draft.cables[0]] }, 1);
    expect([wrong.status, wrong.body.errors[0].pointer]).toEqual([400, '/draft/cables/1/cableId']);
    const stranger = await amend({ ...draft, codeHolderId: study.studyId }, 1);
    expect([stranger.status, stranger.body.errors[0].pointer]).toEqual([400, '/draft/codeHolderId']);
    const more = { plannedAt: '2026-12-07T18:00:00.000Z', room: 'Room D', proctorId: people.proctor.id };
    const planned = await study.manager.post(`${study.at}/sessions`).send(more).expect(200);
    const full = await amend(await changed({ sessions: 1 }), 1);
    expect([full.status, full.body.errors[0].pointer]).toEqual([400, '/draft/sessions']);
    const where = `${study.base}/sessions/${planned.body.id}`;
    await study.manager.post(`${where}/cancel`).send({ reason: 'Not needed.' }).expect(200);
    for (const person of [people.proctor, people.reviewer]) {
      const other = await signedIn(server, person.email);
      expect((await other.post(`${study.at}/amendment`).send({ draft, reason: 'No.', amends: 1 })).status).toBe(403);
    }
    expect((await view()).versions).toHaveLength(1);
  });

  it('is the next version: on the record, signed, in the registry, with the old one kept [J1] [J3] [E3]', async () => {
    const before = await view();
    const draft = await changed({ chain: 'Player, another amplifier, loudspeakers', trials: 6, sessions: 1 });
    const amended: Study = (await amend(draft, 1).expect(200)).body;
    expect(amended).toMatchObject({ state: 'sealed', codes: 'confirmed', draft, sealed: { version: 2 } });
    expect(amended.versions).toMatchObject([
      { version: 1, digest: before.sealed?.digest, reason: null, changes: [] },
      { version: 2, reason: 'The amplifier was sold.', sealedBy: 'manager of Harbour' },
    ]);
    expect(amended.versions[1]?.changes.map(({ label }) => label)).toEqual(['Sessions', 'Trials per session', 'Chain']);
    const [entry, replanned] = (await record()).slice(-2);
    expect(entry).toMatchObject({
      kind: 'protocol-amended',
      payload: { protocolVersion: 2, digest: amended.sealed?.digest, reason: 'The amplifier was sold.' },
    });
    expect(replanned).toMatchObject({ kind: 'session-replanned', payload: { session: 1, plan: { trials: 6 } } });
    const signatures = await signaturesOf(server.deps.db.manager, study.studyId);
    expect(signatures.find(({ sequence }) => sequence === entry?.sequence)?.moment).toBe('sealing');
    const registry = `/api/registry/${people.organisationId}`;
    const { rows } = (await request(server.address).get(registry)).body;
    expect(rows.map(({ version, state }: { version: number; state: string }) => `${version} ${state}`)).toEqual([
      '2 sealed',
      '1 amended',
    ]);
    const proof: InclusionFile = (await request(server.address).get(`${registry}/entries/1/inclusion.json`)).body;
    expect([inclusionFault(proof), proof.leaf.version, proof.leaf.digest]).toEqual([null, 2, amended.sealed?.digest]);
    await expect(server.deps.db.query('delete from protocol_versions')).rejects.toThrow('never edited');
  });

  it('gives the new plan to a console that was open, and to sessions that are planned later [J4]', async () => {
    const { course } = await desk.sees('the new plan', ({ version }) => version === 2);
    expect(course).toHaveLength(6);
  });

  it('keeps codes for the same specimens and holder, and voids them for others [J5]', async () => {
    const specimen = { serial: 'N-2', note: '' };
    const { cables } = (await view()).draft;
    const added = await study.manager
      .post(`${study.base}/cables/${cables[0].cableId}/specimens`)
      .send(specimen)
      .expect(200);
    const second = added.body.specimens.find(({ serial }: { serial: string }) => serial === 'N-2').id;
    const draft = await changed({
      cables: [{ ...cables[0], specimenIds: [...cables[0].specimenIds, second] }, cables[1]],
    });
    expect((await preview(draft)).body).toMatchObject({
      codes: 'void',
      changes: [{ label: 'One cable, specimens', before: 'N-1', after: 'N-1, N-2' }],
    });
    const codes = async () => (await study.holder.get(`${study.at}/codes`).expect(200)).body;
    const { commitment } = await codes();
    const amended: Study = (await amend(draft, 2, 'A second specimen came.').expect(200)).body;
    expect(amended).toMatchObject({ codes: 'none', sealed: { version: 3 } });
    expect((await record()).map(({ kind }) => kind).slice(-3)).toEqual([
      'protocol-amended',
      'code-key-voided',
      'session-replanned',
    ]);
    expect(await codes()).toMatchObject({ state: 'none', commitment: null, specimenCount: 3 });
    expect((await codes()).voidedAt).not.toBeNull();
    const [{ n }] = await server.deps.db.query(
      "select count(*) as n from outbox where recipient = ? and subject like '%odes%'",
      [people.codeHolder.email],
    );
    expect(Number(n)).toBe(2);
    await expect(desk.openSeating()).rejects.toThrow('has not confirmed the sleeves');
    await study.holder.post(`${study.at}/codes/draw`).send({}).expect(200);
    await study.holder.post(`${study.at}/codes/confirm`).send({}).expect(200);
    const drawn = await codes();
    expect(drawn.commitment).not.toBe(commitment);
    expect(drawn.voidedAt).toBeNull();

    const otherHolder = await changed({ codeHolderId: people.reviewer.id });
    expect((await preview(otherHolder)).body).toMatchObject({
      codes: 'void',
      changes: [{ label: 'Code holder', before: 'codes of Harbour', after: 'reviewer of Harbour' }],
    });
  });

  it('is what a session opens by, also where another process sealed it [J4]', async () => {
    const another = new Sittings(server.deps);
    const where = { organisationId: people.organisationId, id: study.studyId };
    const draft = await changed({ spares: 1 });
    const amendment = { draft, reason: 'One spare is enough.', amends: 3 };
    await amendStudy(server.deps, another, where, people.manager.id, amendment);
    await expect(desk.act({ kind: 'open-seating' })).rejects.toThrow('The protocol has been amended.');
    await desk.sees('the plan in force', ({ cautionsConfirmed }) => !cautionsConfirmed);
    await desk.act({ kind: 'confirm-cautions', items: [...cautions] });
  });

  it('is never sealed beside the opening of a session: one of the two comes first [J1] [J4]', async () => {
    const draft = await changed({ spares: 2 });
    const both = await Promise.all([
      amend(draft, 4, 'Two spares after all.'),
      desk.ask({ kind: 'open-seating', expectVersion: desk.now.version }).then(
        () => 'opened',
        (error: Error) => error.message,
      ),
    ]);
    const [amended, opened] = [both[0].status, both[1]];
    const kinds = (await record()).map(({ kind }) => kind);
    if (opened === 'opened') {
      expect(amended).toBe(409);
      expect(kinds.at(-1)).toBe('seating-opened');
    } else {
      expect([amended, opened]).toEqual([200, expect.stringMatching(/amended|moved on|cautions/)]);
      expect(kinds).not.toContain('seating-opened');
      await desk.sees('the plan in force', ({ cautionsConfirmed }) => !cautionsConfirmed);
      await desk.openSeating();
    }
    inForce = amended === 200 ? 5 : 4;
  });

  let inForce = 0;
  it('cannot be made once a session has opened; the page is told so [J1]', async () => {
    const { amending, state } = await view();
    expect([state, amending.allowed]).toEqual(['collecting', false]);
    const draft = await changed({ trials: 8 });
    for (const refused of [await preview(draft), await amend(draft, inForce)]) {
      expect(refused.status).toBe(409);
      expect(refused.body.detail).toBe(
        'A session has opened, so the protocol stays as it is. Whatever differs from it is recorded as a deviation.',
      );
    }
  });

  it('is checked and told in the report and in the publication, without a person’s name [J3] [J4] [J6]', async () => {
    const code = desk.now.join?.code ?? '';
    const phone = await Phone.join(server.address, code, 'window seat');
    await begin(desk, [phone], clock);
    for (let trial = 1; trial <= 6; trial += 1) {
      await presentTrial(desk, clock);
      await phone.answer(trial, 'A');
      await desk.sees('all in', (shown) => shown.trial?.answered === 1);
      await desk.act({ kind: 'lock-trial' });
    }
    await desk.act({ kind: 'finish' });
    phone.close();
    await study.manager.post(`${study.at}/close`).send({ reason: '' }).expect(200);
    const report = (await study.manager.get(`${study.at}/report`).expect(200)).body;
    expect(report.record.checks.filter(({ outcome }: { outcome: string }) => outcome !== 'pass')).toEqual([]);
    expect(report.protocol.versions).toHaveLength(inForce);
    expect(report.protocol.versions.slice(0, 3)).toMatchObject([
      { version: 1, reason: null, changes: [] },
      { version: 2, reason: 'The amplifier was sold.' },
      { version: 3, changes: [{ label: 'One cable, specimens', before: 'N-1', after: 'N-1, N-2' }] },
    ]);
    const confirmations = Object.fromEntries(confirmationIds.map((name) => [name, true]));
    const statements = { paid: 'The workshop.', supplied: 'A shop.', ties: 'none', confirmations };
    const published = await study.manager.post(`${study.at}/publication`).send(statements).expect(200);
    const { file } = (await request(server.address).get(`/api/publications/${published.body.id}`)).body;
    const document = (await request(server.address).get(file.path).expect(200)).text;
    expect(JSON.parse(document).earlierProtocols).toHaveLength(inForce - 1);
    expect([...checksOfFile(document)].filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
    expect(document).not.toContain('of Harbour"');
    const page = (await request(server.address).get(`/p/${published.body.id}`).expect(200)).text;
    expect(page).toContain('The amplifier was sold.');
    expect(page).toContain('Player, another amplifier, loudspeakers');
  });
});
