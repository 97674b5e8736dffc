import type { Study } from '#shared/contracts/studies.ts';
import { formatDateTime } from '../../../lib/format.ts';

export function Deviations({ deviations }: Pick<Study, 'deviations'>) {
  return (
    <section aria-labelledby="deviations" className="flex flex-col gap-3">
      <h2 id="deviations" className="text-xl">
        Deviations
      </h2>
      {deviations.length === 0 ? (
        <p className="text-soft">
          None recorded. Whatever differs from the sealed protocol is recorded here, with its time.
        </p>
      ) : (
        <ol className="border-t-2 border-ink">
          {deviations.map(({ at, text }) => (
            <li
              key={`${at} ${text}`}
              className="grid gap-x-6 border-b border-rule py-3 sm:grid-cols-[12rem_minmax(0,1fr)]"
            >
              <time dateTime={at} className="text-soft">
                {formatDateTime(at)}
              </time>
              <p className="whitespace-pre-line">{text}</p>
            </li>
          ))}
        </ol>
      )}
    </section>
  );
}
