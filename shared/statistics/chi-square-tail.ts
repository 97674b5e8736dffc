import gammainc from '@stdlib/math-base-special-gammainc';
import { requireBetween } from './domain.ts';

/**
 * Chance that a chi-square value exceeds `statistic`: the regularised upper incomplete gamma function.
 *
 * @param statistic        at least 0
 * @param degreesOfFreedom above 0 ... 1000000; need not be whole
 * @returns the upper tail, never 1 less the lower one
 * @throws RangeError when an argument is outside its domain
 * @example chiSquareUpperTail(3.841458820694124, 1) // 0.05 ; R: pchisq(3.841458820694124, 1, lower.tail = FALSE)
 * @see Abramowitz & Stegun, Handbook of Mathematical Functions (1964), eq. 26.4.19
 */
export function chiSquareUpperTail(statistic: number, degreesOfFreedom: number): number {
  requireBetween('statistic', statistic, 0, Number.MAX_VALUE, 'closed');
  requireBetween('degreesOfFreedom', degreesOfFreedom, Number.MIN_VALUE, 1e6, 'closed');
  return gammainc(statistic / 2, degreesOfFreedom / 2, true, true);
}
