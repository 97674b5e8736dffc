import type { CodesStatus } from '#shared/contracts/codes.ts';
import { formatDateTime } from '../../lib/format.ts';
import { purposeWords } from './codes-state.ts';

/** Every time that the code sheet was opened; the same list stands in the report. */
export function Openings({ openings }: Pick<CodesStatus, 'openings'>) {
  return (
    <section aria-labelledby="openings" className="flex max-w-3xl flex-col gap-3">
      <h2 id="openings" className="text-xl">
        Openings of the code sheet
      </h2>
      {openings.length === 0 ? (
        <p className="text-soft">
          It has not been opened yet. Each opening is recorded here and on the study’s record.
        </p>
      ) : (
        <ol className="border-t-2 border-ink">
          {openings.map(({ at, by, purpose }) => (
            <li
              key={`${at} ${by}`}
              className="grid gap-x-6 border-b border-rule py-3 sm:grid-cols-[14rem_minmax(0,1fr)]"
            >
              <time dateTime={at} className="text-soft">
                {formatDateTime(at)}
              </time>
              <span>
                {by}, {purposeWords[purpose] ?? purpose}
              </span>
            </li>
          ))}
        </ol>
      )}
    </section>
  );
}
