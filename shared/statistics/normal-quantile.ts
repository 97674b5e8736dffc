import jStat from 'jstat';
import { requireBetween } from './domain.ts';
import { normalUpperTail } from './normal-tail.ts';

/** Outside these shares jstat's quantile loses figures (a hundredth at 1e-20), so it is not asked. */
const smallestShare = 1e-10;

/**
 * The standard normal value below which a share `p` lies.
 *
 * Takes jstat's value, which is right to 5e-9 at the ends of the domain, and one step of Newton's method with the tail
 * computed here, which doubles the number of right figures.
 *
 * @param p share, from 1e-10 to 1 - 1e-10
 * @returns z in standard deviations, to 1e-14
 * @throws RangeError outside the domain
 * @example normalQuantile(0.975) // 1.959963984540054 ; R: qnorm(0.975)
 * @see Abramowitz & Stegun, Handbook of Mathematical Functions (1964), table 26.5
 */
export function normalQuantile(p: number): number {
  requireBetween('p', p, smallestShare, 1 - smallestShare, 'closed');
  const share = Math.min(p, 1 - p);
  const start = jStat.normal.inv(share, 0, 1);
  const density = Math.exp(-0.5 * start * start) / Math.sqrt(2 * Math.PI);
  const z = start - (normalUpperTail(-start) - share) / density;
  return p > 0.5 ? -z : z;
}
