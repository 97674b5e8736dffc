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
  sort: string;
  onSort: (word: string) => void;
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
  empty: ReactNode;
  /** Sessions of one study bear their number alone. */
  isOfOneStudy?: boolean;
  /** The page of a session. */
  sessionTo: (session: SessionRow) => string;
};

/** Sessions with the way to their pages. Numbers have no gaps: an opened session keeps its own for good. */
export function SessionTable({ sessionTo, isOfOneStudy = false, ...table }: SessionTableProps) {
  const nameOf = ({ title, number }: SessionRow) =>
    isOfOneStudy ? `Session\u00a0${number}` : `${title}, session\u00a0${number}`;
  return (
    <DataTable
      caption={isOfOneStudy ? 'Sessions of this study' : 'Sessions'}
      isCaptionShown={isOfOneStudy}
      columns={columnsFor(isOfOneStudy, nameOf, sessionTo)}
      rowKey={({ id }) => id}
      {...table}
    />
  );
}

function columnsFor(
  isOfOneStudy: boolean,
  nameOf: (session: SessionRow) => string,
  sessionTo: SessionTableProps['sessionTo'],
): Column<SessionRow>[] {
  return [
    {
      key: isOfOneStudy ? 'number' : 'title',
      header: 'Session',
      isSortable: true,
      isRowHeader: true,
      cell: (session) => <Link to={sessionTo(session)}>{nameOf(session)}</Link>,
    },
    {
      key: 'phase',
      header: 'Phase',
      isSortable: true,
      cell: ({ phase }) => <StatusWord tone={phaseWords[phase].tone}>{phaseWords[phase].word}</StatusWord>,
    },
    { key: 'plannedAt', header: 'Planned for', isSortable: true, cell: ({ plannedAt }) => formatDateTime(plannedAt) },
    { key: 'room', header: 'Room', isSortable: true, cell: ({ room }) => room },
    { key: 'proctor', header: 'Proctor', cell: ({ proctor }) => proctor },
    { key: 'listeners', header: 'Listeners', isFigure: true, cell: ({ listeners }) => listeners },
    {
      key: 'trials',
      header: 'Trials locked',
      isFigure: true,
      cell: ({ trialsLocked, trials }) => `${trialsLocked}\u00a0of\u00a0${trials}`,
    },
  ];
}
