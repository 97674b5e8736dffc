import type { ReactNode } from 'react';
import type { SigningKey } from '#shared/contracts/signing-keys.ts';
import { readableFingerprint } from '#shared/ledger/readable-fingerprint.ts';
import { formatDateTime, formatNumber } from '../../lib/format.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { ListFilter } from '../../ui/list-filter.tsx';
import type { Column } from '../../ui/table-column.ts';

const columns: Column<SigningKey>[] = [
  {
    key: 'fingerprint',
    header: 'Fingerprint',
    isRowHeader: true,
    cell: ({ fingerprint }) => (
      <code className="font-normal [overflow-wrap:anywhere]">{readableFingerprint(fingerprint)}</code>
    ),
  },
  {
    key: 'used',
    header: 'In use',
    cell: ({ createdAt, retiredAt }) => (
      <>
        <span className="whitespace-nowrap">{formatDateTime(createdAt)}</span>
        <span className="block whitespace-nowrap">to {retiredAt === null ? 'now' : formatDateTime(retiredAt)}</span>
      </>
    ),
  },
  { key: 'heads', header: 'Heads', isFigure: true, cell: ({ heads }) => formatNumber(heads) },
  {
    key: 'reason',
    header: 'Reason',
    cell: ({ retiredReason }) => <span className="[overflow-wrap:anywhere]">{retiredReason}</span>,
  },
];

type RetiredKeysProps = {
  rows: readonly SigningKey[];
  words: string;
  onSearch: (words: string) => void;
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
  /** What to do where a search finds nothing. */
  showAll: ReactNode;
};

/** Keys that sign nothing more; signatures of theirs still verify. */
export function RetiredKeys({ rows, words, onSearch, showAll, ...paging }: RetiredKeysProps) {
  const isSearched = words !== '';
  return (
    <section aria-labelledby="retired-keys" className="flex min-w-0 flex-col gap-4">
      <h2 id="retired-keys" className="text-xl">
        Retired keys
      </h2>
      {rows.length > 0 || isSearched ? (
        <ListFilter key={words} label="Search by fingerprint" words={words} onSearch={onSearch} />
      ) : null}
      <DataTable
        caption="Retired keys, the latest first"
        columns={columns}
        rows={rows}
        rowKey={({ fingerprint }) => fingerprint}
        {...paging}
        empty={
          isSearched ? (
            <div className="flex flex-col items-start gap-3">
              <p>No retired key has this in its fingerprint.</p>
              {showAll}
            </div>
          ) : (
            <p className="text-soft">None so far. A key that is replaced stays listed here with its dates.</p>
          )
        }
      />
    </section>
  );
}
