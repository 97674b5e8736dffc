import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import type { SessionRow } from '#shared/contracts/sessions.ts';
import { formatDateTime } from '../../../lib/format.ts';
import { DataTable } from '../../../ui/data-table.tsx';
import { StatusWord } from '../../../ui/status-word.tsx';
import type { Column } from '../../../ui/table-column.ts';

type SessionTableProps = {
  rows: readonly SessionRow[];
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
  empty: ReactNode;
  /** Where to lead this session from; null for whoever does not lead it. */
  consoleOf: (session: SessionRow) => string | null;
};

const phases: Record<SessionRow['phase'], { word: string; tone: 'neutral' | 'held' | 'now' | 'amber' }> = {
  planned: { word: 'Planned', tone: 'neutral' },
  seating: { word: 'Seating', tone: 'now' },
  revealing: { word: 'Fixing the draw', tone: 'now' },
  running: { word: 'Running', tone: 'now' },
  finished: { word: 'Finished', tone: 'held' },
  abandoned: { word: 'Abandoned', tone: 'amber' },
};

/** The sessions of one study. Numbers have no gaps: an opened session keeps its own for good. */
export function SessionTable({ consoleOf, ...table }: SessionTableProps) {
  return (
    <DataTable
      caption="Sessions of this study"
      isCaptionShown
      columns={columnsFor(consoleOf)}
      rowKey={({ id }) => id}
      {...table}
    />
  );
}

function columnsFor(consoleOf: SessionTableProps['consoleOf']): Column<SessionRow>[] {
  return [
    {
      key: 'number',
      header: 'Session',
      isRowHeader: true,
      cell: (session) => <SessionName number={session.number} to={consoleOf(session)} />,
    },
    {
      key: 'phase',
      header: 'Phase',
      cell: ({ phase }) => <StatusWord tone={phases[phase].tone}>{phases[phase].word}</StatusWord>,
    },
    { key: 'plannedAt', header: 'Planned for', cell: ({ plannedAt }) => formatDateTime(plannedAt) },
    { key: 'room', header: 'Room', cell: ({ room }) => room },
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

function SessionName({ number, to }: { number: number; to: string | null }) {
  const name = `Session\u00a0${number}`;
  return to === null ? name : <Link to={to}>{name}</Link>;
}
