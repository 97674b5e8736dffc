import { aboveGuessingRate, intervalAboveGuessing } from '../statistics/above-guessing.ts';
import type { Chance } from '../statistics/chance.ts';
import type { Interval } from '../statistics/clopper-pearson.ts';
import { listenerClusterInterval } from '../statistics/listener-cluster-interval.ts';
import type { ListenerResult, PeopleEstimates } from './forced-choice-result.ts';
import { recordInterval } from './interval-with-missing.ts';
import { type DueAnswer, peopleLimits } from './rate-limits.ts';

/** Fewer people than this are no sample of anybody (common practice, no source). */
export const fewestListeners = 6;

const confidence = 0.95;

/**
 * The rate of people of whom the listeners are a sample: listeners are counted, and trials too where they were shared.
 *
 * @param byListener    each listener's own result
 * @param due           every answer that was due
 * @param isOwnDraws    whether every answer has a draw of its own
 * @param chance        chance of a right answer by guessing
 * @param samplingFrame whom the protocol says they are drawn from
 * @returns null with fewer than six listeners, or where nothing varies
 * @see listenerClusterInterval and twoWayClusterInterval for the sources
 */
export function peopleEstimatesOf(
  byListener: readonly ListenerResult[],
  due: readonly DueAnswer[],
  isOwnDraws: boolean,
  chance: Chance,
  samplingFrame: string,
): PeopleEstimates | null {
  const answering = byListener.filter(({ answers }) => answers > 0);
  if (answering.length < fewestListeners) return null;
  const interval = isOwnDraws ? overListeners(answering) : peopleLimits(due)?.interval(confidence);
  if (interval === undefined) return null;
  return {
    basis: isOwnDraws ? 'listeners' : 'listeners and trials',
    samplingFrame,
    interval: recordInterval(interval),
    aboveGuessing: recordInterval(intervalAboveGuessing(interval, chance).clipped),
    isAboveGuessing: aboveGuessingRate(interval.lower, chance) > 0,
  };
}

/** Missing answers wrong from below and right from above, as everywhere. */
function overListeners(answering: readonly ListenerResult[]): Interval {
  const over = (rightOf: (own: ListenerResult) => number) =>
    listenerClusterInterval(
      answering.map((own) => ({ successes: rightOf(own), trials: own.answers })),
      confidence,
    ).interval;
  return {
    lower: over(({ correct }) => correct).lower,
    upper: over(({ correct, missing }) => correct + missing).upper,
  };
}
