import { clopperPearson, type Interval } from './clopper-pearson.ts';
import { clusterVariance, residual } from './cluster-variance.ts';
import { requireBetween } from './domain.ts';
import { type ListenerScore, pooledScore } from './listener-scores.ts';
import { studentTQuantile } from './student-t-quantile.ts';

export interface ListenerClusterInterval {
  readonly rate: number;
  readonly standardError: number;
  /** Variance of the rate over that of as many independent answers; null when all answers are right, or none. */
  readonly designEffect: number | null;
  /** How many independent answers would say as much; Infinity where listeners do not differ at all, null as above. */
  readonly effectiveAnswers: number | null;
  /** Student's t about the rate, as it comes. */
  readonly tInterval: Interval;
  /** What is shown: the same cut to 0 ... 1, or Clopper-Pearson's where listeners do not differ at all. */
  readonly interval: Interval;
  readonly basis: 'listeners' | 'binomial';
}

/**
 * Interval for the mean rate of listeners in general, from a panel in which each listener has draws of their own.
 *
 * Answers of one listener are alike, so the listeners and not the answers are counted: a ratio of two sums, with t on one
 * degree of freedom fewer than there are listeners. It says something of listeners in general only when they are a
 * sample of a stated population and six at least; of a panel that heard the same presentations the two-way interval does.
 *
 * @param scores     one for each listener, at least two
 * @param confidence from 0 to 1 - 2e-12, both excluded, for both sides together
 * @returns rate, standard error, design effect and the interval
 * @throws RangeError when an argument is outside its domain
 * @example listenerClusterInterval([8, 9, 14, 7, 10, 16, 8, 9, 12, 8].map((successes) => ({ successes, trials: 16 })),
 *   0.95).interval // 0.4989, 0.7636
 * @see Cochran, Sampling Techniques, 3rd ed. (1977), sec. 3.12; Kish, Survey Sampling (1965), sec. 8.2, on design effects
 */
export function listenerClusterInterval(scores: readonly ListenerScore[], confidence: number): ListenerClusterInterval {
  requireBetween('confidence', confidence, 0, 1 - 2e-12, 'open');
  const { successes, trials, rate } = pooledScore(scores, 2);
  const variance = clusterVariance(
    scores.map((score) => residual(score.successes, score.trials, successes, trials)),
    trials,
  );
  const standardError = Math.sqrt(variance);
  const reach = studentTQuantile((1 - confidence) / 2, scores.length - 1) * standardError;
  const tInterval = { lower: rate - reach, upper: rate + reach };
  const isSettled = rate === 0 || rate === 1;
  const designEffect = isSettled ? null : variance / ((rate * (1 - rate)) / trials);
  return {
    rate,
    standardError,
    designEffect,
    effectiveAnswers: designEffect === null ? null : trials / designEffect,
    tInterval,
    interval:
      variance === 0
        ? clopperPearson(successes, trials, confidence)
        : { lower: Math.max(0, tInterval.lower), upper: Math.min(1, tInterval.upper) },
    basis: variance === 0 ? 'binomial' : 'listeners',
  };
}
