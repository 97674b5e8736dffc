import type { Interval } from './clopper-pearson.ts';
import { clusterVariance, residual } from './cluster-variance.ts';
import { requireBetween, requireWhole } from './domain.ts';
import { studentTQuantile } from './student-t-quantile.ts';

/** One answer to a shared presentation. */
export interface SharedAnswer {
  readonly listener: string;
  readonly trial: string;
  readonly isRight: boolean;
}

/** A rate whose answers come in clusters, and how far it may be off. */
export interface ClusterError {
  readonly rate: number;
  readonly standardError: number;
  readonly degreesOfFreedom: number;
}

export interface ClusteredRate extends ClusterError {
  /** Student's t about the rate, cut to 0 ... 1; null where nothing varies and no interval can be had from it. */
  readonly interval: Interval | null;
}

/**
 * Interval for the rate of this panel when its listeners hear the same presentations: trials are counted, not answers.
 *
 * Whatever the listeners share in a trial (a habit, a nudge) is inside its cluster. It speaks of these listeners alone.
 *
 * @param answers    one for each answer, in at least two trials; a listener answers a trial once
 * @param confidence from 0 to 1 - 2e-12, both excluded, for both sides together
 * @returns rate, standard error and interval on one degree of freedom fewer than there are trials
 * @throws RangeError when an argument is outside its domain
 * @example trialClusterInterval(answers, 0.95) // of 2 listeners, both right in 3 of 4 trials: rate 0.75, 0 ... 1
 * @see Cochran, Sampling Techniques, 3rd ed. (1977), sec. 3.12
 */
export function trialClusterInterval(answers: readonly SharedAnswer[], confidence: number): ClusteredRate {
  return withInterval(trialClusterError(answers), confidence);
}

/** The same before any confidence is chosen. */
export function trialClusterError(answers: readonly SharedAnswer[]): ClusterError {
  const right = rightOf(answers);
  const residuals = residualsBy(answers, right, ({ trial }) => trial);
  return errorOf(right / answers.length, clusterVariance(residuals, answers.length), residuals.length - 1);
}

/**
 * Interval for the rate of listeners in general when a panel hears the same presentations: both the listeners and the
 * trials are counted as drawn at random.
 *
 * The variance is that by listener plus that by trial less that by single answer, and no smaller than either of the two.
 *
 * @param answers    one for each answer, of at least two listeners in at least two trials, each trial answered once
 * @param confidence from 0 to 1 - 2e-12, both excluded, for both sides together
 * @returns rate, standard error and interval on one degree of freedom fewer than there are listeners, or trials, if fewer
 * @throws RangeError when an argument is outside its domain
 * @example twoWayClusterInterval(answers, 0.95) // never narrower than trialClusterInterval
 * @see Cameron, Gelbach & Miller, "Robust inference with multiway clustering", J. Business & Economic Statistics 29
 *   (2011), 238-249
 */
export function twoWayClusterInterval(answers: readonly SharedAnswer[], confidence: number): ClusteredRate {
  return withInterval(twoWayClusterError(answers), confidence);
}

/** The same before any confidence is chosen. */
export function twoWayClusterError(answers: readonly SharedAnswer[]): ClusterError {
  const right = rightOf(answers);
  const byListener = residualsBy(answers, right, ({ listener }) => listener);
  const byTrial = residualsBy(answers, right, ({ trial }) => trial);
  const byAnswer = answers.map(({ isRight }) => residual(isRight ? 1 : 0, 1, right, answers.length));
  const [listeners, trials, cells] = [byListener, byTrial, byAnswer].map((residuals) =>
    clusterVariance(residuals, answers.length),
  ) as [number, number, number];
  const variance = Math.max(listeners + trials - cells, listeners, trials);
  return errorOf(right / answers.length, variance, Math.min(byListener.length, byTrial.length) - 1);
}

/** Right answers in all. */
function rightOf(answers: readonly SharedAnswer[]): number {
  requireWhole('number of answers', answers.length, 2, 1_000_000);
  const cells = new Map<string, Set<string>>();
  for (const { trial, listener } of answers) {
    const seen = cells.get(trial) ?? new Set();
    if (seen.has(listener)) throw new RangeError('a listener answers a trial once');
    cells.set(trial, seen.add(listener));
  }
  return answers.filter(({ isRight }) => isRight).length;
}

function residualsBy(
  answers: readonly SharedAnswer[],
  right: number,
  clusterOf: (answer: SharedAnswer) => string,
): number[] {
  const counts = new Map<string, { right: number; all: number }>();
  for (const answer of answers) {
    const cluster = clusterOf(answer);
    const count = counts.get(cluster) ?? { right: 0, all: 0 };
    counts.set(cluster, { right: count.right + (answer.isRight ? 1 : 0), all: count.all + 1 });
  }
  return [...counts.values()].map((count) => residual(count.right, count.all, right, answers.length));
}

function errorOf(rate: number, variance: number, degreesOfFreedom: number): ClusterError {
  return { rate, standardError: Math.sqrt(variance), degreesOfFreedom };
}

/**
 * Student's t about a clustered rate.
 *
 * @param confidence from 0 to 1 - 2e-12, both excluded, for both sides together
 * @returns the interval cut to 0 ... 1; null where nothing varies
 * @throws RangeError when the confidence is outside its domain
 */
export function intervalAbout(error: ClusterError, confidence: number): Interval | null {
  requireBetween('confidence', confidence, 0, 1 - 2e-12, 'open');
  const { rate, standardError, degreesOfFreedom } = error;
  if (standardError === 0) return null;
  const reach = studentTQuantile((1 - confidence) / 2, degreesOfFreedom) * standardError;
  return { lower: Math.max(0, rate - reach), upper: Math.min(1, rate + reach) };
}

const withInterval = (error: ClusterError, confidence: number): ClusteredRate => ({
  ...error,
  interval: intervalAbout(error, confidence),
});
