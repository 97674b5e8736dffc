import { decimalOfNumber } from './decimal.ts';
import { requireBetween, requireWhole } from './domain.ts';
import type { Fraction } from './fraction.ts';

/**
 * The chance of a right answer by guessing: a ratio of whole numbers, which is exact (1/2, 1/3), or a number strictly
 * between 0 and 1.
 */
export type Chance = number | { readonly numerator: number; readonly denominator: number };

/** Two labels, one of them right: ABX, duo-trio, paired comparison. */
export const evenChance = { numerator: 1, denominator: 2 } as const;

/**
 * A chance and its complement as numbers; a ratio is converted once, so that 1 - 1/3 is the double nearest to 2/3.
 *
 * @param chance a ratio strictly between 0 and 1, or such a number
 * @returns `right` the chance of a right answer, `wrong` that of a wrong one
 * @throws RangeError when the chance is not strictly between 0 and 1
 * @example chanceAsNumbers({ numerator: 1, denominator: 3 }) // right 0.3333333333333333, wrong 0.6666666666666666
 */
export function chanceAsNumbers(chance: Chance): { right: number; wrong: number } {
  if (typeof chance === 'number') {
    requireBetween('chance', chance, 0, 1, 'open');
    return { right: chance, wrong: 1 - chance };
  }
  requireRatio(chance.numerator, chance.denominator);
  return {
    right: chance.numerator / chance.denominator,
    wrong: (chance.denominator - chance.numerator) / chance.denominator,
  };
}

/**
 * A chance as an exact ratio. A number stands for the shortest decimal it prints as.
 *
 * @param chance a ratio strictly between 0 and 1, or such a number
 * @returns the ratio, not reduced
 * @throws RangeError when the chance is not strictly between 0 and 1
 * @example chanceAsFraction(0.1) // 1/10
 */
export function chanceAsFraction(chance: Chance): Fraction {
  if (typeof chance === 'number') {
    requireBetween('chance', chance, 0, 1, 'open');
    return decimalOfNumber(chance);
  }
  requireRatio(chance.numerator, chance.denominator);
  return { numerator: BigInt(chance.numerator), denominator: BigInt(chance.denominator) };
}

function requireRatio(numerator: number, denominator: number): void {
  requireWhole('denominator of the chance', denominator, 2, Number.MAX_SAFE_INTEGER);
  requireWhole('numerator of the chance', numerator, 1, denominator - 1);
}
