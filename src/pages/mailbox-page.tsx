import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, redirect, useSearchParams } from 'react-router-dom';
import { mailboxApi } from '#shared/contracts/mail.ts';
import { paths } from '../app/paths.ts';
import { mailQueries } from '../features/mail/mail.queries.ts';
import { MailboxList } from '../features/mail/mailbox-list.tsx';
import { lastPageAddress, readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { ListFilter } from '../ui/list-filter.tsx';
import { PageHeader } from '../ui/page-header.tsx';

const queryIn = (search: URLSearchParams) => readListQuery(mailboxApi.list, search);
const everyMs = 5_000;

export async function loader({ request }: LoaderFunctionArgs) {
  const url = new URL(request.url);
  const beyond = lastPageAddress(url, await queryClient.fetchQuery(mailQueries.mailbox(queryIn(url.searchParams))));
  return beyond === null ? null : redirect(beyond);
}

export function Component() {
  const [search] = useSearchParams();
  const change = useListAddress();
  const query = queryIn(search);
  const { data: mails } = useSuspenseQuery({ ...mailQueries.mailbox(query), refetchInterval: everyMs });
  return (
    <>
      <PageHeader
        title="Mailbox"
        lede="No mail server is set, so nothing is sent: every mail is kept here, for a browser on this machine only."
      />
      {mails.total > 0 || query.q !== '' ? (
        <ListFilter key={query.q} label="Search mail" words={query.q} onSearch={(q) => change({ q })} />
      ) : null}
      <MailboxList
        rows={mails.rows}
        page={mails.page}
        pageCount={mails.pages}
        onPage={(page) => change({ page })}
        hrefOf={paths.mailboxMail}
        empty={
          query.q === '' ? (
            <EmptyState
              title="Mail will be listed here"
              action={<LinkButton to={paths.start()}>Go to the start</LinkButton>}
            >
              Invitations, forgotten passwords and news of studies, as soon as there are any.
            </EmptyState>
          ) : (
            <EmptyState title="No mail is like that" action={<LinkButton to="?">Show all mail</LinkButton>}>
              Subjects and addresses were searched.
            </EmptyState>
          )
        }
      />
    </>
  );
}
