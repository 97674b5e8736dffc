import { mostTrials } from './binomial-log-probability.ts';
import { type Chance, chanceAsFraction } from './chance.ts';
import { requireWhole } from './domain.ts';
import type { Fraction } from './fraction.ts';

/**
 * Chance of at least `successes` right answers in `trials` guesses, as an exact fraction.
 *
 * Sums C(trials, k) a^k (b - a)^(trials - k) over b^trials in whole numbers, for a chance of a/b; nothing is rounded.
 * Of the two tails the shorter is summed; taking it from the whole is exact here.
 *
 * @param successes right answers, whole, 0 ... trials + 1
 * @param trials    answers given, whole, 0 ... 100000; independent under the null
 * @param chance    chance of a right answer by guessing; for 1/2 the denominator is 2^trials
 * @returns P(X >= successes); the fraction is not reduced
 * @throws RangeError when an argument is outside its domain
 * @example exactBinomialUpperTail(9, 12, evenChance) // 299/4096 = 0.0730 ; R: pbinom(8, 12, 0.5, lower.tail = FALSE)
 * @see Feller, An Introduction to Probability Theory and Its Applications, vol. 1, 3rd ed. (1968), ch. VI
 */
export function exactBinomialUpperTail(successes: number, trials: number, chance: Chance): Fraction {
  requireWhole('trials', trials, 0, mostTrials);
  requireWhole('successes', successes, 0, trials + 1);
  const { numerator: right, denominator } = chanceAsFraction(chance);
  const wrong = denominator - right;
  const whole = denominator ** BigInt(trials);
  const failures = trials - successes;
  const numerator =
    failures <= successes
      ? sumOfTerms(failures, trials, right, wrong)
      : whole - sumOfTerms(successes - 1, trials, wrong, right);
  return { numerator, denominator: whole };
}

/** Sum over j = 0 ... most of C(trials, j) other^j usual^(trials - j); each term follows from the one before. */
function sumOfTerms(most: number, trials: number, usual: bigint, other: bigint): bigint {
  if (most < 0) return 0n;
  let term = usual ** BigInt(trials);
  let sum = term;
  for (let j = 1; j <= most; j++) {
    term = (term * BigInt(trials - j + 1) * other) / (BigInt(j) * usual);
    sum += term;
  }
  return sum;
}
