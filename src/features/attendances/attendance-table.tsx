import type { ReactNode } from 'react';
import type { AttendanceRow } from '#shared/contracts/attendances.ts';
import { formatDateTime } from '../../lib/format.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import type { Column } from '../../ui/table-column.ts';
import { AttendanceChange } from './attendance-change.tsx';
import { stateWordOf } from './attendance-words.ts';

type AttendanceTableProps = {
  organisationId: string;
  rows: readonly AttendanceRow[];
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
  empty: ReactNode;
  isPlanned: boolean;
  /** Managers change invitations; a proctor reads them. */
  canChange: boolean;
};

/** Who is invited, in the order of the seats. No label stands here: nothing may lead from an answer to an address. */
export function AttendanceTable({ organisationId, isPlanned, canChange, ...table }: AttendanceTableProps) {
  const columns: Column<AttendanceRow>[] = [
    {
      key: 'email',
      header: 'Listener',
      isRowHeader: true,
      cell: ({ email }) =>
        email === null ? (
          <span className="text-soft">Address erased</span>
        ) : (
          <span className="[overflow-wrap:anywhere]">{email}</span>
        ),
    },
    {
      key: 'state',
      header: 'Answer',
      cell: (row) => <StatusWord tone={stateWordOf(row).tone}>{stateWordOf(row).word}</StatusWord>,
    },
    {
      key: 'answeredAt',
      header: 'Answered',
      cell: ({ answeredAt }) =>
        answeredAt === null ? <span className="text-soft">Not yet</span> : formatDateTime(answeredAt),
    },
  ];
  const change: Column<AttendanceRow> = {
    key: 'change',
    header: 'Change',
    cell: (row) => <AttendanceChange organisationId={organisationId} attendance={row} isPlanned={isPlanned} />,
  };
  return (
    <DataTable
      caption="Invited listeners"
      columns={canChange ? [...columns, change] : columns}
      rowKey={({ id }) => id}
      {...table}
    />
  );
}
