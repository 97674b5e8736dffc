import { requireBetween } from './domain.ts';
import { normalLogUpperTail } from './normal-tail.ts';

const logOfRootTwoPi = 0.5 * Math.log(2 * Math.PI);

/**
 * The standard normal value below which a share `p` lies.
 *
 * Newton's method on the logarithm of the tail, which falls ever more steeply: from the centre the first step goes beyond
 * the value, every later one comes nearer from there, and none needs a start from elsewhere.
 *
 * @param p share, strictly between 0 and 1
 * @returns z in standard deviations, to 1e-14
 * @throws RangeError outside the domain
 * @example normalQuantile(0.975) // 1.959963984540054 ; R: qnorm(0.975)
 * @see Abramowitz & Stegun, Handbook of Mathematical Functions (1964), table 26.5
 */
export function normalQuantile(p: number): number {
  requireBetween('p', p, 0, 1, 'open');
  const logShare = Math.log(Math.min(p, 1 - p));
  let z = 0;
  for (let step = 0; step < 100; step++) {
    const logTail = normalLogUpperTail(z);
    const slope = Math.exp(-0.5 * z * z - logOfRootTwoPi - logTail);
    const next = Math.max(0, z + (logTail - logShare) / slope);
    if (Math.abs(next - z) <= 4e-16 * next) return p > 0.5 ? next : -next || 0;
    z = next;
  }
  return p > 0.5 ? z : -z || 0;
}
