import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { PublicationList } from './publication-list.tsx';
import { publicationQueries } from './publications.queries.ts';

type LatestPublicationsProps = {
  title: string;
  /** Of one organisation, or of all. */
  organisationId?: string;
  allTo: string;
  hrefOf: (id: string) => string;
};

const mostShown = 3;

/** The latest of what is published; nothing at all while there is none, or while it cannot be fetched. */
export function LatestPublications({ title, organisationId, allTo, hrefOf }: LatestPublicationsProps) {
  const query = organisationId === undefined ? {} : { organisationId };
  const { data } = useQuery(publicationQueries.list(query));
  if (data === undefined || data.rows.length === 0) return null;
  return (
    <section aria-labelledby="latest-publications" className="flex flex-col gap-3">
      <h2 id="latest-publications" className="text-xl">
        {title}
      </h2>
      <PublicationList rows={data.rows.slice(0, mostShown)} hrefOf={hrefOf} level={3} />
      <p>
        <Link to={allTo}>All published results</Link>
      </p>
    </section>
  );
}
