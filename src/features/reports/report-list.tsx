import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import type { ReportRow } from '#shared/contracts/reports.ts';
import { formatDate } from '../../lib/format.ts';
import { Pager } from '../../ui/pager.tsx';

type ReportListProps = {
  rows: readonly ReportRow[];
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
  empty: ReactNode;
  hrefOf: (studyId: string) => string;
};

/** Findings, as sentences: a list is read before it is searched. */
export function ReportList({ rows, page, pageCount, onPage, empty, hrefOf }: ReportListProps) {
  if (rows.length === 0 && page === 1) return empty;
  return (
    <div className="flex max-w-4xl flex-col gap-6">
      <ul className="border-t-2 border-ink">
        {rows.map((row) => (
          <li key={row.studyId} className="flex flex-col gap-1.5 border-b border-rule py-5">
            <h2 className="text-xl">
              <Link to={hrefOf(row.studyId)}>{row.headline}</Link>
            </h2>
            <p className="text-soft">
              {row.title}, closed <time dateTime={row.closedAt}>{formatDate(row.closedAt)}</time>
            </p>
          </li>
        ))}
      </ul>
      {pageCount > 1 ? <Pager of="Reports" page={page} pageCount={pageCount} onPage={onPage} /> : null}
    </div>
  );
}
