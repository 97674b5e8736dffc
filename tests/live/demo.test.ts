import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Report } from '#shared/contracts/reports.ts';
import { methodIds } from '#shared/methods/methods.ts';
import { demoPeople } from '../../server/demo/demo-people.ts';
import { loadDemo } from '../../server/demo/load-demo.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

describe('the demo', () => {
  let server: TestServer;
  beforeAll(async () => {
    server = await testServer();
    await loadDemo(server.deps);
  }, 120_000);
  afterAll(() => server.stop());

  it('has a closed study of every method, run by simulated phones, whose record verifies [L3] [P1]', async () => {
    const manager = demoPeople.find(({ key }) => key === 'manager');
    const agent = request.agent(server.address);
    const { email, password } = manager ?? { email: '', password: '' };
    await agent.post('/api/sign-in').send({ email, password }).expect(200);
    const me = await agent.get('/api/me').expect(200);
    const base = `/api/organisations/${me.body.person.memberships[0].organisationId}`;
    const { rows } = (await agent.get(`${base}/reports`).expect(200)).body;
    const reports: Report[] = [];
    for (const { studyId } of rows)
      reports.push((await agent.get(`${base}/studies/${studyId}/report`).expect(200)).body);
    expect(reports.map(({ result }) => result.method).sort()).toEqual([...methodIds].sort());
    for (const { record, flow, result } of reports) {
      expect(record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
      expect(flow).toMatchObject({ trialsCounted: 16, trialsVoid: 1, answersMissing: 1 });
      expect(result).toMatchObject({ trials: 16, answers: 48, missing: 1 });
    }
  });

  it('is made once: a second start leaves it as it is', async () => {
    const before = await server.deps.db.query('select count(*) as entries from record_entries');
    await loadDemo(server.deps);
    expect(await server.deps.db.query('select count(*) as entries from record_entries')).toEqual(before);
  });
});
