import { binomialCoefficient } from './binomial-coefficient.ts';
import { requireWhole } from './domain.ts';
import { type Fraction, fractionToNumber, reduceFraction } from './fraction.ts';

export interface FisherExactTest {
  readonly pFraction: Fraction;
  readonly p: number;
}

/** [[yes, no] in the first row, [yes, no] in the second]. */
export type TwoByTwo = readonly [readonly [number, number], readonly [number, number]];

/**
 * How often chance alone would put at least as many of the yeses into the first row, all margins held fixed; or, on
 * both sides, spread them no more likely.
 *
 * Counted in whole numbers: two tables are equally likely or they are not, without a margin for rounding.
 *
 * @param table       four counts, whole, 0 ... 10000
 * @param alternative 'greater': more yeses in the first row. 'two-sided': by least likelihood
 * @returns p as a fraction in lowest terms and as a number
 * @throws RangeError when a count is outside its domain
 * @example fisherExactTest([[4, 0], [0, 4]], 'greater').p // 1/70 = 0.0143 ; Fisher, The Design of Experiments (1935), ch. II
 *   ; R: fisher.test(matrix(c(4, 0, 0, 4), 2), alternative = "greater")
 * @see Fisher (1935), as above; R's fisher.test for the two-sided rule
 */
export function fisherExactTest(table: TwoByTwo, alternative: 'greater' | 'two-sided'): FisherExactTest {
  const [[yes, no], [otherYes, otherNo]] = table;
  for (const count of [yes, no, otherYes, otherNo]) requireWhole('count', count, 0, 10_000);
  const first = yes + no;
  const second = otherYes + otherNo;
  const allYes = yes + otherYes;
  const ways = (count: number) => binomialCoefficient(first, count) * binomialCoefficient(second, allYes - count);
  const observed = ways(yes);
  let numerator = 0n;
  for (let count = Math.max(0, allYes - second); count <= Math.min(first, allYes); count++) {
    const here = ways(count);
    if (alternative === 'greater' ? count >= yes : here <= observed) numerator += here;
  }
  const pFraction = reduceFraction({ numerator, denominator: binomialCoefficient(first + second, allYes) });
  return { pFraction, p: fractionToNumber(pFraction) };
}
