import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { makeOrganisation, readyStudy, type TestOrganisation } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

describe('the settings of a method', () => {
  let server: TestServer;
  let people: TestOrganisation;
  beforeAll(async () => {
    server = await testServer();
    people = await makeOrganisation(server, 'Harbour');
  });
  afterAll(() => server.stop());

  it('are refused at their field where the method does not have them, or twice [A3] [F1]', async () => {
    const { base, at, manager } = await readyStudy(server, people);
    const { draft } = (await manager.get(at).expect(200)).body;
    for (const change of [
      { method: 'abx', methodSettings: ['no-preference'] },
      { method: 'paired-preference', methodSettings: ['no-preference', 'no-preference'] },
      { method: 'paired-preference', methodSettings: ['loudest'] },
    ]) {
      const reply = await manager.post(`${base}/studies`).send({ ...draft, ...change });
      expect(reply.status).toBe(400);
      expect(reply.body.errors).toEqual([
        { pointer: '/methodSettings', detail: expect.stringContaining('Choose among the settings of') },
      ]);
    }
  });

  it('stand in the draft as they were chosen, and none need be [F1]', async () => {
    const change = { method: 'paired-preference' as const, methodSettings: ['no-preference'] };
    const chosen = await readyStudy(server, people, change);
    expect((await chosen.manager.get(chosen.at).expect(200)).body).toMatchObject({
      method: 'paired-preference',
      draft: { methodSettings: ['no-preference'] },
    });
    const plain = await readyStudy(server, people);
    expect((await plain.manager.get(plain.at).expect(200)).body.draft.methodSettings ?? []).toEqual([]);
  });

  it('ask a directional comparison for its attribute, and no other method [A3] [C4]', async () => {
    const { base, at, manager } = await readyStudy(server, people);
    const { draft } = (await manager.get(at).expect(200)).body;
    for (const [change, detail] of [
      [{ method: 'directional-comparison' }, 'Name it in a word or two, such as bass'],
      [{ method: 'directional-comparison', attribute: '  ' }, 'Name it in a word or two, such as bass'],
      [{ method: 'triangle', attribute: 'bass' }, 'Triangle asks for no attribute'],
    ] as const) {
      const reply = await manager.post(`${base}/studies`).send({ ...draft, ...change });
      expect(reply.status).toBe(400);
      expect(reply.body.errors).toEqual([{ pointer: '/attribute', detail }]);
    }
    const chosen = await readyStudy(server, people, { method: 'directional-comparison', attribute: 'bass' });
    expect((await chosen.manager.get(chosen.at).expect(200)).body).toMatchObject({ draft: { attribute: 'bass' } });
  });
});
