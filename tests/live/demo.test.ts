import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Report } from '#shared/contracts/reports.ts';
import { methodIds } from '#shared/methods/methods.ts';
import { loadDemo } from '../../server/demo/load-demo.ts';
import { Organisation } from '../../server/features/organisations/organisation.entity.ts';
import { getReport, listReports } from '../../server/features/reports/reports.service.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

describe('the demo', () => {
  let server: TestServer;
  beforeAll(async () => {
    server = await testServer();
    await loadDemo(server.deps);
  }, 120_000);
  afterAll(() => server.stop());

  it('has a closed study of every method, run by simulated phones, whose record verifies [L3] [F1]', async () => {
    const { deps } = server;
    const { id: organisationId } = await deps.db.manager.findOneByOrFail(Organisation, { demo: true });
    const { rows } = await listReports(deps, organisationId, { q: '', page: 1 });
    const reports: Report[] = [];
    for (const { studyId } of rows) reports.push(await getReport(deps, { organisationId, id: studyId }));
    expect(new Set(reports.map(({ result }) => result.method))).toEqual(new Set(methodIds));
    for (const { record, flow, result } of reports) {
      expect(record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
      expect(result.trials).toBeGreaterThanOrEqual(5);
      expect(flow).toMatchObject({
        trialsCounted: result.trials,
        answersExpected: result.answers,
        answersMissing: result.missing,
      });
    }
  });

  it('is made once: a second start leaves it as it is', async () => {
    const before = await server.deps.db.query('select count(*) as entries from record_entries');
    await loadDemo(server.deps);
    expect(await server.deps.db.query('select count(*) as entries from record_entries')).toEqual(before);
  });
});
