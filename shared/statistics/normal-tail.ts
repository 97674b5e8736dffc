import { requireBetween } from './domain.ts';
import { logOfComplement } from './log-arithmetic.ts';

const logOfRootTwoPi = 0.5 * Math.log(2 * Math.PI);

/** Where the power series hands over to the continued fraction: each is at full precision on its side. */
const handover = 1.25;

/**
 * Natural logarithm of the chance that a standard normal value exceeds `z`.
 *
 * The power series for the area next to the centre up to z = 1.25, beyond it Laplace's continued fraction for the
 * tail, cut after 300 terms (125 suffice at the handover). Below 0 the complement of the opposite tail.
 *
 * @param z any number, in standard deviations
 * @returns log of the upper tail; finite for every finite z whose square is finite
 * @throws RangeError when z is NaN
 * @example Math.exp(normalLogUpperTail(1.959963984540054)) // 0.025 ; R: pnorm(1.959963984540054, lower.tail = FALSE)
 * @see Abramowitz & Stegun, Handbook of Mathematical Functions (1964), eq. 26.2.11 (series), 26.2.14 (fraction)
 */
export function normalLogUpperTail(z: number): number {
  requireBetween('z', z, Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY, 'closed');
  if (z < 0) return logOfComplement(normalLogUpperTail(-z));
  if (z <= handover) return Math.log(0.5 - normalAreaFromCentre(z));
  if (z === Number.POSITIVE_INFINITY) return Number.NEGATIVE_INFINITY;
  return -0.5 * z * z - logOfRootTwoPi - Math.log(tailFraction(z));
}

/**
 * Chance that a standard normal value exceeds `z`.
 *
 * @param z any number, in standard deviations
 * @returns the upper tail; 0 only below the smallest double, from about z = 38.5
 * @throws RangeError when z is NaN
 * @example normalUpperTail(5) // 2.866516e-07 ; R: pnorm(5, lower.tail = FALSE)
 * @see normalLogUpperTail for the method
 */
export function normalUpperTail(z: number): number {
  return Math.abs(z) <= handover ? 0.5 - normalAreaFromCentre(z) : Math.exp(normalLogUpperTail(z));
}

/**
 * Area under the standard normal curve between 0 and `z`, negative to the left of the centre: exact in its leading
 * digits also for the smallest z, where "lower tail minus one half" would leave nothing.
 *
 * @param z any number, in standard deviations
 * @returns between -1/2 and 1/2
 * @throws RangeError when z is NaN
 * @example normalAreaFromCentre(1) // 0.3413447460685429 ; R: pnorm(1) - 0.5
 * @see Abramowitz & Stegun (1964), eq. 26.2.11
 */
export function normalAreaFromCentre(z: number): number {
  if (Math.abs(z) > handover) return Math.sign(z) * (0.5 - normalUpperTail(Math.abs(z)));
  requireBetween('z', z, -handover, handover, 'closed');
  let term = z;
  let sum = z;
  for (let odd = 3; Math.abs(term) > Math.abs(sum) * 1e-17; odd += 2) {
    term *= (z * z) / odd;
    sum += term;
  }
  return sum * Math.exp(-0.5 * z * z - logOfRootTwoPi);
}

/** z + 1/(z + 2/(z + 3/(z + ...))), from the inside out; the tail is the density over this. */
function tailFraction(z: number): number {
  let value = z;
  for (let k = 300; k >= 1; k--) value = z + k / value;
  return value;
}
