import { requireBetween } from './domain.ts';

/**
 * p-values adjusted by Holm's step-down rule, so that the chance of one false naming among all of them stays at the level.
 *
 * The smallest is multiplied by their number, the next by one less, and so on; none falls below one that was smaller
 * before, none exceeds 1. Valid whatever the dependence. All listeners tested belong in, also those who left.
 *
 * @param pValues each 0 ... 1, in any order; may be empty
 * @returns the adjusted p-values in the order given
 * @throws RangeError when a value is outside 0 ... 1
 * @example holm([0.01, 0.04, 0.03, 0.005]) // 0.03, 0.06, 0.06, 0.02 ; R: p.adjust(c(.01, .04, .03, .005), "holm")
 * @see Holm, "A simple sequentially rejective multiple test procedure", Scandinavian J. Statistics 6 (1979), 65-70
 */
export function holm(pValues: readonly number[]): number[] {
  for (const p of pValues) requireBetween('p', p, 0, 1, 'closed');
  const adjusted = [...pValues];
  const byRank = pValues.map((p, index) => ({ p, index })).sort((a, b) => a.p - b.p);
  let largestSoFar = 0;
  for (const [rank, { p, index }] of byRank.entries()) {
    largestSoFar = Math.max(largestSoFar, Math.min(1, p * (pValues.length - rank)));
    adjusted[index] = largestSoFar;
  }
  return adjusted;
}
