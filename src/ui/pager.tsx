import { Button } from './button.tsx';

type PagerProps = {
  /** What is being paged through. */
  of: string;
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
};

export function Pager({ of, page, pageCount, onPage }: PagerProps) {
  return (
    <nav aria-label={`Pages of ${of}`} className="flex flex-wrap items-center gap-4 print:hidden">
      <Button disabled={page <= 1} onClick={() => onPage(page - 1)}>
        Previous
      </Button>
      <p aria-live="polite">
        Page {page} of {pageCount}
      </p>
      <Button disabled={page >= pageCount} onClick={() => onPage(page + 1)}>
        Next
      </Button>
    </nav>
  );
}
