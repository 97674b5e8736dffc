import { mostTrials } from './binomial-log-probability.ts';
import { logTailFrom } from './binomial-tails.ts';
import { type Chance, chanceAsNumbers } from './chance.ts';
import { requireBetween, requireWhole } from './domain.ts';
import { isUpperTailAtMost } from './tail-at-most.ts';

export interface SampleSizeQuestion {
  /** Chance of a right answer by guessing. */
  readonly chance: Chance;
  /** One-sided level, strictly between 0 and 1. */
  readonly alpha: number;
  /** True rate of right answers to be found, above the chance and below 1. */
  readonly correctRate: number;
  /** Power asked for, strictly between 0 and 1. */
  readonly targetPower: number;
  /** Largest number of trials to consider, whole, 1 ... 100000. */
  readonly limit: number;
}

export interface SampleSize {
  /** Smallest number of trials with the power asked for; null when none up to the limit has it. */
  readonly nFirst: number | null;
  /** Smallest number such that it and every larger one have the power; null when the limit is too low to show that. */
  readonly nSafe: number | null;
  readonly powerAtFirst: number | null;
  readonly powerAtSafe: number | null;
  /** From this number of trials on the power is guaranteed by a bound, without a search. */
  readonly guaranteedFrom: number;
}

/**
 * How many trials a test needs.
 *
 * Every number of trials is tried, because power goes up and down like a saw: halving an interval would miss teeth.
 * The search ends where Hoeffding's bound takes over: from n = ((a + b) / (correctRate - chance))^2 on, with
 * a = sqrt(ln(1/alpha)/2) and b = sqrt(ln(1/(1 - targetPower))/2), the critical count lies below chance*n + a*sqrt(n) + 1
 * and the listener's count above correctRate*n - b*sqrt(n) often enough. So "every larger number" is meant literally.
 *
 * @param question chance, level, rate to be found, power asked for and limit of the search
 * @returns the two numbers, the power at each, and where the bound takes over
 * @throws RangeError when an argument is outside its domain
 * @example sampleSize({ chance: evenChance, alpha: 0.05, correctRate: 0.75, targetPower: 0.8, limit: 1000 })
 *   // nFirst 23, nSafe 28 ; R: exhaustive search with pbinom
 * @see Hoeffding, "Probability inequalities for sums of bounded random variables", JASA 58 (1963), 13-30, theorem 1;
 *   Chernick & Liu, "The saw-toothed behavior of power versus sample size", American Statistician 56 (2002), 149-155
 */
export function sampleSize(question: SampleSizeQuestion): SampleSize {
  const { correctRate } = question;
  return searchSampleSize(question, (critical, trials) =>
    Math.exp(logTailFrom(critical, trials, correctRate, 1 - correctRate)),
  );
}

/**
 * The search behind sampleSize, for a test that reaches its level at the critical count of `alpha` on one side.
 *
 * @param question as for sampleSize
 * @param powerAt  the test's power with that critical count and number of trials, at least that of the one side
 * @returns as sampleSize
 * @throws RangeError when an argument is outside its domain
 */
export function searchSampleSize(
  question: SampleSizeQuestion,
  powerAt: (critical: number, trials: number) => number,
): SampleSize {
  const { chance, alpha, correctRate, targetPower, limit } = question;
  const { right } = chanceAsNumbers(chance);
  requireBetween('alpha', alpha, 0, 1, 'open');
  requireBetween('correctRate', correctRate, right, 1, 'open');
  requireBetween('targetPower', targetPower, 0, 1, 'open');
  requireWhole('limit', limit, 1, mostTrials);

  const bounds = Math.sqrt(-Math.log(alpha) / 2) + Math.sqrt(-Math.log1p(-targetPower) / 2);
  const guaranteedFrom = Math.ceil((bounds / (correctRate - right)) ** 2);
  const searchTo = Math.min(limit, guaranteedFrom);

  let first: { trials: number; power: number } | null = null;
  let safe: { trials: number; power: number } | null = null;
  let critical = 1;
  for (let trials = 1; trials <= searchTo; trials++) {
    // One trial more never lowers the critical count and raises it by at most one.
    if (!isUpperTailAtMost(critical, trials, chance, alpha)) critical++;
    const power = powerAt(critical, trials);
    if (power < targetPower) safe = null;
    else {
      first ??= { trials, power };
      safe ??= { trials, power };
    }
  }
  const shown = guaranteedFrom <= limit ? safe : null;
  return {
    nFirst: first?.trials ?? null,
    nSafe: shown?.trials ?? null,
    powerAtFirst: first?.power ?? null,
    powerAtSafe: shown?.power ?? null,
    guaranteedFrom,
  };
}
