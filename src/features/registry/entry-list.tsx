import { Link } from 'react-router-dom';
import { inclusionPath, type RegistryRow, type RegistryState, registryStateWords } from '#shared/contracts/registry.ts';
import { formatCount, formatDateTime } from '../../lib/format.ts';
import { StatusWord } from '../../ui/status-word.tsx';

const tones: Record<RegistryState, 'neutral' | 'held' | 'stop'> = {
  sealed: 'held',
  amended: 'neutral',
  collecting: 'held',
  closed: 'neutral',
  shelved: 'neutral',
  published: 'held',
  withdrawn: 'stop',
};

type EntryListProps = {
  organisationId: string;
  rows: readonly RegistryRow[];
  publicationTo: (id: string) => string;
};

/** Entries of the log: what may be known of each, its digest, and its proof. */
export function EntryList({ organisationId, rows, publicationTo }: EntryListProps) {
  return (
    <ol className="border-t-2 border-ink">
      {rows.map(({ index, version, digest, sealedAt, state, title, sessions, publication }) => (
        <li key={index} className="flex min-w-0 flex-col gap-1.5 border-b border-rule py-4">
          <h3 className="text-lg font-semibold">{title ?? `Entry ${index + 1}`}</h3>
          <p>
            <StatusWord tone={tones[state]} hasDot>
              {registryStateWords[state]}
            </StatusWord>
            {sessions === null ? null : `, ${formatCount(sessions, 'session')}`}
          </p>
          <p className="text-soft">
            Sealed <time dateTime={sealedAt}>{formatDateTime(sealedAt)}</time>
            {version > 1 ? `, version ${version}` : ''}
          </p>
          <code className="break-all">{digest}</code>
          <p className="flex flex-wrap gap-x-6 gap-y-1">
            {publication === null ? null : <Link to={publicationTo(publication)}>Read what was published</Link>}
            <a href={inclusionPath(organisationId, index)} download={`registry-entry-${index}.json`}>
              Proof that entry {index + 1} is in the log
            </a>
          </p>
        </li>
      ))}
    </ol>
  );
}
