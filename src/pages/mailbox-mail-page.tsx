import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useParams } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { mailQueries } from '../features/mail/mail.queries.ts';
import { MailboxMail } from '../features/mail/mailbox-mail.tsx';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { PageHeader } from '../ui/page-header.tsx';

export function loader({ params }: LoaderFunctionArgs) {
  return queryClient.ensureQueryData(mailQueries.mailboxMail(param(params, 'id')));
}

export function Component() {
  const { data: mail } = useSuspenseQuery(mailQueries.mailboxMail(param(useParams(), 'id')));
  return (
    <>
      <PageHeader title={mail.subject} back={{ to: paths.mailbox(), label: 'Mailbox' }} />
      <MailboxMail mail={mail} />
    </>
  );
}
