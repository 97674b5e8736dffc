import { type Chance, chanceAsNumbers } from './chance.ts';
import { clopperPearson, clopperPearsonLower, clopperPearsonUpper, type Interval } from './clopper-pearson.ts';
import { requireBetween } from './domain.ts';

/**
 * Abbott's correction: the share of answers above guessing that a rate of right answers amounts to.
 *
 * Zero at the chance level, one when every answer is right, negative below chance. With several answers per listener
 * it is a share of answers, never of people.
 *
 * @param correctRate rate of right answers, 0 ... 1
 * @param chance      chance of a right answer by guessing
 * @returns (correctRate - chance) / (1 - chance), not clipped
 * @throws RangeError when an argument is outside its domain
 * @example aboveGuessingRate(0.75, evenChance) // 0.5
 * @see Abbott, "A method of computing the effectiveness of an insecticide", J. Economic Entomology 18 (1925), 265-267
 */
export function aboveGuessingRate(correctRate: number, chance: Chance): number {
  requireBetween('correctRate', correctRate, 0, 1, 'closed');
  const { right, wrong } = chanceAsNumbers(chance);
  // One third less than one is a hair more than two thirds in doubles; the share of all right is 1.
  return Math.min(1, (correctRate - right) / wrong);
}

/**
 * The rate of right answers that a share above guessing amounts to: the way back.
 *
 * @param rate   share of answers above guessing, from -chance/(1 - chance) to 1
 * @param chance chance of a right answer by guessing
 * @returns chance + rate * (1 - chance)
 * @throws RangeError when an argument is outside its domain
 * @example correctRateOf(0.5, evenChance) // 0.75
 * @see Abbott (1925), as above
 */
export function correctRateOf(rate: number, chance: Chance): number {
  const { right, wrong } = chanceAsNumbers(chance);
  requireBetween('rate', rate, -right / wrong, 1, 'closed');
  return right + rate * wrong;
}

/**
 * An interval of rates of right answers as an interval of shares above guessing.
 *
 * @param interval limits of the rate of right answers, each 0 ... 1
 * @param chance   chance of a right answer by guessing
 * @returns `raw` as it comes, `clipped` with limits below guessing set to 0. A lower limit clipped to 0 does not mean
 *   "no difference": beside a one-sided p stands the one-sided lower limit
 * @throws RangeError when an argument is outside its domain
 * @example intervalAboveGuessing({ lower: 0.4762, upper: 0.9273 }, evenChance) // raw -0.0476 ... 0.8546, clipped from 0
 * @see Abbott (1925), as above
 */
export function intervalAboveGuessing(interval: Interval, chance: Chance): { raw: Interval; clipped: Interval } {
  const raw = {
    lower: aboveGuessingRate(interval.lower, chance),
    upper: aboveGuessingRate(interval.upper, chance),
  };
  return { raw, clipped: { lower: Math.max(0, raw.lower), upper: Math.max(0, raw.upper) } };
}

export interface AboveGuessing {
  readonly rawRate: number;
  /** The raw rate, or 0 where it is negative. */
  readonly rate: number;
  readonly rawInterval: Interval;
  readonly interval: Interval;
  /** One-sided limits at the same confidence, each on its own, clipped at 0. */
  readonly oneSidedLower: number;
  readonly oneSidedUpper: number;
}

/**
 * Share of answers above guessing behind `successes` right in `trials`, with exact limits.
 *
 * @param successes  right answers, whole, 0 ... trials
 * @param trials     answers, whole, 1 ... 100000; independent, one rate
 * @param chance     chance of a right answer by guessing
 * @param confidence strictly between 0 and 1
 * @returns rate, two-sided interval and one-sided limits, raw and clipped at 0
 * @throws RangeError when an argument is outside its domain
 * @example aboveGuessing(12, 16, evenChance, 0.95) // rate 0.5, interval 0 ... 0.8547, one-sided lower 0.0312
 *   ; R: 2 * binom.test(12, 16, alternative = "greater")$conf.int[1] - 1
 * @see Abbott (1925); Clopper & Pearson, Biometrika 26 (1934), 404-413
 */
export function aboveGuessing(successes: number, trials: number, chance: Chance, confidence: number): AboveGuessing {
  const { raw, clipped } = intervalAboveGuessing(clopperPearson(successes, trials, confidence), chance);
  const rawRate = aboveGuessingRate(successes / trials, chance);
  return {
    rawRate,
    rate: Math.max(0, rawRate),
    rawInterval: raw,
    interval: clipped,
    oneSidedLower: Math.max(0, aboveGuessingRate(clopperPearsonLower(successes, trials, confidence), chance)),
    oneSidedUpper: Math.max(0, aboveGuessingRate(clopperPearsonUpper(successes, trials, confidence), chance)),
  };
}
