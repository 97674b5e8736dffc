import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, redirect, useNavigate, useSearchParams } from 'react-router-dom';
import { sessionsApi } from '#shared/contracts/sessions.ts';
import { paths } from '../app/paths.ts';
import { RehearseButton } from '../features/sessions/rehearse-button.tsx';
import { SessionFilter } from '../features/sessions/session-filter.tsx';
import { SessionTable } from '../features/sessions/session-table.tsx';
import { sessionQueries } from '../features/sessions/sessions.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { lastPageAddress, readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { isManaging } from '../lib/role-words.ts';
import { param } from '../lib/route-params.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';

const queryIn = (search: URLSearchParams) => readListQuery(sessionsApi.list, search);

export async function loader({ params, request }: LoaderFunctionArgs) {
  const url = new URL(request.url);
  const list = sessionQueries.list(param(params, 'organisationId'), queryIn(url.searchParams));
  const beyond = lastPageAddress(url, await queryClient.ensureQueryData(list));
  return beyond === null ? null : redirect(beyond);
}

export function Component() {
  const { organisationId, role } = usePresence().membership;
  const [search] = useSearchParams();
  const change = useListAddress();
  const navigate = useNavigate();
  const query = queryIn(search);
  const { data: sessions } = useSuspenseQuery(sessionQueries.list(organisationId, query));
  const isFiltered = query.q !== '' || query.phase !== 'any' || query.studyId !== undefined;

  return (
    <>
      <PageHeader
        title="Sessions"
        lede={
          isManaging(role)
            ? 'One sitting of listeners each, planned from its study and led from its console.'
            : 'The sittings of listeners that you lead. Open one to prepare the room and run it from its console.'
        }
        actions={
          <RehearseButton
            organisationId={organisationId}
            sessionId={null}
            label="Rehearse"
            onBegun={(id) => navigate(paths.console(organisationId, id))}
          />
        }
      />
      {sessions.total > 0 || isFiltered ? <SessionFilter query={query} onChange={change} /> : null}
      <SessionTable
        rows={sessions.rows}
        page={sessions.page}
        pageCount={sessions.pages}
        onPage={(page) => change({ page })}
        sort={query.sort}
        onSort={(sort) => change({ sort })}
        sessionTo={({ id }) => paths.session(organisationId, id)}
        empty={
          isFiltered ? (
            <NoneFound />
          ) : (
            <NoneYet studiesTo={isManaging(role) ? paths.studies(organisationId) : undefined} />
          )
        }
      />
    </>
  );
}

function NoneFound() {
  return (
    <EmptyState title="No session is like that" action={<LinkButton to="?">Show all sessions</LinkButton>}>
      Titles, rooms and proctors were searched, in the phase that is chosen.
    </EmptyState>
  );
}

function NoneYet({ studiesTo }: { studiesTo: string | undefined }) {
  if (studiesTo === undefined)
    return (
      <EmptyState title="Your sessions will be listed here">
        A manager plans them. Once one names you as its proctor, you find it here and on your home page.
      </EmptyState>
    );
  return (
    <EmptyState title="Sessions will be listed here" action={<LinkButton to={studiesTo}>Go to the studies</LinkButton>}>
      Seal a study and have its specimens coded; then plan its first session from the study’s page.
    </EmptyState>
  );
}
