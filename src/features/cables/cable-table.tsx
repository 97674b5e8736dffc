import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import type { CableRow } from '#shared/contracts/cables.ts';
import { formatDate, formatLength } from '../../lib/format.ts';
import { DataTable } from '../../ui/data-table.tsx';
import type { Column } from '../../ui/table-column.ts';
import { kindWords } from './cable-words.ts';

type CableTableProps = {
  rows: readonly CableRow[];
  sort: string;
  onSort: (word: string) => void;
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
  empty: ReactNode;
  hrefOf: (id: string) => string;
};

export function CableTable({ hrefOf, ...table }: CableTableProps) {
  return <DataTable caption="Cables" columns={columnsFor(hrefOf)} rowKey={({ id }) => id} {...table} />;
}

function columnsFor(hrefOf: (id: string) => string): Column<CableRow>[] {
  return [
    {
      key: 'name',
      header: 'Cable',
      isSortable: true,
      isRowHeader: true,
      cell: ({ id, name, archived }) => (
        <>
          <Link to={hrefOf(id)}>{name}</Link>
          {archived ? <span className="font-normal text-soft"> (archived)</span> : null}
        </>
      ),
    },
    { key: 'kind', header: 'Kind', isSortable: true, cell: ({ kind }) => kindWords[kind] },
    {
      key: 'length',
      header: 'Length',
      isSortable: true,
      isFigure: true,
      cell: ({ lengthMm }) => formatLength(lengthMm),
    },
    { key: 'specimens', header: 'Specimens', isFigure: true, cell: ({ specimenCount }) => specimenCount },
    { key: 'updatedAt', header: 'Last change', isSortable: true, cell: ({ updatedAt }) => formatDate(updatedAt) },
  ];
}
