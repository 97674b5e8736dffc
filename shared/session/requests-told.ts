import type { Method } from '../methods/method.ts';
import type { RequestContent } from './request-leaf.ts';
import type { SessionState } from './state.ts';

export type LabelTimes = { readonly label: string; readonly times: number };

/** How often each label was asked for, in the method's order; over all that is given. */
export function timesAsked(requests: readonly RequestContent[], { presentations }: Pick<Method, 'presentations'>) {
  return presentations.map(
    (label): LabelTimes => ({ label, times: requests.filter((asked) => asked.label === label).length }),
  );
}

/** The requests of one trial, in order. */
export const requestsIn = (requests: readonly RequestContent[], sessionId: string, trial: number) =>
  requests.filter((asked) => asked.session === sessionId && asked.trial === trial);

/**
 * How a study ran on request, in a sentence: presentations in a counted trial, on average, and of which label.
 *
 * @returns null where what is presented came in a fixed order, or no trial was counted
 */
export function onRequestSentence(
  states: readonly SessionState[],
  requests: readonly RequestContent[],
  method: Pick<Method, 'presentations'>,
): string | null {
  const asked = states.filter(({ plan }) => plan.onRequest !== undefined);
  const counted = asked.flatMap(({ sessionId, ended }) =>
    ended.filter(({ outcome }) => outcome === 'locked').map(({ trial }) => requestsIn(requests, sessionId, trial)),
  );
  if (counted.length === 0) return null;
  const most = Math.max(...asked.map(({ plan }) => plan.onRequest?.most ?? 0));
  const perTrial = (count: number) => (count / counted.length).toFixed(1);
  const each = timesAsked(counted.flat(), method).map(({ label, times }) => `${label} ${perTrial(times)}`);
  return `Run on request of a single listener: ${perTrial(counted.flat().length)} presentations in a trial on average (${each.join(', ')}), at most ${most}.`;
}
