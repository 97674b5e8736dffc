import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { cellsOfCable, plainCell, readCableLines } from '#shared/cables/cable-csv.ts';
import { type Agent, makeOrganisation, signedIn, type TestOrganisation } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

describe('cables as a table', () => {
  let server: TestServer;
  let people: TestOrganisation;
  let manager: Agent;
  let base: string;

  beforeAll(async () => {
    server = await testServer();
    people = await makeOrganisation(server, 'Harbour');
    manager = await signedIn(server, people.manager.email);
    base = `/api/organisations/${people.organisationId}/cables`;
  });
  afterAll(() => server.stop());

  const send = (text: string, isTrial: boolean) =>
    manager
      .post(`${base}/import`)
      .field('body', JSON.stringify({ isTrial }))
      .attach('file', Buffer.from(text), 'cables.csv');
  const total = async () => (await manager.get(base).expect(200)).body.total as number;
  const table = 'name;kind;lengthM;areaMm2;material\nReed;loudspeaker;2,5;1,5;copper\nSedge;Interconnect;1;;\n';

  it('come in after a trial that adds nothing, all of them or none [Q27]', async () => {
    const trial = (await send(table, true).expect(200)).body;
    expect(trial).toMatchObject({ cables: 2, isAdded: false, first: ['Reed', 'Sedge'], known: 0, faultCount: 0 });
    expect(await total()).toBe(0);
    expect((await send(table, false).expect(200)).body.isAdded).toBe(true);
    const { rows } = (await manager.get(`${base}?sort=name`).expect(200)).body;
    expect(rows).toMatchObject([
      { name: 'Reed', kind: 'loudspeaker', lengthMm: 2500 },
      { name: 'Sedge', kind: 'interconnect', lengthMm: 1000 },
    ]);
    const reed = (await manager.get(`${base}/${rows[0].id}`).expect(200)).body;
    expect(reed.construction).toEqual({ areaMm2: 1.5, material: 'copper' });
    expect((await send(table, true).expect(200)).body.known).toBe(2);
  });

  it('name every fault by line and column, and add nothing then [Q27]', async () => {
    const before = await total();
    const broken = 'name,kind,lengthM,areaMm2\nReed,loudspeaker,2.5,much\nX,rope,,1\n';
    const { body } = await send(broken, false).expect(200);
    expect(body).toMatchObject({ isAdded: false, faultCount: 4 });
    expect(body.faults.map(({ line, column }: { line: number; column: string }) => [line, column])).toEqual([
      [2, 'areaMm2'],
      [3, 'name'],
      [3, 'kind'],
      [3, 'lengthM'],
    ]);
    expect((await send('name,price\nReed,3\n', true).expect(200)).body.faults).toEqual([
      { line: 1, column: 'kind', detail: 'This column is missing' },
      { line: 1, column: 'lengthM', detail: 'This column is missing' },
      { line: 1, column: 'price', detail: 'This is no column of a cable' },
    ]);
    const program = manager.post(`${base}/import`).field('body', '{"isTrial":true}');
    await program.attach('file', Buffer.from([0x4d, 0x5a, 0, 3]), 'cables.csv').expect(400);
    expect(await total()).toBe(before);
  });

  it('go out so that no spreadsheet takes a cell for a formula, and come back as they were [Q28]', async () => {
    const name = '=HYPERLINK("x")';
    const plain = { name, kind: 'other', lengthMm: 1500, description: '+1, "quoted"\nand more' };
    await manager.post(base).send(plain).expect(200);
    const file = await manager.get(`${base}/export`).buffer().expect(200);
    expect(file.headers['content-disposition']).toContain('attachment; filename="cables.csv"');
    expect(file.text).toContain('"\'=HYPERLINK(""x"")"');
    expect(file.text).not.toMatch(/(^|,|\n)"?[=+@]/);
    const trial = (await send(file.text, true).expect(200)).body;
    expect(trial).toMatchObject({ cables: await total(), faultCount: 0 });
    for (const text of ['=1', '+1', '-1', '@x', "'=1", '\tx', 'plain', "it's"]) {
      const draft = { name: `ab${text}`, kind: 'other' as const, lengthMm: 10, description: text.trim() };
      const { drafts } = readCableLines([['name', 'kind', 'lengthM', 'description'], cellsOfCable(draft).slice(0, 4)]);
      expect(drafts[0]?.description, text).toBe(text.trim());
      expect(plainCell(text)).not.toMatch(/^[=+\-@\t]/);
    }
    const template = await manager.get(`${base}/template`).buffer().expect(200);
    expect((await send(template.text, true).expect(200)).body).toMatchObject({ cables: 1, faultCount: 0 });
  });

  it('are searched and filtered by what they are made of [Q29]', async () => {
    const found = async (query: string) =>
      (await manager.get(`${base}?${query}`).expect(200)).body.rows.map((row: { name: string }) => row.name);
    expect(await found('material=copper')).toEqual(['Reed']);
    expect(await found('kind=interconnect&q=sed')).toEqual(['Sedge']);
    expect(await found('q=copper')).toEqual(['Reed']);
    expect(await found('geometry=coaxial')).toEqual([]);
    await manager.get(`${base}?material=cheese`).expect(400);
  });
});
