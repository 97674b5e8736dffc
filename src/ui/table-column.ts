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

/** What an address says of a sort: the column's key, with a minus before it when it descends. */
export const sortIn = (word: string): Sort =>
  word.startsWith('-') ? { key: word.slice(1), direction: 'descending' } : { key: word, direction: 'ascending' };
export const wordOf = ({ key, direction }: Sort): string => (direction === 'descending' ? `-${key}` : key);
