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
      cell: ({ id, subject, recipient }) => (
        <span className="[overflow-wrap:anywhere]">
          <Link to={hrefOf(id)}>{subject}</Link>
          <span className="block text-base font-normal text-soft">to {recipient}</span>
        </span>
      ),
    },
    { key: 'createdAt', header: 'Written', cell: ({ createdAt }) => formatDateTime(createdAt) },
  ];
  return <DataTable caption="Mail, newest first" columns={columns} rowKey={({ id }) => id} {...table} />;
}
