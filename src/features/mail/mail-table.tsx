import type { ReactNode } from 'react';
import type { MailRow } from '#shared/contracts/mail.ts';
import { formatDateTime } from '../../lib/format.ts';
import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import type { Column } from '../../ui/table-column.ts';
import { useToast } from '../../ui/toast.tsx';
import { useSendAgain } from './mail.queries.ts';

type MailTableProps = {
  organisationId: string;
  rows: readonly MailRow[];
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
  empty: ReactNode;
};

const stateWords = {
  waiting: { word: 'Waiting', tone: 'neutral' },
  sent: { word: 'Sent', tone: 'held' },
  failed: { word: 'Given up', tone: 'amber' },
  kept: { word: 'In the mailbox', tone: 'neutral' },
} as const;

export function MailTable({ organisationId, ...table }: MailTableProps) {
  const columns: Column<MailRow>[] = [
    {
      key: 'subject',
      header: 'Mail',
      isRowHeader: true,
      cell: ({ subject, recipient }) => (
        <span className="[overflow-wrap:anywhere]">
          {subject}
          <span className="block text-base font-normal text-soft">to {recipient}</span>
        </span>
      ),
    },
    { key: 'createdAt', header: 'Written', cell: ({ createdAt }) => formatDateTime(createdAt) },
    { key: 'state', header: 'State', cell: (mail) => <MailState organisationId={organisationId} mail={mail} /> },
  ];
  return <DataTable caption="Mail, newest first" columns={columns} rowKey={({ id }) => id} {...table} />;
}

function MailState({ organisationId, mail }: { organisationId: string; mail: MailRow }) {
  const { word, tone } = stateWords[mail.state];
  return (
    <span className="inline-flex flex-col items-end gap-1 @2xl:items-start">
      <StatusWord tone={mail.state === 'waiting' && mail.lastError !== null ? 'amber' : tone}>{word}</StatusWord>
      <MailDetail mail={mail} />
      {mail.state === 'failed' ? <SendAgain organisationId={organisationId} mail={mail} /> : null}
    </span>
  );
}

function MailDetail({ mail: { sentAt, lastError, attempts, nextAttemptAt } }: { mail: MailRow }) {
  if (sentAt !== null) return <span className="text-soft">{formatDateTime(sentAt)}</span>;
  if (lastError === null) return null;
  return (
    <span className="max-w-96 text-soft [overflow-wrap:anywhere]">
      {attempts === 1 ? 'Tried once' : `Tried ${attempts} times`}: {lastError}
      {nextAttemptAt === null ? null : <span className="block">Next attempt: {formatDateTime(nextAttemptAt)}</span>}
    </span>
  );
}

function SendAgain({ organisationId, mail }: { organisationId: string; mail: MailRow }) {
  const again = useSendAgain(organisationId);
  const showToast = useToast();
  return (
    <Button
      busy={again.isPending}
      aria-label={`Try again: ${mail.subject}, to ${mail.recipient}`}
      onClick={() =>
        again.mutate(mail.id, {
          onSuccess: () => showToast('The mail waits for its next attempt.'),
          onError: (error) => showToast(problemText(error), 'amber'),
        })
      }
    >
      Try again
    </Button>
  );
}
