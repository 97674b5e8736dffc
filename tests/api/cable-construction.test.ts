import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { makeOrganisation, readyStudy, secretTreatment, signedIn, type TestOrganisation } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

describe('the construction of a cable', () => {
  let server: TestServer;
  let people: TestOrganisation;
  let base: string;
  const plain = { name: 'Outer run', kind: 'loudspeaker', lengthMm: 5000, description: '' };
  const construction = {
    material: 'copper-ofe',
    nines: '4N',
    build: 'stranded',
    strands: 50,
    strandDiameterMm: 0.25,
    areaMm2: 2.5,
    permittivity: 2.3,
    geometry: 'twisted-pair',
    spacingMm: 4,
    pitchMm: 40,
    treatments: 'none stated',
  };

  beforeAll(async () => {
    server = await testServer();
    people = await makeOrganisation(server, 'Harbour');
    base = `/api/organisations/${people.organisationId}`;
  });
  afterAll(() => server.stop());

  it('may be left out, is kept as typed, and stays when a change does not speak of it [Q6]', async () => {
    const manager = await signedIn(server, people.manager.email);
    const bare = (await manager.post(`${base}/cables`).send(plain).expect(200)).body;
    expect(bare.construction).toEqual({});
    const at = `${base}/cables/${bare.id}`;
    await manager
      .put(at)
      .send({ ...plain, construction })
      .expect(200);
    expect((await manager.get(at).expect(200)).body.construction).toEqual(construction);
    await manager
      .put(at)
      .send({ ...plain, name: 'Inner run' })
      .expect(200);
    expect((await manager.get(at).expect(200)).body).toMatchObject({ name: 'Inner run', construction });
    await manager
      .put(at)
      .send({ ...plain, construction: {} })
      .expect(200);
    expect((await manager.get(at).expect(200)).body.construction).toEqual({});
  });

  it('refuses what no cable has, at its field [Q6]', async () => {
    const manager = await signedIn(server, people.manager.email);
    const faults = { areaMm2: -1, strands: 2.5, nines: '12N', permittivity: 0.5, material: 'cheese', pitchMm: 'long' };
    for (const [name, value] of Object.entries(faults)) {
      const made = { ...plain, construction: { [name]: value } };
      const { body } = await manager.post(`${base}/cables`).send(made).expect(400);
      expect(body.errors).toMatchObject([{ pointer: `/construction/${name}` }]);
    }
  });

  it('reaches nobody but owners and managers, and no list [Q7]', async () => {
    const study = await readyStudy(server, people);
    const cables = (await study.manager.get(`${base}/cables`).expect(200)).body.rows as { id: string }[];
    expect(JSON.stringify(cables)).not.toContain(secretTreatment);
    for (const role of ['proctor', 'codeHolder', 'reviewer'] as const) {
      const agent = await signedIn(server, people[role].email);
      await agent.get(`${base}/cables/${cables[0]?.id}`).expect(403);
      await agent.get(`${base}/cables/choices`).expect(403);
    }
  });
});
