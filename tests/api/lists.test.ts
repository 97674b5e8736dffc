import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type Agent, makeOrganisation, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

type Listed = { rows: { [field: string]: unknown }[]; total: number; page: number; pages: number };

describe('lists', () => {
  let server: TestServer;
  let people: TestOrganisation;
  let manager: Agent;
  let base: string;

  beforeAll(async () => {
    server = await testServer();
    people = await makeOrganisation(server, 'Harbour');
    ({ base } = await readyStudy(server, people, { title: 'Study Plover' }));
    await readyStudy(server, people, { title: 'Study Avocet' });
    manager = await signedIn(server, people.manager.email);
    for (let number = 1; number <= 30; number += 1)
      await manager
        .post(`${base}/cables`)
        .send({
          name: `Run ${String(number).padStart(2, '0')}`,
          kind: 'other',
          lengthMm: 1000 + number,
          description: '',
        })
        .expect(200);
  });
  afterAll(() => server.stop());

  const list = async (address: string): Promise<Listed> => (await manager.get(`${base}/${address}`).expect(200)).body;
  const column = async (address: string, field: string) => (await list(address)).rows.map((row) => row[field]);

  it('come a page at a time, searched and sorted on the server [A7]', async () => {
    const second = await list('cables?q=run&sort=-length&page=2');
    expect([second.total, second.page, second.pages, second.rows.length]).toEqual([34, 2, 2, 9]);
    const first = await column('cables?q=run&sort=-length', 'lengthMm');
    expect(first).toHaveLength(25);
    expect(first).toEqual(first.toSorted((a, b) => Number(b) - Number(a)));
    expect((await list('cables?q=run+07')).rows.map(({ name }) => name)).toEqual(['Run 07']);
  });

  it('sort by each column of theirs, either way [A7]', async () => {
    expect(await column('studies?sort=title', 'title')).toEqual(['Study Avocet', 'Study Plover']);
    expect(await column('studies?sort=-title', 'title')).toEqual(['Study Plover', 'Study Avocet']);
    expect(await column('sessions?sort=title', 'title')).toEqual(['Study Avocet', 'Study Plover']);
    expect(await column('sessions?sort=-title', 'title')).toEqual(['Study Plover', 'Study Avocet']);
    for (const key of ['number', 'phase', 'plannedAt', 'room'])
      expect(await column(`sessions?sort=${key}`, 'id')).toHaveLength(2);
    for (const key of ['state', 'updatedAt']) expect(await column(`studies?sort=-${key}`, 'id')).toHaveLength(2);
    for (const key of ['name', 'kind', 'updatedAt']) expect(await column(`cables?sort=${key}`, 'id')).toHaveLength(25);
  });

  it('refuse a column that they do not sort by [A3]', async () => {
    const { body } = await manager.get(`${base}/cables?sort=price`).expect(400);
    expect(body.errors[0].pointer).toBe('/query/sort');
  });
});
