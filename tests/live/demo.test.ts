import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Report } from '#shared/contracts/reports.ts';
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

  it('has a closed study with a right answer and one without, run by simulated phones, whose record verifies [L3]', async () => {
    const { deps } = server;
    const { id: organisationId } = await deps.db.manager.findOneByOrFail(Organisation, { demo: true });
    const { rows } = await listReports(deps, organisationId, { q: '', page: 1 });
    const reports: Report[] = [];
    for (const { studyId } of rows) reports.push(await getReport(deps, { organisationId, id: studyId }));
    expect(new Set(reports.map(({ result }) => result.method))).toEqual(new Set(['abx', 'paired-preference']));
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

  it('has a study in each state, and of those closed one with a clear difference and one with none [D1]', async () => {
    const { deps } = server;
    const studies: { id: string; title: string; state: string; organisation_id: string }[] = await deps.db.query(
      'select id, title, state, organisation_id from studies',
    );
    expect([...new Set(studies.map(({ state }) => state))].toSorted()).toEqual([
      'closed',
      'collecting',
      'draft',
      'published',
      'sealed',
    ]);
    const resultOf = async (wanted: string) => {
      const study = studies.find(({ title }) => title === wanted);
      if (study === undefined) throw new Error(`no ${wanted}`);
      return (await getReport(deps, { organisationId: study.organisation_id, id: study.id })).result;
    };
    expect(await resultOf('Study Curlew')).toMatchObject({ isSignificant: true });
    expect(await resultOf('Study Dotterel')).toMatchObject({ isSignificant: false, margin: { isBelow: true } });
    const planned = await deps.db.query(
      "select count(*) as count from sessions join studies on studies.id = sessions.study_id where sessions.phase = 'planned' and studies.state = 'collecting'",
    );
    expect(Number(planned[0].count)).toBe(1);
  });

  it('is made once: a second start leaves it as it is', async () => {
    const before = await server.deps.db.query('select count(*) as entries from record_entries');
    await loadDemo(server.deps);
    expect(await server.deps.db.query('select count(*) as entries from record_entries')).toEqual(before);
  });

  it('is made anew where its making was cut short, and what it had published is withdrawn [D2]', async () => {
    const { db } = server.deps;
    await db.query("update studies set title = 'Study cut short' where title = 'Study Heron'");
    await loadDemo(server.deps);
    const demos = await db.manager.findBy(Organisation, { demo: true });
    expect(demos).toHaveLength(1);
    const published = await db.query(
      'select organisation_id, withdrawn_reason from publications order by published_at',
    );
    expect(published).toEqual([
      {
        organisation_id: expect.not.stringMatching(demos[0]?.id ?? ''),
        withdrawn_reason: expect.stringContaining('cut short'),
      },
      { organisation_id: demos[0]?.id, withdrawn_reason: null },
    ]);
  }, 60_000);
});
