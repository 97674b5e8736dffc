import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useNavigate, useParams, useSearchParams } from 'react-router-dom';
import { type SessionRow, sessionsApi } from '#shared/contracts/sessions.ts';
import type { Study } from '#shared/contracts/studies.ts';
import { paths } from '../app/paths.ts';
import { ShelveStudy, WithdrawPublication } from '../features/publications/end-with-reason.tsx';
import { publicationQueries } from '../features/publications/publications.queries.ts';
import { SessionTable } from '../features/sessions/session-table.tsx';
import { sessionQueries } from '../features/sessions/sessions.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { StudyOverview } from '../features/studies/overview/study-overview.tsx';
import { upcomingOf } from '../features/studies/overview/upcoming-session.ts';
import { studyQueries } from '../features/studies/studies.queries.ts';
import { readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { LinkButton } from '../ui/link-button.tsx';
import { StudyPair } from './study-pair.tsx';

/** All sessions of one study, a page at a time. */
function sessionsOf(studyId: string, search: URLSearchParams) {
  return { ...readListQuery(sessionsApi.list, search), q: '', phase: 'any' as const, studyId };
}

export async function loader({ params, request }: LoaderFunctionArgs) {
  const organisationId = param(params, 'organisationId');
  const id = param(params, 'id');
  const { searchParams } = new URL(request.url);
  await Promise.all([
    queryClient.ensureQueryData(publicationQueries.ofStudy(organisationId, id)),
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
        amend: paths.amendStudy(organisationId, id),
        registry: paths.registry(organisationId),
        codes: paths.codes(organisationId, id),
        planSession: paths.planSession(organisationId, id),
        report,
      }}
      upcoming={upcoming && { ...upcoming, consoleTo: consoleOf(upcoming) }}
      onDiscarded={() => navigate(paths.studies(organisationId), { replace: true })}
      onClosed={() => navigate(report)}
      publishing={usePublishing(organisationId, study)}
      comparison={<StudyPair organisationId={organisationId} draft={study.draft} names={study.cableNames} />}
      sessions={
        <SessionTable
          isOfOneStudy
          rows={sessions.rows}
          page={sessions.page}
          pageCount={sessions.pages}
          onPage={(page) => changeAddress({ page })}
          sort={query.sort}
          onSort={(sort) => changeAddress({ sort })}
          sessionTo={(session) => paths.session(organisationId, session.id)}
          empty={<p className="text-soft">None planned yet.</p>}
        />
      }
    />
  );
}

/** What can be done about publishing, by where the study stands. */
function usePublishing(organisationId: string, { id, state }: Study) {
  const { data } = useSuspenseQuery(publicationQueries.ofStudy(organisationId, id));
  const { publication } = data;
  if (publication !== null) {
    const isWithdrawn = publication.withdrawn !== null;
    return {
      words: isWithdrawn
        ? `It is withdrawn: ${publication.withdrawn?.reason} Its page stays and says so.`
        : `Anybody can read and check it at ${publication.address}.`,
      actions: (
        <LinkButton variant="primary" to={paths.publication(publication.id)}>
          Open the public page
        </LinkButton>
      ),
      stop: isWithdrawn ? null : <WithdrawPublication organisationId={organisationId} studyId={id} />,
    };
  }
  return {
    words:
      state === 'shelved'
        ? 'The study is closed and shelved; the record says why. It can still be published.'
        : 'Both secrets are open, the registered analysis has run, and its result is on the record. Publish it, or shelve it.',
    actions: <LinkButton to={paths.publish(organisationId, id)}>Publish the result</LinkButton>,
    stop: state === 'closed' ? <ShelveStudy organisationId={organisationId} studyId={id} /> : null,
  };
}
