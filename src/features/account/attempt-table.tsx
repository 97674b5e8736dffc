import type { SignInAttempt } from '#shared/contracts/account.ts';
import { formatDateTime } from '../../lib/format.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { EmptyState } from '../../ui/empty-state.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import type { Column } from '../../ui/table-column.ts';
import { browserWords } from './browser-words.ts';

type AttemptTableProps = {
  rows: readonly SignInAttempt[];
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
};

const columns: Column<SignInAttempt>[] = [
  { key: 'at', header: 'When', isRowHeader: true, cell: ({ at }) => formatDateTime(at) },
  {
    key: 'succeeded',
    header: 'Outcome',
    cell: ({ succeeded }) =>
      succeeded ? <StatusWord>Signed in</StatusWord> : <StatusWord tone="amber">Wrong password</StatusWord>,
  },
  { key: 'browser', header: 'Browser', cell: ({ browser }) => browserWords(browser) },
  {
    key: 'address',
    header: 'Network address',
    cell: ({ address }) => <span className="font-mono [overflow-wrap:anywhere]">{address}</span>,
  },
];

export function AttemptTable(props: AttemptTableProps) {
  return (
    <DataTable
      caption="Attempts to sign in as you, newest first"
      columns={columns}
      rowKey={({ id }) => id}
      empty={<EmptyState title="Attempts to sign in as you will be listed here" />}
      {...props}
    />
  );
}
