import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, redirect, useSearchParams } from 'react-router-dom';
import { peopleApi } from '#shared/contracts/people.ts';
import { paths } from '../app/paths.ts';
import { Invite } from '../features/people/invite.tsx';
import { peopleQueries } from '../features/people/people.queries.ts';
import { PeopleFilter } from '../features/people/people-filter.tsx';
import { PeopleTable } from '../features/people/people-table.tsx';
import { usePresence } from '../features/sign-in/membership.ts';
import { lastPageAddress, readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';

const queryIn = (search: URLSearchParams) => readListQuery(peopleApi.list, search);
const openInvitations = (organisationId: string) => peopleQueries.invitations(organisationId, { q: '', page: 1 });

export async function loader({ params, request }: LoaderFunctionArgs) {
  const url = new URL(request.url);
  const organisationId = param(params, 'organisationId');
  const [members] = await Promise.all([
    queryClient.fetchQuery(peopleQueries.list(organisationId, queryIn(url.searchParams))),
    queryClient.fetchQuery(openInvitations(organisationId)),
  ]);
  const beyond = lastPageAddress(url, members);
  return beyond === null ? null : redirect(beyond);
}

export function Component() {
  const { person, membership } = usePresence();
  const { organisationId, organisation } = membership;
  const [search] = useSearchParams();
  const change = useListAddress();
  const query = queryIn(search);
  const { data: members } = useSuspenseQuery(peopleQueries.list(organisationId, query));
  const { data: invitations } = useSuspenseQuery(openInvitations(organisationId));

  return (
    <>
      <PageHeader
        title="People"
        lede={`Who belongs to ${organisation}, and what each may do.`}
        actions={
          <>
            <Invite organisationId={organisationId} />
            <LinkButton to={paths.invitations(organisationId)}>
              {invitations.total === 0 ? 'Invitations' : `Invitations (${invitations.total} open)`}
            </LinkButton>
            <LinkButton to={paths.mail(organisationId)}>Mail</LinkButton>
            <LinkButton to={paths.proof(organisationId)}>Proof</LinkButton>
          </>
        }
      />
      <PeopleFilter query={query} onChange={change} />
      <PeopleTable
        organisationId={organisationId}
        ownId={person.id}
        rows={members.rows}
        sort={query.sort}
        onSort={(sort) => change({ sort })}
        page={members.page}
        pageCount={members.pages}
        onPage={(page) => change({ page })}
        // One's own role decides what every page shows: begin anew.
        onChanged={(id) => (id === person.id ? window.location.assign(paths.start()) : undefined)}
        empty={
          <EmptyState title="No member is like that" action={<LinkButton to="?">Show all members</LinkButton>}>
            Names and addresses were searched, in the role that is chosen.
          </EmptyState>
        }
      />
    </>
  );
}
