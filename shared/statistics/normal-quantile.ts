import jStat from 'jstat';
import { requireBetween } from './domain.ts';

/** Outside these shares jstat's quantile loses digits (a hundredth at 1e-20), so it is not asked. */
const smallestShare = 1e-10;

/**
 * The standard normal value below which a share `p` lies.
 *
 * @param p share, from 1e-10 to 1 - 1e-10
 * @returns z in standard deviations; relative error at most 4e-10 on this domain, usually 1e-15
 * @throws RangeError outside the domain
 * @example normalQuantile(0.975) // 1.959964 ; R: qnorm(0.975)
 * @see Abramowitz & Stegun, Handbook of Mathematical Functions (1964), table 26.5
 */
export function normalQuantile(p: number): number {
  requireBetween('p', p, smallestShare, 1 - smallestShare, 'closed');
  return jStat.normal.inv(p, 0, 1);
}
