import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import type { MailboxRow } from '#shared/contracts/mail.ts';
import { formatDateTime } from '../../lib/format.ts';
import { DataTable } from '../../ui/data-table.tsx';
import type { Column } from '../../ui/table-column.ts';

type MailboxListProps = {
  rows: readonly MailboxRow[];
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
  empty: ReactNode;
  hrefOf: (id: string) => string;
};

export function MailboxList({ hrefOf, ...table }: MailboxListProps) {
  const columns: Column<MailboxRow>[] = [
    {
      key: 'subject',
      header: 'Mail',
      isRowHeader: true,
      cell: ({ id, subject }) => (
        <Link to={hrefOf(id)} className="[overflow-wrap:anywhere]">
          {subject}
        </Link>
      ),
    },
    {
      key: 'recipient',
      header: 'To',
      cell: ({ recipient }) => <span className="[overflow-wrap:anywhere]">{recipient}</span>,
    },
    { key: 'createdAt', header: 'Written', cell: ({ createdAt }) => formatDateTime(createdAt) },
  ];
  return <DataTable caption="Mail, newest first" columns={columns} rowKey={({ id }) => id} {...table} />;
}
