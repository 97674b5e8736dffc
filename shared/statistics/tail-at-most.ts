import { logTailFrom } from './binomial-tails.ts';
import { type Chance, chanceAsFraction, chanceAsNumbers } from './chance.ts';
import { decimalOfNumber } from './decimal.ts';
import { exactBinomialUpperTail } from './exact-binomial.ts';
import { compareFractions } from './fraction.ts';

/** Logarithms closer than this may differ by rounding alone. */
const nearTie = 1e-9;

/** Whole numbers of more bits than this take seconds; nobody meets an exact tie there. */
const mostBits = 4_000_000;

/**
 * Whether the chance of at least `successes` by guessing is at most `alpha`, with ties decided in whole numbers.
 *
 * A level is the decimal it is written as: two right of two at chance 1/10 reach level 0.01, which a calculation in
 * doubles denies because 0.1 * 0.1 comes out as 0.010000000000000002.
 *
 * @param successes right answers, whole, 0 ... trials + 1
 * @param trials    answers, whole, 0 ... 100000
 * @param chance    chance of a right answer by guessing
 * @param alpha     level, strictly between 0 and 1
 * @returns true when P(X >= successes) <= alpha
 * @throws RangeError from the exact sum, when an argument is outside its domain
 * @example isUpperTailAtMost(4, 4, evenChance, 0.0625) // true: 1/16 = 0.0625
 */
export function isUpperTailAtMost(successes: number, trials: number, chance: Chance, alpha: number): boolean {
  const { right, wrong } = chanceAsNumbers(chance);
  const difference = logTailFrom(successes, trials, right, wrong) - Math.log(alpha);
  if (Math.abs(difference) > nearTie) return difference < 0;
  const bits = trials * Math.log2(Number(chanceAsFraction(chance).denominator));
  if (bits > mostBits) return difference <= 0;
  return compareFractions(exactBinomialUpperTail(successes, trials, chance), decimalOfNumber(alpha)) <= 0;
}
