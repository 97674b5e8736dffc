import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, redirect, useSearchParams } from 'react-router-dom';
import { mailApi } from '#shared/contracts/mail.ts';
import { paths } from '../app/paths.ts';
import { mailQueries } from '../features/mail/mail.queries.ts';
import { MailFilter } from '../features/mail/mail-filter.tsx';
import { MailTable } from '../features/mail/mail-table.tsx';
import { usePresence } from '../features/sign-in/membership.ts';
import { lastPageAddress, readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';

const queryIn = (search: URLSearchParams) => readListQuery(mailApi.list, search);
const everyMs = 10_000;

export async function loader({ params, request }: LoaderFunctionArgs) {
  const url = new URL(request.url);
  const list = mailQueries.list(param(params, 'organisationId'), queryIn(url.searchParams));
  const beyond = lastPageAddress(url, await queryClient.fetchQuery(list));
  return beyond === null ? null : redirect(beyond);
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const [search] = useSearchParams();
  const change = useListAddress();
  const query = queryIn(search);
  const { data: mail } = useSuspenseQuery({ ...mailQueries.list(organisationId, query), refetchInterval: everyMs });
  const isFiltered = query.q !== '' || query.state !== 'any';
  return (
    <>
      <PageHeader
        title="Mail"
        lede={
          mail.server === null
            ? 'No mail server is set, so nothing is sent: every mail is kept in the mailbox of the machine that Fairlead runs on.'
            : `Sent through ${mail.server}. What does not go out is tried again for a day.`
        }
        back={{ to: paths.people(organisationId), label: 'People' }}
        actions={mail.server === null ? <LinkButton to={paths.mailbox()}>Open the mailbox</LinkButton> : null}
      />
      {mail.total > 0 || isFiltered ? <MailFilter query={query} onChange={change} /> : null}
      <MailTable
        organisationId={organisationId}
        rows={mail.rows}
        page={mail.page}
        pageCount={mail.pages}
        onPage={(page) => change({ page })}
        empty={
          isFiltered ? (
            <EmptyState title="No mail is like that" action={<LinkButton to="?">Show all mail</LinkButton>}>
              Subjects and addresses were searched, in the state that is chosen.
            </EmptyState>
          ) : (
            <EmptyState
              title="Mail will be listed here"
              action={<LinkButton to={paths.people(organisationId)}>Invite somebody</LinkButton>}
            >
              Invitations, and news of studies for their proctors and code holders.
            </EmptyState>
          )
        }
      />
    </>
  );
}
