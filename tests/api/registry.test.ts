import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { confirmationIds } from '#shared/contracts/publications.ts';
import type { InclusionFile, RegistryHead, RegistryRow } from '#shared/contracts/registry.ts';
import { treeRoot } from '#shared/ledger/merkle.ts';
import { growthFault, inclusionFault, registryHeadFault, registryLeafHash } from '#shared/ledger/registry.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { auditAll } from '../../server/features/audits/audits.service.ts';
import { inclusionOfStudy } from '../../server/features/registry/registry.service.ts';
import { enterEarlierProtocols, leafHashes } from '../../server/ledger/registry-log.ts';
import { pastTriggers } from '../support/past-triggers.ts';
import { makeOrganisation, plainStudy, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';
import { wholeStudy } from '../support/whole-study.ts';

const confirmations = Object.fromEntries(confirmationIds.map((name) => [name, true]));
const statements = { paid: 'The workshop paid.', supplied: 'A shop in the next town.', ties: 'none', confirmations };

describe('a registry', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  let server: TestServer;
  let people: TestOrganisation;
  let at: string;
  let draftLike: object;
  beforeAll(async () => {
    server = await testServer({ clock });
    people = await makeOrganisation(server, 'Harbour');
    at = `/api/registry/${people.organisationId}`;
    const manager = await signedIn(server, people.manager.email);
    const base = `/api/organisations/${people.organisationId}`;
    const cables: object[] = [];
    for (const name of ['Eastern run', 'Western run']) {
      const made = { name, kind: 'loudspeaker', lengthMm: 3000, description: '' };
      const cable = await manager.post(`${base}/cables`).send(made).expect(200);
      const specimen = { serial: `${name[0]}-1`, note: '' };
      const full = await manager.post(`${base}/cables/${cable.body.id}/specimens`).send(specimen).expect(200);
      cables.push({ cableId: cable.body.id, specimenIds: [full.body.specimens[0].id] });
    }
    draftLike = { ...plainStudy, cables, codeHolderId: people.codeHolder.id };
  }, 120_000);
  afterAll(() => server.stop());

  const anybody = () => request(server.address);
  const list = async (query = '') => (await anybody().get(`${at}${query}`).expect(200)).body;
  const rows = async (query = ''): Promise<RegistryRow[]> => (await list(query)).rows;
  const headNow = async (): Promise<RegistryHead> => (await anybody().get(`${at}/registry-head.json`).expect(200)).body;
  const entry = async (index: number): Promise<InclusionFile> =>
    (await anybody().get(`${at}/entries/${index}/inclusion.json`).expect(200)).body;
  const keys = async () => (await anybody().get(`${at}/keys`).expect(200)).body.keys;
  const grown = async (first: number, second: number) =>
    (await anybody().get(`${at}/consistency?first=${first}&second=${second}`).expect(200)).body;

  it('is empty at first, and is nowhere for an organisation that does not exist [E8]', async () => {
    expect(await list()).toMatchObject({ rows: [], total: 0, organisation: 'Harbour', head: null });
    expect((await anybody().get(`${at}/registry-head.json`)).status).toBe(404);
    const nobody = '11111111-2222-4333-8444-555555555555';
    for (const path of ['', '/keys', '/registry-head.json', '/entries/0/inclusion.json'])
      expect((await anybody().get(`/api/registry/${nobody}${path}`)).status, path).toBe(404);
    expect((await anybody().get('/registry/nobody')).status).toBe(404);
    expect((await anybody().get(`/registry/${people.organisationId}`)).text).toContain('No entry is like that.');
  });

  let first: RegistryHead;
  let study: Awaited<ReturnType<typeof readyStudy>>;
  it('shows a sealed protocol by digest, date and state, and by nothing else [E3] [E8]', async () => {
    study = await readyStudy(server, people, { title: 'Study Plover' });
    const { sealed } = (await study.manager.get(study.at)).body;
    expect(await rows()).toEqual([
      {
        index: 0,
        version: 1,
        digest: sealed.digest,
        sealedAt: sealed.sealedAt,
        state: 'sealed',
        title: null,
        sessions: null,
        publication: null,
      },
    ]);
    expect(await rows(`?q=${sealed.digest.slice(0, 12)}`)).toHaveLength(1);
    expect(await rows('?q=Plover')).toEqual([]);
    first = await headNow();
    const { leaf } = await entry(0);
    expect(leaf).toEqual({
      format: 'fairlead-registry-leaf/1',
      study: study.studyId,
      version: 1,
      digest: sealed.digest,
      sealedAt: sealed.sealedAt,
    });
    expect(first).toMatchObject({ size: 1, root: registryLeafHash(leaf) });
    const page = await anybody().get(`/registry/${people.organisationId}`).expect(200);
    expect(page.text).toContain(sealed.digest);
    expect(page.text).not.toContain('Plover');
  });

  it('gives sealings at the same time one place each, and none where one is refused [E3] [E5]', async () => {
    const manager = await signedIn(server, people.manager.email);
    const drafts = await Promise.all(
      ['Study Dunlin', 'Study Whimbrel', 'Study Godwit', 'Study Turnstone'].map((title) =>
        manager
          .post(`${study.base}/studies`)
          .send({ ...draftLike, title })
          .expect(200),
      ),
    );
    const seal = (id: string) => manager.post(`${study.base}/studies/${id}/seal`).send({});
    const sealed = await Promise.all(drafts.map(({ body }) => seal(body.id)));
    expect(sealed.map(({ status }) => status)).toEqual([200, 200, 200, 200]);
    expect((await seal(drafts[0]?.body.id)).status).toBe(409);
    expect((await rows()).map(({ index }) => index)).toEqual([4, 3, 2, 1, 0]);
    const head = await headNow();
    const known = await keys();
    expect(head.size).toBe(5);
    expect(registryHeadFault(head, known)).toBeNull();
    expect(registryHeadFault(first, known)).toBeNull();
    const leaves = await Promise.all([0, 1, 2, 3, 4].map(async (index) => (await entry(index)).leaf));
    expect(head.root).toBe(treeRoot(leaves.map(registryLeafHash)));
  });

  it('proves to whoever kept a head that it has only grown since, and every entry [E6] [E7]', async () => {
    const head = await headNow();
    expect(growthFault(first, head, await grown(1, 5))).toBeNull();
    for (const index of [0, 1, 2, 3, 4]) expect(inclusionFault(await entry(index))).toBeNull();
    for (const query of ['first=0&second=3', 'first=4&second=3', 'first=1&second=6', 'first=x&second=3', 'first=1']) {
      const reply = await anybody().get(`${at}/consistency?${query}`);
      expect([reply.status, reply.body.errors.length > 0], query).toEqual([400, true]);
    }
    expect((await anybody().get(`${at}/entries/5/inclusion.json`)).status).toBe(404);
    const { manager: tx } = server.deps.db;
    expect(await inclusionOfStudy(tx, people.organisationId, study.studyId)).toEqual(await entry(0));
    expect(await inclusionOfStudy(tx, people.organisationId, people.organisationId)).toBeNull();
    const file = await anybody().get(`${at}/registry-head.json`);
    expect(file.headers['content-disposition']).toBe('attachment; filename=registry-head.json');
  });

  it('cannot be changed below: the database refuses [E10]', async () => {
    for (const sql of [
      "update registry_leaves set digest = ''",
      'delete from registry_leaves',
      'update registry_heads set size = 9',
      'delete from registry_heads',
    ])
      await expect(server.deps.db.query(sql), sql).rejects.toThrow('The registry is only added to');
  });

  it('shows title, sessions and the publication once they may be known, and what became of it [E8] [E9]', async () => {
    const closed = await wholeStudy(server, people, clock, 'Study Knot');
    const [row] = await rows('?q=knot');
    expect(row).toMatchObject({ state: 'closed', title: 'Study Knot', sessions: 1, publication: null });
    const stateOf = async (q: string) => (await rows(`?q=${q}`)).map(({ state }) => state);
    await closed.manager.post(`${closed.at}/shelving`).send({ reason: 'Nobody asked for it.' }).expect(200);
    expect(await stateOf('knot')).toEqual(['shelved']);
    expect((await rows('?state=shelved')).map(({ index }) => index)).toEqual([row?.index]);
    const shelvedPage = await anybody().get(`/registry/${people.organisationId}`).expect(200);
    expect(shelvedPage.text).toContain('Shelved, no result published, 1 session.');
    expect((await anybody().get('/sitemap.xml')).text).not.toContain(`/registry/${people.organisationId}`);

    const published = await closed.manager.post(`${closed.at}/publication`).send(statements).expect(200);
    expect((await rows('?state=published'))[0]).toMatchObject({ title: 'Study Knot', publication: published.body.id });
    const page = await anybody().get(`/p/${published.body.id}`).expect(200);
    expect(page.text).toContain(`href="/registry/${people.organisationId}"`);
    expect((await anybody().get('/sitemap.xml')).text).toContain(`/registry/${people.organisationId}</loc>`);
    const withdrawal = { reason: 'A specimen was not as sold.' };
    await closed.manager.post(`${closed.at}/publication/withdrawal`).send(withdrawal).expect(200);
    expect((await rows('?state=withdrawn')).map(({ title }) => title)).toEqual(['Study Knot']);
    expect(await rows('?state=published')).toEqual([]);
    expect(await rows('?state=sealed')).toHaveLength(5);
  });

  const inKept = (table: string, bend: string) => [`create table kept as select * from ${table}`, bend];
  const back = (table: string) => [
    `delete from ${table}`,
    `insert into ${table} select * from kept`,
    'drop table kept',
  ];
  it.each<[string, string, string, string]>([
    [
      'another digest',
      'registry_leaves',
      "update registry_leaves set digest = repeat('0', 64) where leaf_index = 1",
      'entry 2 does not match its hash',
    ],
    ['an entry gone', 'registry_leaves', 'delete from registry_leaves where leaf_index = 2', 'entry 3 is gone'],
    ['the last entry gone', 'registry_leaves', 'delete from registry_leaves where leaf_index = 5', 'not entered'],
    ['another root', 'registry_heads', "update registry_heads set root = repeat('0', 64) where size = 3", 'signature'],
    ['the last head gone', 'registry_heads', 'delete from registry_heads where size = 6', 'not over all 6 entries'],
  ])('is audited with the records, which finds %s [E12]', async (_, table, bend, why) => {
    const { db } = server.deps;
    const faults = async () => {
      const found: string[] = [];
      for await (const audit of auditAll({ db }))
        found.push(...audit.faults.filter(({ title }) => title === 'The registry').map((fault) => fault.why));
      return found;
    };
    expect(await faults()).toEqual([]);
    await pastTriggers(db, ...inKept(table, bend));
    const found = await faults();
    await pastTriggers(db, ...back(table));
    expect(found).toHaveLength(1);
    expect(found[0]).toContain(why);
  });

  it('enters what was sealed before there was a registry, once and in the order of sealing [E11]', async () => {
    const { db } = server.deps;
    const before = await leafHashes(db.manager, people.organisationId);
    for (const table of ['registry_leaves', 'registry_heads']) await db.query(`truncate table ${table}`);
    const enter = () => db.transaction((tx) => enterEarlierProtocols(tx, server.deps));
    expect(await enter()).toBe(before.length);
    expect(await enter()).toBe(0);
    const sealings = await db.query('select sealed_at from registry_leaves order by leaf_index');
    const times = sealings.map((row: { sealed_at: string }) => row.sealed_at);
    expect(times).toEqual([...times].sort());
    expect([...(await leafHashes(db.manager, people.organisationId))].sort()).toEqual([...before].sort());
    expect(registryHeadFault(await headNow(), await keys())).toBeNull();
  });
});
