import { binomialLogUpperTail } from './binomial-tails.ts';
import { evenChance } from './chance.ts';
import { type CriticalCount, criticalCount } from './critical-count.ts';
import { requireBetween, requireWhole } from './domain.ts';
import { exactBinomialUpperTail } from './exact-binomial.ts';
import { compareFractions, type Fraction, reduceFraction } from './fraction.ts';
import type { Power } from './power.ts';
import { type SampleSize, searchSampleSize } from './sample-size.ts';

// The two-sided binomial test at chance 1/2: it is symmetric, so least likelihood is twice the smaller tail.

const one: Fraction = { numerator: 1n, denominator: 1n };

/**
 * Chance that `trials` fair coins fall at least as unevenly as `successes` to the rest, on either side, as an exact
 * fraction.
 *
 * At chance 1/2 the two-sided p by least likelihood is twice the smaller tail, and 1 at an even split.
 *
 * @param successes whole, 0 ... trials
 * @param trials    whole, 0 ... 100000; independent
 * @returns the fraction in lowest terms; 1 without any trial
 * @throws RangeError when an argument is outside its domain
 * @example exactTwoSidedEven(12, 15) // 9/256 = 0.0352 ; R: binom.test(12, 15)$p.value
 * @see binomialTest for the same by least likelihood at any chance, and its sources
 */
export function exactTwoSidedEven(successes: number, trials: number): Fraction {
  requireWhole('trials', trials, 0, 100_000);
  requireWhole('successes', successes, 0, trials);
  const { numerator, denominator } = exactBinomialUpperTail(
    Math.max(successes, trials - successes),
    trials,
    evenChance,
  );
  const both = reduceFraction({ numerator: 2n * numerator, denominator });
  return compareFractions(both, one) > 0 ? one : both;
}

/**
 * How many of `trials` answers must prefer the same cable before indifference is an unlikely explanation.
 *
 * @param trials answers that prefer one, whole, 1 ... 100000
 * @param alpha  two-sided level, strictly between 0 and 1
 * @returns the count for either side and the size of both tails, or null when the level is out of reach
 * @throws RangeError when an argument is outside its domain
 * @example twoSidedCriticalCount(16, 0.05) // { count: 13, attainedSize: 0.0213 } ; R: binom.test(13, 16)$p.value
 * @see criticalCount, of which this is the count at half the level
 */
export function twoSidedCriticalCount(trials: number, alpha: number): CriticalCount | null {
  requireBetween('alpha', alpha, 0, 1, 'open');
  const critical = criticalCount(trials, evenChance, alpha / 2);
  return critical && { count: critical.count, attainedSize: 2 * critical.attainedSize };
}

/** Chance of at least `critical` on one side or the other, when each answer falls on the first at `rate`. */
function powerAt(critical: number, trials: number, rate: number): number {
  return (
    Math.exp(binomialLogUpperTail(critical, trials, rate)) + Math.exp(binomialLogUpperTail(critical, trials, 1 - rate))
  );
}

/**
 * Chance that the two-sided test of `trials` answers finds a preference of `rate`, on whichever side.
 *
 * @param trials answers that prefer one, whole, 1 ... 100000; independent
 * @param alpha  two-sided level, strictly between 0 and 1
 * @param rate   true share of answers for one cable, strictly between 0 and 1
 * @returns the critical count in force and the power
 * @throws RangeError when an argument is outside its domain
 * @example twoSidedPower(16, 0.05, 0.7).power // 0.2459
 *   ; R: pbinom(12, 16, .7, lower.tail = FALSE) + pbinom(3, 16, .7)
 * @see power for its one-sided sister and the source
 */
export function twoSidedPower(trials: number, alpha: number, rate: number): Power {
  requireBetween('rate', rate, 0, 1, 'open');
  const critical = twoSidedCriticalCount(trials, alpha);
  return { critical, power: critical === null ? 0 : powerAt(critical.count, trials, rate) };
}

/**
 * How many answers the two-sided test needs; every number is tried, as for sampleSize.
 *
 * @param question two-sided level, share to be found (above 1/2), power asked for and limit of the search
 * @returns as sampleSize
 * @throws RangeError when an argument is outside its domain
 * @example twoSidedSampleSize({ alpha: 0.05, rate: 0.7, targetPower: 0.8, limit: 1000 }) // nFirst 49, nSafe 54
 *   ; R: exhaustive search with pbinom
 * @see sampleSize for the bound and its sources; at half the level it holds for one side, so it does for both
 */
export function twoSidedSampleSize(question: {
  readonly alpha: number;
  readonly rate: number;
  readonly targetPower: number;
  readonly limit: number;
}): SampleSize {
  const { alpha, rate, targetPower, limit } = question;
  requireBetween('alpha', alpha, 0, 1, 'open');
  return searchSampleSize(
    { chance: evenChance, alpha: alpha / 2, correctRate: rate, targetPower, limit },
    (critical, trials) => (critical > trials ? 0 : powerAt(critical, trials, rate)),
  );
}
