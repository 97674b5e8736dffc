import { chiSquareUpperTail } from './chi-square-tail.ts';
import { requireBetween, requireWhole } from './domain.ts';

export interface TrendGroup {
  /** Right answers, whole, 0 ... trials. */
  readonly successes: number;
  /** Whole, 1 ... 100000. */
  readonly trials: number;
  /** Where the group stands on the scale of the trend: the block's number, the size of the difference. */
  readonly score: number;
}

export interface TrendTest {
  /** Chi-square on one degree of freedom. */
  readonly statistic: number;
  /** Two-sided, by the chi-square approximation. */
  readonly p: number;
}

/**
 * Whether a rate rises or falls along a scale: learning or fatigue over the blocks of a session.
 *
 * A check, by the usual large-sample approximation; never a claim. With all answers right, or none, there is no trend.
 *
 * @param groups at least two, with at least two different scores
 * @returns the statistic and its p
 * @throws RangeError when an argument is outside its domain
 * @example trendTest([9, 8, 7, 6].map((successes, index) => ({ successes, trials: 12, score: index + 1 }))).p // 0.1824
 *   ; R: prop.trend.test(c(9, 8, 7, 6), rep(12, 4))
 * @see Armitage, "Tests for linear trends in proportions and frequencies", Biometrics 11 (1955), 375-386
 */
export function trendTest(groups: readonly TrendGroup[]): TrendTest {
  requireWhole('number of groups', groups.length, 2, 10_000);
  for (const { successes, trials, score } of groups) {
    requireWhole('trials', trials, 1, 100_000);
    requireWhole('successes', successes, 0, trials);
    requireBetween('score', score, -1e9, 1e9, 'closed');
  }
  if (groups.every(({ score }) => score === groups[0]?.score)) throw new RangeError('the scores must not all be equal');
  const total = sum(groups, ({ trials }) => trials);
  const rate = sum(groups, ({ successes }) => successes) / total;
  if (rate === 0 || rate === 1) return { statistic: 0, p: 1 };
  // Scores are taken from their mean, so that nothing large is subtracted.
  const centre = sum(groups, ({ trials, score }) => trials * score) / total;
  const slope = sum(groups, ({ successes, trials, score }) => (score - centre) * (successes - trials * rate));
  const spread = sum(groups, ({ trials, score }) => trials * (score - centre) ** 2);
  const statistic = slope ** 2 / (rate * (1 - rate) * spread);
  return { statistic, p: chiSquareUpperTail(statistic, 1) };
}

function sum(groups: readonly TrendGroup[], term: (group: TrendGroup) => number): number {
  return groups.reduce((total, group) => total + term(group), 0);
}
