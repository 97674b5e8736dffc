import { binomialTest } from './binomial-test.ts';
import { evenChance } from './chance.ts';
import { requireBetween } from './domain.ts';

export interface Equivalence {
  /** Against a share of one half less the margin, or smaller. */
  readonly pAgainstLower: number;
  /** Against a share of one half plus the margin, or larger. */
  readonly pAgainstUpper: number;
  /** The larger of the two. */
  readonly p: number;
}

/**
 * Whether a share lies within a margin about one half: two one-sided exact tests, both of which must reach the level.
 *
 * For preference, on listeners and not on their repeated answers. The margin belongs in the plan.
 *
 * @param successes those that prefer the one, whole, 0 ... trials
 * @param trials    whole, 1 ... 100000; independent
 * @param margin    strictly between 0 and 1/2
 * @returns both p-values and the larger, which is that of the test
 * @throws RangeError when an argument is outside its domain
 * @example equivalenceAboutHalf(50, 100, 0.1).p // 0.0271 ; R: pbinom(50, 100, 0.6)
 * @see Schuirmann, "A comparison of the two one-sided tests procedure ...", J. Pharmacokinetics and Biopharmaceutics 15
 *   (1987), 657-680
 */
export function equivalenceAboutHalf(successes: number, trials: number, margin: number): Equivalence {
  requireBetween('margin', margin, 0, evenChance.numerator / evenChance.denominator, 'open');
  const pAgainstLower = binomialTest(successes, trials, 0.5 - margin, 'greater').p;
  const pAgainstUpper = binomialTest(successes, trials, 0.5 + margin, 'less').p;
  return { pAgainstLower, pAgainstUpper, p: Math.max(pAgainstLower, pAgainstUpper) };
}
