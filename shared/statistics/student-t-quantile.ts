import betaincinv from '@stdlib/math-base-special-betaincinv';
import { requireBetween, requireWhole } from './domain.ts';

/**
 * The value of Student's t that a share `tail` lies above.
 *
 * @param tail             from 1e-12 to 1/2
 * @param degreesOfFreedom whole, 1 ... 100000
 * @returns t, at least 0
 * @throws RangeError when an argument is outside its domain
 * @example studentTQuantile(0.025, 9) // 2.2622 ; R: qt(0.025, 9, lower.tail = FALSE)
 * @see Abramowitz & Stegun, Handbook of Mathematical Functions (1964), eq. 26.7.1, 26.5.2
 */
export function studentTQuantile(tail: number, degreesOfFreedom: number): number {
  requireBetween('tail', tail, 1e-12, 0.5, 'closed');
  requireWhole('degreesOfFreedom', degreesOfFreedom, 1, 100_000);
  // t^2 / (t^2 + degrees) has a beta distribution; its complement is asked for where that is the smaller of the two.
  const [share, complement] =
    tail > 0.25
      ? inverse(2 * tail, 0.5, degreesOfFreedom / 2, true)
      : inverse(2 * tail, degreesOfFreedom / 2, 0.5, false).reverse();
  return Math.sqrt((degreesOfFreedom * (share ?? Number.NaN)) / (complement ?? Number.NaN));
}

function inverse(p: number, a: number, b: number, upper: boolean): number[] {
  const value = betaincinv(p, a, b, upper);
  return [value, 1 - value];
}
