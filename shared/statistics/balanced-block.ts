import { binomialCoefficient } from './binomial-coefficient.ts';
import { requireWhole } from './domain.ts';
import { fractionToNumber } from './fraction.ts';

export interface BalancedBlock {
  /** Numbers of matches that can occur: every second one. */
  readonly support: readonly number[];
  /** Chance of each of them. */
  readonly probabilities: readonly number[];
  readonly mean: number;
  readonly variance: number;
  /** What coins would give: trials / 4. */
  readonly coinVariance: number;
}

/**
 * Matches of fixed answers with one block of two labels, in closed form: twice a hypergeometric count and a constant.
 *
 * @param trials    whole, 2 ... 2000
 * @param presented trials in which the first label was presented, whole, 0 ... trials
 * @param answered  trials in which the first label was answered, whole, 0 ... trials
 * @returns support, chances, mean and variance
 * @throws RangeError when an argument is outside its domain
 * @example balancedBlock(16, 8, 8).variance // 4.2667 = n^2 / (4 (n - 1)), above the 4 of coins
 * @see Fisher, The Design of Experiments (1935), ch. II; Feller, An Introduction to Probability Theory and Its
 *   Applications, vol. 1, 3rd ed. (1968), sec. II.6
 */
export function balancedBlock(trials: number, presented: number, answered: number): BalancedBlock {
  requireWhole('trials', trials, 2, 2000);
  requireWhole('presented', presented, 0, trials);
  requireWhole('answered', answered, 0, trials);
  const fewest = Math.max(0, presented + answered - trials);
  const both = Array.from({ length: Math.min(presented, answered) - fewest + 1 }, (_, index) => fewest + index);
  const denominator = binomialCoefficient(trials, answered);
  const other = trials - presented;
  return {
    support: both.map((count) => 2 * count + trials - presented - answered),
    probabilities: both.map((count) =>
      fractionToNumber({
        numerator: binomialCoefficient(presented, count) * binomialCoefficient(other, answered - count),
        denominator,
      }),
    ),
    mean: (answered * presented + (trials - answered) * other) / trials,
    variance: (4 * answered * presented * other * (trials - answered)) / (trials * trials * (trials - 1)),
    coinVariance: trials / 4,
  };
}
