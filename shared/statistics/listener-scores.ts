import { mostTrials } from './binomial-log-probability.ts';
import { requireWhole } from './domain.ts';

/** What one listener did, with draws of their own: answers to shared presentations are not independent. */
export interface ListenerScore {
  /** Right answers, whole, 0 ... trials. */
  readonly successes: number;
  /** Whole, 1 ... 100000. */
  readonly trials: number;
}

/**
 * Refuses a panel that is too small or has a count outside its range, and adds up the others.
 *
 * @param scores one for each listener
 * @param fewest least number of listeners
 * @returns right answers and answers in all, and the pooled rate
 * @throws RangeError naming what is wrong
 * @example pooledScore([{ successes: 8, trials: 16 }, { successes: 12, trials: 16 }], 2) // 20 of 32, rate 0.625
 */
export function pooledScore(scores: readonly ListenerScore[], fewest: number) {
  requireWhole('number of listeners', scores.length, fewest, mostTrials);
  for (const { successes, trials } of scores) {
    requireWhole('trials', trials, 1, mostTrials);
    requireWhole('successes', successes, 0, trials);
  }
  const successes = scores.reduce((sum, score) => sum + score.successes, 0);
  const trials = scores.reduce((sum, score) => sum + score.trials, 0);
  return { successes, trials, rate: successes / trials };
}
