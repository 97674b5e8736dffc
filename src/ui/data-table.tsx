import type { ReactNode } from 'react';
import { classNames } from './class-names.ts';
import { Pager } from './pager.tsx';
import { type Column, sortIn, wordOf } from './table-column.ts';
import { TableHead } from './table-head.tsx';

type DataTableProps<Row> = {
  /** Says what the rows are; read out, and shown with `isCaptionShown`. */
  caption: string;
  isCaptionShown?: boolean;
  columns: ReadonlyArray<Column<Row>>;
  rows: readonly Row[];
  rowKey: (row: Row) => string;
  /** Stands in for the table while there are no rows; usually an EmptyState. */
  empty: ReactNode;
  /** The word of a list's contract: a column's key, with a minus before it when it descends. */
  sort?: string;
  onSort?: (word: string) => void;
  /** From 1. The pager shows when there is more than one page. */
  page?: number;
  pageCount?: number;
  onPage?: (page: number) => void;
};

/** A table where there is room for one; rows of labelled lines where there is not. */
export function DataTable<Row>({
  caption,
  isCaptionShown = false,
  columns,
  rows,
  rowKey,
  empty,
  sort,
  onSort,
  page,
  pageCount,
  onPage,
}: DataTableProps<Row>) {
  if (rows.length === 0 && (page ?? 1) === 1) return empty;
  return (
    <div className="@container flex flex-col gap-4">
      <table className="block w-full border-collapse @2xl:table">
        <caption className={isCaptionShown ? 'block pb-3 text-left text-xl font-bold @2xl:table-caption' : 'sr-only'}>
          {caption}
        </caption>
        <TableHead
          columns={columns}
          sort={sort === undefined ? undefined : sortIn(sort)}
          onSort={onSort && ((next) => onSort(wordOf(next)))}
        />
        <tbody className="block border-t-2 border-ink @2xl:table-row-group @2xl:border-t-0">
          {rows.map((row) => (
            <tr key={rowKey(row)} className="block border-b border-rule py-3 @2xl:table-row @2xl:py-0">
              {columns.map((column) => (
                <TableCell key={column.key} column={column} row={row} />
              ))}
            </tr>
          ))}
        </tbody>
      </table>
      {page !== undefined && pageCount !== undefined && onPage && pageCount > 1 ? (
        <Pager of={caption} page={page} pageCount={pageCount} onPage={onPage} />
      ) : null}
    </div>
  );
}

const cellLook = '@2xl:table-cell @2xl:py-3 @2xl:pr-6 @2xl:align-baseline @2xl:last:pr-0';

function TableCell<Row>({ column, row }: { column: Column<Row>; row: Row }) {
  if (column.isRowHeader) {
    return (
      <th scope="row" className={classNames(cellLook, 'block pb-1 text-left text-lg font-semibold @2xl:text-base')}>
        {column.cell(row)}
      </th>
    );
  }
  return (
    <td className={classNames(cellLook, 'flex justify-between gap-6 py-1', column.isFigure && '@2xl:text-right')}>
      <span aria-hidden="true" className="text-soft @2xl:hidden">
        {column.header}
      </span>
      <span className={classNames('min-w-0 text-right @2xl:text-left', column.isFigure && 'font-mono')}>
        {column.cell(row)}
      </span>
    </td>
  );
}
