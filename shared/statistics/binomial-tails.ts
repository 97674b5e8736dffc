import { logPoint, mostTrials } from './binomial-log-probability.ts';
import { type Chance, chanceAsNumbers } from './chance.ts';
import { requireWhole } from './domain.ts';
import { logOfComplement } from './log-arithmetic.ts';

/**
 * Natural logarithm of the chance of at least `successes` in `trials`.
 *
 * Of the two tails the smaller is summed outwards from its largest term, by ratios of neighbouring terms; the other is
 * its complement. An upper tail is never found by taking a lower tail from 1, which would leave nothing of it.
 *
 * @param successes whole, 0 ... trials + 1 (the tail of trials + 1 is empty)
 * @param trials    whole, 0 ... 100000; independent
 * @param chance    chance of a success on each trial, strictly between 0 and 1
 * @returns log P(X >= successes); -Infinity for the empty tail
 * @throws RangeError when an argument is outside its domain
 * @example Math.exp(binomialLogUpperTail(12, 16, evenChance)) // 2517/65536 = 0.0384 ; R: pbinom(11, 16, 0.5, FALSE)
 * @see Loader, "Fast and accurate computation of binomial probabilities" (2000), for the point probability;
 *   Feller, An Introduction to Probability Theory and Its Applications, vol. 1, 3rd ed. (1968), ch. VI.3
 */
export function binomialLogUpperTail(successes: number, trials: number, chance: Chance): number {
  requireWhole('trials', trials, 0, mostTrials);
  requireWhole('successes', successes, 0, trials + 1);
  const { right, wrong } = chanceAsNumbers(chance);
  return logTailFrom(successes, trials, right, wrong);
}

/**
 * Natural logarithm of the chance of at most `successes` in `trials`: the upper tail of the failures.
 *
 * @param successes whole, -1 ... trials (the tail of -1 is empty)
 * @param trials    whole, 0 ... 100000; independent
 * @param chance    chance of a success on each trial, strictly between 0 and 1
 * @returns log P(X <= successes); -Infinity for the empty tail
 * @throws RangeError when an argument is outside its domain
 * @example Math.exp(binomialLogLowerTail(4, 16, evenChance)) // 2517/65536 = 0.0384 ; R: pbinom(4, 16, 0.5)
 * @see binomialLogUpperTail for the method
 */
export function binomialLogLowerTail(successes: number, trials: number, chance: Chance): number {
  requireWhole('trials', trials, 0, mostTrials);
  requireWhole('successes', successes, -1, trials);
  const { right, wrong } = chanceAsNumbers(chance);
  return logTailFrom(trials - successes, trials, wrong, right);
}

/** log P(X >= successes) without checks, for loops that have checked already; `right` and `wrong` add up to 1. */
export function logTailFrom(successes: number, trials: number, right: number, wrong: number): number {
  if (successes <= 0) return 0;
  if (successes > trials) return Number.NEGATIVE_INFINITY;
  if (successes > trials * right) return sumOutwards(successes, trials, right, wrong);
  return logOfComplement(sumOutwards(trials - successes + 1, trials, wrong, right));
}

/** Terms fall from the first on, because it lies beyond the mean; what is below one part in 1e17 cannot be seen. */
function sumOutwards(first: number, trials: number, right: number, wrong: number): number {
  const odds = right / wrong;
  let term = 1;
  let sum = 1;
  for (let successes = first; successes < trials && term > sum * 1e-17; successes++) {
    term *= ((trials - successes) / (successes + 1)) * odds;
    sum += term;
  }
  return logPoint(first, trials, right, wrong) + Math.log(sum);
}
