import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import * as core from 'zod/v4/core';
import { type Endpoint, roles } from '#shared/contracts/endpoint.ts';
import { type Agent, makeOrganisation, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

// Every endpoint that is mounted, as each role, as a stranger and as nobody; and bad input made from the contracts.

describe('every endpoint', () => {
  let server: TestServer;
  let people: TestOrganisation;
  let study: Awaited<ReturnType<typeof readyStudy>>;
  let agents: Record<string, Agent>;
  let contracts: Endpoint[];

  beforeAll(async () => {
    server = await testServer();
    people = await makeOrganisation(server, 'Harbour');
    study = await readyStudy(server, people);
    const strangers = await makeOrganisation(server, 'Elsewhere');
    agents = {};
    for (const role of roles) agents[role] = await signedIn(server, people[role].email);
    agents.stranger = await signedIn(server, strangers.owner.email);
    contracts = server.server.mounted.map(({ contract }) => contract);
  });
  afterAll(() => server.stop());

  const agent = (name: string): Agent => {
    const found = agents[name];
    if (found === undefined) throw new Error(`nobody is signed in as ${name}`);
    return found;
  };
  const pathOf = (contract: Endpoint, id: string) =>
    `/api${contract.path.replace(':organisationId', people.organisationId).replace(/:\w+/g, id)}`;
  const send = (
    agentOrRequest: Pick<Agent, 'get' | 'post' | 'put' | 'delete'>,
    contract: Endpoint,
    id: string,
    body: object = {},
  ) => {
    const verb = contract.method.toLowerCase() as 'get' | 'post' | 'put' | 'delete';
    const sent = agentOrRequest[verb](pathOf(contract, id));
    return contract.method === 'GET' ? sent : sent.send(body);
  };

  it('says who may call it, and refuses everybody else [A1]', async () => {
    expect(contracts.length).toBeGreaterThan(30);
    for (const contract of contracts) {
      const { access, method, path } = contract;
      if (access === 'anyone') continue;
      const absent = crypto.randomUUID();
      const nobody = await send(request(server.address), contract, absent);
      expect(nobody.status, `${method} ${path} as nobody`).toBe(401);
      if (access === 'signed-in') continue;
      for (const role of roles) {
        const { status } = await send(agent(role), contract, absent);
        if (access.includes(role)) expect(status, `${method} ${path} as ${role}`).not.toBe(403);
        else expect(status, `${method} ${path} as ${role}`).toBe(403);
      }
    }
  });

  it('answers a stranger as if the organisation did not exist [A2]', async () => {
    for (const contract of contracts.filter(({ access }) => typeof access !== 'string')) {
      const { status, body } = await send(agent('stranger'), contract, study.studyId);
      expect({ status, detail: body.detail }, contract.path).toEqual({
        status: 404,
        detail: 'There is nothing at this address.',
      });
    }
  });

  /** Bad bodies made from a contract's own schema: each field missing, of the wrong type, too long; and an unknown one. */
  function badBodies(schema: core.$ZodType): object[] {
    const { properties = {} } = z.toJSONSchema(schema as z.ZodType, { io: 'input', unrepresentable: 'any' });
    const names = Object.keys(properties);
    return [
      ...names.flatMap((name) => [
        { [name]: null },
        { [name]: { wrong: true } },
        { [name]: 'x'.repeat(5000) },
        { [name]: [1, 2] },
      ]),
      { unknownField: 1 },
    ].filter((body) => !core.safeParse(schema, body).success);
  }

  it('answers bad input with a message at the field, and never with a 500 [A3]', async () => {
    for (const contract of contracts) {
      if (contract.body === undefined || contract.path === '/sign-in' || contract.path.startsWith('/seats')) continue;
      for (const body of badBodies(contract.body)) {
        const reply = await send(agent('owner'), contract, study.studyId, body);
        const what = `${contract.method} ${contract.path} ${JSON.stringify(body).slice(0, 60)}`;
        expect(reply.status, what).toBe(400);
        expect(reply.headers['content-type'], what).toContain('application/problem+json');
        expect(reply.body.errors.length, what).toBeGreaterThan(0);
        for (const { pointer, detail } of reply.body.errors) {
          expect(pointer, what).toMatch(/^\//);
          expect(detail.length, what).toBeGreaterThan(2);
        }
      }
    }
  });

  it('answers what is no JSON, and what is too large, with a problem [A3]', async () => {
    const broken = await agent('owner')
      .post(`${study.base}/cables`)
      .set('content-type', 'application/json')
      .send('{"name":');
    expect([broken.status, broken.body.type]).toEqual([400, 'urn:fairlead:problem:invalid-input']);
    const large = await agent('owner')
      .post(`${study.base}/cables`)
      .send({ name: 'x'.repeat(400_000) });
    expect([large.status, large.body.type]).toEqual([413, 'urn:fairlead:problem:too-large']);
  });

  it('takes a wrong password and an unknown address alike, and at most ten in a quarter of an hour [A4]', async () => {
    const attempt = (email: string) => request(server.address).post('/api/sign-in').send({ email, password: 'wrong' });
    const known = await attempt(people.reviewer.email);
    const unknown = await attempt('nobody@harbour.example');
    expect([known.status, unknown.status]).toEqual([401, 401]);
    expect(known.body.detail).toBe(unknown.body.detail);
    for (let count = 0; count < 9; count += 1) await attempt(people.reviewer.email);
    const refused = await attempt(people.reviewer.email);
    expect(refused.status).toBe(429);
    expect(refused.body.detail).toMatch(/Try again in \d+ minute/);
  });

  it('signs out on every device at once [A5]', async () => {
    const here = await signedIn(server, people.proctor.email);
    const there = await signedIn(server, people.proctor.email);
    await here.post('/api/sign-out-everywhere').send({}).expect(200);
    for (const browser of [here, there, agent('proctor')])
      expect((await browser.get('/api/me')).body.person).toBeNull();
  });
});
