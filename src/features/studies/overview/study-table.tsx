import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import type { StudyRow } from '#shared/contracts/studies.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { formatDate } from '../../../lib/format.ts';
import { DataTable } from '../../../ui/data-table.tsx';
import { StatusWord } from '../../../ui/status-word.tsx';
import type { Column } from '../../../ui/table-column.ts';
import { stateWords } from '../study-words.ts';

type StudyTableProps = {
  rows: readonly StudyRow[];
  sort: string;
  onSort: (word: string) => void;
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
  empty: ReactNode;
  hrefOf: (id: string) => string;
};

export function StudyTable({ hrefOf, ...table }: StudyTableProps) {
  return <DataTable caption="Studies" columns={columnsFor(hrefOf)} rowKey={({ id }) => id} {...table} />;
}

function columnsFor(hrefOf: (id: string) => string): Column<StudyRow>[] {
  return [
    {
      key: 'title',
      header: 'Neutral title',
      isSortable: true,
      isRowHeader: true,
      cell: ({ id, title }) => <Link to={hrefOf(id)}>{title}</Link>,
    },
    {
      key: 'state',
      header: 'State',
      isSortable: true,
      cell: ({ state }) => <StatusWord tone={stateWords[state].tone}>{stateWords[state].word}</StatusWord>,
    },
    { key: 'method', header: 'Method', cell: ({ method }) => methodOf(method).name },
    { key: 'sessions', header: 'Sessions', cell: sessionsOf },
    { key: 'trials', header: 'Trials locked', isFigure: true, cell: trialsOf },
    { key: 'updatedAt', header: 'Last change', isSortable: true, cell: ({ updatedAt }) => formatDate(updatedAt) },
  ];
}

function sessionsOf({ progress }: StudyRow): string {
  const { sessionsPlanned, sessionsEnded } = progress;
  if (sessionsPlanned === 0) return 'none yet';
  const toCome = sessionsPlanned - sessionsEnded;
  return toCome === 0 ? `${sessionsEnded} ended` : `${sessionsEnded} ended, ${toCome} to come`;
}

function trialsOf({ progress }: StudyRow): string {
  return `${progress.trialsLocked}\u00a0of\u00a0${progress.trialsRegistered}`;
}
