import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, redirect, useSearchParams } from 'react-router-dom';
import { peopleApi } from '#shared/contracts/people.ts';
import { paths } from '../app/paths.ts';
import { InvitationTable } from '../features/people/invitation-table.tsx';
import { Invite } from '../features/people/invite.tsx';
import { peopleQueries } from '../features/people/people.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { lastPageAddress, readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { ListFilter } from '../ui/list-filter.tsx';
import { PageHeader } from '../ui/page-header.tsx';

const queryIn = (search: URLSearchParams) => readListQuery(peopleApi.invitations, search);

export async function loader({ params, request }: LoaderFunctionArgs) {
  const url = new URL(request.url);
  const list = peopleQueries.invitations(param(params, 'organisationId'), queryIn(url.searchParams));
  const beyond = lastPageAddress(url, await queryClient.fetchQuery(list));
  return beyond === null ? null : redirect(beyond);
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const [search] = useSearchParams();
  const change = useListAddress();
  const query = queryIn(search);
  const { data: invitations } = useSuspenseQuery(peopleQueries.invitations(organisationId, query));
  return (
    <>
      <PageHeader
        title="Invitations"
        lede="Sent and not accepted yet. Each link works once, for seven days."
        back={{ to: paths.people(organisationId), label: 'People' }}
        actions={<Invite organisationId={organisationId} />}
      />
      {invitations.total > 0 || query.q !== '' ? (
        <ListFilter key={query.q} label="Search invitations" words={query.q} onSearch={(q) => change({ q })} />
      ) : null}
      <InvitationTable
        organisationId={organisationId}
        rows={invitations.rows}
        page={invitations.page}
        pageCount={invitations.pages}
        onPage={(page) => change({ page })}
        empty={
          query.q === '' ? (
            <EmptyState title="Nobody is invited just now">
              Invite somebody, and the invitation is listed here until it is accepted.
            </EmptyState>
          ) : (
            <EmptyState
              title="No invitation is like that"
              action={<LinkButton to="?">Show all invitations</LinkButton>}
            >
              Addresses were searched.
            </EmptyState>
          )
        }
      />
    </>
  );
}
