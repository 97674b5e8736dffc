import { Link } from 'react-router-dom';
import type { PublicationRow } from '#shared/contracts/publications.ts';
import { PublicationList } from './publication-list.tsx';

type LatestPublicationsProps = {
  title: string;
  /** Newest first; the first few are shown. */
  rows: readonly PublicationRow[];
  allTo: string;
  hrefOf: (id: string) => string;
};

const mostShown = 3;

/** The latest of what is published; nothing at all while there is none. */
export function LatestPublications({ title, rows, allTo, hrefOf }: LatestPublicationsProps) {
  if (rows.length === 0) return null;
  return (
    <section aria-labelledby="latest-publications" className="flex flex-col gap-3">
      <h2 id="latest-publications" className="text-xl">
        {title}
      </h2>
      <PublicationList rows={rows.slice(0, mostShown)} hrefOf={hrefOf} level={3} />
      <p>
        <Link to={allTo}>All published results</Link>
      </p>
    </section>
  );
}
