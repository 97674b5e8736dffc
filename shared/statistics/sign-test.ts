import { requireWhole } from './domain.ts';
import { type Fraction, fractionToNumber } from './fraction.ts';
import { exactTwoSidedEven } from './two-sided-even.ts';

export interface SignTest {
  /** Differences above zero. */
  readonly above: number;
  readonly below: number;
  /** Differences of zero, which say nothing either way and are left out. */
  readonly ties: number;
  readonly pFraction: Fraction;
  readonly p: number;
}

/**
 * Whether differences lie more often on one side of zero: one vote for each listener, however many answers they gave.
 *
 * @param differences one for each listener: answers for the one less answers for the other; any numbers but NaN
 * @returns the counts and the exact two-sided p; 1 without any vote
 * @throws RangeError when a difference is NaN or there are more than 100000
 * @example signTest([3, 1, 2, 5, 0, -1]).p // 0.375: four of five votes ; R: binom.test(4, 5)
 * @see Conover, Practical Nonparametric Statistics (1971), sec. 3.4
 */
export function signTest(differences: readonly number[]): SignTest {
  requireWhole('number of differences', differences.length, 0, 100_000);
  if (differences.some(Number.isNaN)) throw new RangeError('a difference must be a number, not NaN');
  const above = differences.filter((difference) => difference > 0).length;
  const below = differences.filter((difference) => difference < 0).length;
  const pFraction = exactTwoSidedEven(above, above + below);
  return { above, below, ties: differences.length - above - below, pFraction, p: fractionToNumber(pFraction) };
}
