import type { ReactNode } from 'react';

export type Column<Row> = {
  /** Names the column to `sort` and `onSort`. */
  key: string;
  header: string;
  cell: (row: Row) => ReactNode;
  isSortable?: boolean;
  /** Figures: in mono, at the right. */
  isFigure?: boolean;
  /** The column that names the row; one per table, usually the first. */
  isRowHeader?: boolean;
};

export type Sort = { key: string; direction: 'ascending' | 'descending' };
