import { mostTrials } from './binomial-log-probability.ts';
import { binomialLogUpperTail } from './binomial-tails.ts';
import type { Chance } from './chance.ts';
import { requireBetween, requireWhole } from './domain.ts';
import { isUpperTailAtMost } from './tail-at-most.ts';

export interface CriticalCount {
  /** Smallest number of right answers that reaches the level. */
  readonly count: number;
  /** Chance of reaching that count by guessing: the true size of the test, at most the level. */
  readonly attainedSize: number;
}

/**
 * How many right answers are needed before guessing is an unlikely explanation.
 *
 * Computed for each number of trials; there is no table and no normal approximation behind it.
 *
 * @param trials answers, whole, 1 ... 100000
 * @param chance chance of a right answer by guessing
 * @param alpha  one-sided level, strictly between 0 and 1; read as the decimal it prints as
 * @returns the count and its size, or null when even all right would not reach the level
 * @throws RangeError when an argument is outside its domain
 * @example criticalCount(16, evenChance, 0.05) // { count: 12, attainedSize: 2517/65536 = 0.0384 }
 *   ; R: pbinom(11, 16, 0.5, lower.tail = FALSE) is 0.0384, pbinom(10, ...) is 0.1051
 * @see ISO 10399, Sensory analysis - Duo-trio test, table A.1, for chance 1/2; ISO 4120, table A.1, for chance 1/3
 */
export function criticalCount(trials: number, chance: Chance, alpha: number): CriticalCount | null {
  requireWhole('trials', trials, 1, mostTrials);
  requireBetween('alpha', alpha, 0, 1, 'open');
  if (!isUpperTailAtMost(trials, trials, chance, alpha)) return null;
  let tooFew = 0;
  let enough = trials;
  while (enough - tooFew > 1) {
    const middle = Math.floor((tooFew + enough) / 2);
    if (isUpperTailAtMost(middle, trials, chance, alpha)) enough = middle;
    else tooFew = middle;
  }
  return { count: enough, attainedSize: Math.exp(binomialLogUpperTail(enough, trials, chance)) };
}
