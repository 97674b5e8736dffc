import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useNavigate, useParams, useSearchParams } from 'react-router-dom';
import { type SessionRow, sessionsApi } from '#shared/contracts/sessions.ts';
import { paths } from '../app/paths.ts';
import { SessionTable } from '../features/sessions/session-table.tsx';
import { sessionQueries } from '../features/sessions/sessions.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { StudyOverview } from '../features/studies/overview/study-overview.tsx';
import { upcomingOf } from '../features/studies/overview/upcoming-session.ts';
import { studyQueries } from '../features/studies/studies.queries.ts';
import { readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';

/** All sessions of one study, a page at a time. */
function sessionsOf(studyId: string, search: URLSearchParams) {
  return { ...readListQuery(sessionsApi.list, search), q: '', phase: 'any' as const, studyId };
}

export async function loader({ params, request }: LoaderFunctionArgs) {
  const organisationId = param(params, 'organisationId');
  const id = param(params, 'id');
  const { searchParams } = new URL(request.url);
  await Promise.all([
    queryClient.ensureQueryData(studyQueries.detail(organisationId, id)),
    queryClient.ensureQueryData(sessionQueries.list(organisationId, sessionsOf(id, searchParams))),
  ]);
  return null;
}

export function Component() {
  const { person, membership } = usePresence();
  const { organisationId } = membership;
  const id = param(useParams(), 'id');
  const [search] = useSearchParams();
  const changeAddress = useListAddress();
  const navigate = useNavigate();
  const { data: study } = useSuspenseQuery(studyQueries.detail(organisationId, id));
  const query = sessionsOf(id, search);
  const { data: sessions } = useSuspenseQuery(sessionQueries.list(organisationId, query));
  const report = paths.report(organisationId, id);
  const upcoming = upcomingOf(sessions.rows);
  const consoleOf = (session: SessionRow) =>
    session.proctorId === person.id ? paths.console(organisationId, session.id) : null;

  return (
    <StudyOverview
      organisationId={organisationId}
      study={study}
      places={{
        all: paths.studies(organisationId),
        edit: paths.editStudy(organisationId, id),
        codes: paths.codes(organisationId, id),
        planSession: paths.planSession(organisationId, id),
        report,
      }}
      upcoming={upcoming && { ...upcoming, consoleTo: consoleOf(upcoming) }}
      onDiscarded={() => navigate(paths.studies(organisationId), { replace: true })}
      onClosed={() => navigate(report)}
      sessions={
        <SessionTable
          isOfOneStudy
          rows={sessions.rows}
          page={sessions.page}
          pageCount={sessions.pages}
          onPage={(page) => changeAddress({ page })}
          sort={query.sort}
          onSort={(sort) => changeAddress({ sort })}
          consoleOf={consoleOf}
          empty={<p className="text-soft">None planned yet.</p>}
        />
      }
    />
  );
}
