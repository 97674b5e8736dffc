import {
  clopperPearson,
  clopperPearsonLower,
  clopperPearsonUpper,
  type Interval,
} from '../statistics/clopper-pearson.ts';
import {
  type ClusterError,
  intervalAbout,
  type SharedAnswer,
  trialClusterError,
  twoWayClusterError,
} from '../statistics/shared-cluster-interval.ts';

/** Limits of a rate that hold whatever the missing answers would have been: against it from below, for it from above. */
export interface RateLimits {
  /** Both sides together. */
  interval(confidence: number): Interval;
  /** All on one side. */
  lower(confidence: number): number;
  upper(confidence: number): number;
}

/** One answer that was due to a trial: whether it counts, or null when it did not come. */
export interface DueAnswer {
  readonly listener: string;
  readonly trial: string;
  readonly counts: boolean | null;
}

/**
 * Clopper-Pearson, where every answer has a draw of its own.
 *
 * @param counted answers that count, and how many did not come, of all that were due, at least one
 * @example ownDrawLimits({ counted: 12, missing: 0, due: 16 }).interval(0.95) // 0.4762, 0.9273 ; R: binom.test(12, 16)
 * @see clopperPearson for the source
 */
export function ownDrawLimits(counts: { counted: number; missing: number; due: number }): RateLimits {
  const { counted, missing, due } = counts;
  return {
    interval: (confidence) => ({
      lower: clopperPearson(counted, due, confidence).lower,
      upper: clopperPearson(counted + missing, due, confidence).upper,
    }),
    lower: (confidence) => clopperPearsonLower(counted, due, confidence),
    upper: (confidence) => clopperPearsonUpper(counted + missing, due, confidence),
  };
}

/**
 * Student's t over clusters, where listeners heard the same presentations.
 *
 * @returns null where nothing varies, so that no interval can be had
 */
function clusterLimits(
  due: readonly DueAnswer[],
  errorOf: (answers: readonly SharedAnswer[]) => ClusterError,
): RateLimits | null {
  const read = (missing: boolean) =>
    errorOf(due.map(({ listener, trial, counts }) => ({ listener, trial, isRight: counts ?? missing })));
  const asWrong = read(false);
  const asRight = due.some(({ counts }) => counts === null) ? read(true) : asWrong;
  const lowerAt = (confidence: number) => intervalAbout(asWrong, confidence)?.lower ?? 0;
  const upperAt = (confidence: number) => intervalAbout(asRight, confidence)?.upper ?? 1;
  if (asWrong.standardError === 0 || asRight.standardError === 0) return null;
  const oneSided = (confidence: number) => 2 * confidence - 1;
  return {
    interval: (confidence) => ({ lower: lowerAt(confidence), upper: upperAt(confidence) }),
    lower: (confidence) => lowerAt(oneSided(confidence)),
    upper: (confidence) => upperAt(oneSided(confidence)),
  };
}

const several = (due: readonly DueAnswer[], of: (answer: DueAnswer) => string) => new Set(due.map(of)).size > 1;

/**
 * Limits for this panel, trials counted and not answers.
 *
 * @see trialClusterInterval for the source
 */
export function panelLimits(due: readonly DueAnswer[]): RateLimits | null {
  return several(due, ({ trial }) => trial) ? clusterLimits(due, trialClusterError) : null;
}

/**
 * Limits for people of whom the listeners are a sample, listeners and trials both counted as drawn at random.
 *
 * @see twoWayClusterInterval for the source
 */
export function peopleLimits(due: readonly DueAnswer[]): RateLimits | null {
  const isTwoWay = several(due, ({ trial }) => trial) && several(due, ({ listener }) => listener);
  return isTwoWay ? clusterLimits(due, twoWayClusterError) : null;
}
