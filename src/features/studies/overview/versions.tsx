import type { Study } from '#shared/contracts/studies.ts';
import { formatDateTime } from '../../../lib/format.ts';
import { ChangeList } from '../../../ui/change-list.tsx';

/** Every sealed version, the newest first; nothing while there is one alone. */
export function Versions({ versions }: Pick<Study, 'versions'>) {
  if (versions.length < 2) return null;
  return (
    <section aria-labelledby="versions" className="flex max-w-4xl flex-col gap-4">
      <h2 id="versions" className="text-xl">
        Versions of the protocol
      </h2>
      <ol className="flex flex-col gap-8">
        {versions.toReversed().map(({ version, sealedAt, sealedBy, digest, reason, changes }, index) => (
          <li key={version} className="flex min-w-0 flex-col gap-2">
            <h3 className="text-lg">
              Version {version}
              {index === 0 ? ', in force' : ''}
            </h3>
            <p className="text-soft">
              Sealed by {sealedBy}, <time dateTime={sealedAt}>{formatDateTime(sealedAt)}</time>
            </p>
            {reason === null ? null : <p className="whitespace-pre-line">{reason}</p>}
            {changes.length > 0 ? <ChangeList label={`What version ${version} changed`} changes={changes} /> : null}
            <p className="text-soft">Digest, SHA-256</p>
            <code className="break-all">{digest}</code>
          </li>
        ))}
      </ol>
    </section>
  );
}
