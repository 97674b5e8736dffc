import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import type { MeasurementRow } from '#shared/contracts/measurements.ts';
import { formatDate } from '../../lib/format.ts';
import { DataTable } from '../../ui/data-table.tsx';
import type { Column } from '../../ui/table-column.ts';
import { momentWords, quantityWords } from './measurement-words.ts';

type MeasurementTableProps = {
  rows: readonly MeasurementRow[];
  sort: string;
  onSort: (word: string) => void;
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
  empty: ReactNode;
  hrefOf: (id: string) => string;
};

export function MeasurementTable({ hrefOf, ...table }: MeasurementTableProps) {
  return <DataTable caption="Measurements" columns={columnsFor(hrefOf)} rowKey={({ id }) => id} {...table} />;
}

function columnsFor(hrefOf: (id: string) => string): Column<MeasurementRow>[] {
  return [
    {
      key: 'quantity',
      header: 'Measured',
      isSortable: true,
      isRowHeader: true,
      cell: ({ id, quantity, moment, struck }) => (
        <>
          <Link to={hrefOf(id)} className={struck === null ? undefined : 'line-through'}>
            {quantityWords[quantity]}
          </Link>
          {moment === 'as-is' ? null : (
            <span className="font-normal text-soft"> ({momentWords[moment].toLowerCase()})</span>
          )}
          {struck === null ? null : <span className="font-normal text-soft"> (struck out)</span>}
        </>
      ),
    },
    {
      key: 'specimen',
      header: 'Piece',
      isSortable: true,
      cell: ({ specimen }) => <span className="font-mono">{specimen.serial}</span>,
    },
    { key: 'takenOn', header: 'Date', isSortable: true, cell: ({ takenOn }) => formatDate(`${takenOn}T12:00:00`) },
    { key: 'values', header: 'Values', isFigure: true, cell: ({ pointCount }) => pointCount },
    { key: 'instrument', header: 'Instrument', cell: ({ instrument }) => instrument },
  ];
}
