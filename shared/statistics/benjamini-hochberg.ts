import { requireBetween } from './domain.ts';

/**
 * p-values adjusted by Benjamini and Hochberg's step-up rule: what is named at a level holds, on average, no larger a
 * share of false namings than that level.
 *
 * A weaker promise than Holm's, for lists to be looked into; it never names a listener in a finding. Valid for
 * independent tests and some positive dependence.
 *
 * @param pValues each 0 ... 1, in any order; may be empty
 * @returns the adjusted p-values in the order given; none larger than Holm's
 * @throws RangeError when a value is outside 0 ... 1
 * @example benjaminiHochberg([0.01, 0.04, 0.03, 0.005]) // 0.02, 0.04, 0.04, 0.02 ; R: p.adjust(..., "BH")
 * @see Benjamini & Hochberg, "Controlling the false discovery rate", J. Royal Statistical Society B 57 (1995), 289-300
 */
export function benjaminiHochberg(pValues: readonly number[]): number[] {
  for (const p of pValues) requireBetween('p', p, 0, 1, 'closed');
  const adjusted = [...pValues];
  const fromLargest = pValues.map((p, index) => ({ p, index })).sort((a, b) => b.p - a.p);
  let smallestSoFar = 1;
  for (const [place, { p, index }] of fromLargest.entries()) {
    smallestSoFar = Math.min(smallestSoFar, p * (pValues.length / (pValues.length - place)));
    adjusted[index] = smallestSoFar;
  }
  return adjusted;
}
