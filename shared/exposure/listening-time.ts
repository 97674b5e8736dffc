import type { Entry } from '../ledger/chain.ts';
import type { Method } from '../methods/method.ts';
import type { SessionPlan } from '../session/events.ts';

const minuteMs = 60_000;

/**
 * How long a session plays at the most by its plan: every presentation with the longest excerpt, spares left out.
 *
 * @returns minutes
 */
export function plannedListeningMinutes(plan: SessionPlan, method: Method): number {
  const longestMs = Math.max(...plan.programme.map(({ lengthMs }) => lengthMs));
  const presentations = plan.onRequest?.most ?? method.presentations.length;
  return ((plan.trials * presentations + method.familiarisation.length) * longestMs) / minuteMs;
}

/** Whatever ends an excerpt that plays. */
const endings = ['listening-ended', 'paused', 'trial-voided', 'session-abandoned', 'session-finished', 'step-undone'];

/**
 * How long a session has played, by its record: from each start of listening to what ended it.
 *
 * @param entries of one session, in order
 * @returns minutes
 */
export function listenedMinutes(entries: readonly Entry[]): number {
  let startedAt: number | null = null;
  let totalMs = 0;
  for (const { kind, at } of entries) {
    if (startedAt !== null && endings.includes(kind)) {
      totalMs += Date.parse(at) - startedAt;
      startedAt = null;
    }
    if (kind === 'listening-started') startedAt = Date.parse(at);
  }
  return totalMs / minuteMs;
}
