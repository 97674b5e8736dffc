import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import type { SessionRow } from '#shared/contracts/sessions.ts';
import { formatDateTime } from '../../lib/format.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import type { Column } from '../../ui/table-column.ts';
import { phaseWords } from './session-words.ts';

type SessionTableProps = {
  rows: readonly SessionRow[];
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
  empty: ReactNode;
  /** Where a session is led from, by its proctor; null for anybody else. */
  consoleOf: (session: SessionRow) => string | null;
};

export function SessionTable({ consoleOf, ...table }: SessionTableProps) {
  return (
    <DataTable caption="Sessions, latest first" columns={columnsFor(consoleOf)} rowKey={({ id }) => id} {...table} />
  );
}

function columnsFor(consoleOf: SessionTableProps['consoleOf']): Column<SessionRow>[] {
  return [
    {
      key: 'title',
      header: 'Session',
      isRowHeader: true,
      cell: (session) => <SessionName session={session} to={consoleOf(session)} />,
    },
    {
      key: 'phase',
      header: 'Phase',
      cell: ({ phase }) => <StatusWord tone={phaseWords[phase].tone}>{phaseWords[phase].word}</StatusWord>,
    },
    { key: 'plannedAt', header: 'Planned for', cell: ({ plannedAt }) => formatDateTime(plannedAt) },
    { key: 'room', header: 'Room', cell: ({ room }) => room },
    { key: 'proctor', header: 'Proctor', cell: ({ proctor }) => proctor },
    { key: 'listeners', header: 'Listeners', isFigure: true, cell: ({ listeners }) => listeners },
    {
      key: 'trials',
      header: 'Trials locked',
      isFigure: true,
      cell: ({ trialsLocked, trials }) => `${trialsLocked} of ${trials}`,
    },
  ];
}

function SessionName({ session, to }: { session: SessionRow; to: string | null }) {
  const name = `${session.title}, session ${session.number}`;
  return to === null ? name : <Link to={to}>{name}</Link>;
}
