import { Link } from 'react-router-dom';
import type { PublicationRow } from '#shared/contracts/publications.ts';
import { formatDate } from '../../lib/format.ts';
import { StatusWord } from '../../ui/status-word.tsx';

type PublicationListProps = {
  rows: readonly PublicationRow[];
  hrefOf: (id: string) => string;
  /** The level of the headings: 2 on a page of its own, 3 within a section. */
  level?: 2 | 3;
};

/** Published findings, as sentences. */
export function PublicationList({ rows, hrefOf, level = 2 }: PublicationListProps) {
  const Heading = `h${level}` as const;
  return (
    <ul className="border-t-2 border-ink">
      {rows.map(({ id, headline, title, publisher, publishedAt, isWithdrawn }) => (
        <li key={id} className="flex flex-col gap-1.5 border-b border-rule py-4">
          <Heading className={level === 2 ? 'text-xl' : 'text-lg'}>
            <Link to={hrefOf(id)}>{headline}</Link>
          </Heading>
          <p className="text-soft">
            {isWithdrawn ? <StatusWord tone="stop">Withdrawn.</StatusWord> : null} {title}, published{' '}
            <time dateTime={publishedAt}>{formatDate(publishedAt)}</time> by {publisher}
          </p>
        </li>
      ))}
    </ul>
  );
}
