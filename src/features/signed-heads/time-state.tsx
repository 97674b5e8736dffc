import { localTimeWords, type TimeState as Time } from '#shared/contracts/signed-heads.ts';
import { formatCount, formatDateTime } from '../../lib/format.ts';
import { type Fact, Facts } from '../../ui/facts.tsx';
import { Notice } from '../../ui/notice.tsx';

/** Which authority stamps the time, and what still waits for it. */
export function TimeState({ time }: { time: Time }) {
  const { authority, waiting, lastError, nextAttemptAt } = time;
  const facts: Fact[] = [
    {
      label: 'Authority',
      value: authority?.name ?? 'none',
      isWords: true,
      ...(authority === null || authority.isLocal ? { tone: 'amber' as const } : {}),
    },
    {
      label: 'Waiting for a token',
      value: waiting === 0 ? 'none' : formatCount(waiting, 'head'),
      isWords: true,
      ...(lastError === null ? {} : { tone: 'amber' as const }),
    },
  ];
  if (lastError !== null) {
    facts.push({ label: 'Last attempt', value: lastError, isWords: true });
    if (nextAttemptAt !== null)
      facts.push({ label: 'Next attempt', value: formatDateTime(nextAttemptAt), isWords: true });
  }
  return (
    <section aria-labelledby="time" className="flex min-w-0 flex-col gap-4">
      <h2 id="time" className="text-xl">
        Time
      </h2>
      <p className="text-soft">
        Every signed head gets a token (RFC 3161) that says when it existed. A service that is down delays nothing; the
        token comes later, and the gap is shown.
      </p>
      <Facts facts={facts} />
      {authority?.isLocal ? (
        <Notice tone="amber" title="Local.">
          {localTimeWords} Whoever runs this server can name an authority by TSA_URL.
        </Notice>
      ) : null}
    </section>
  );
}
