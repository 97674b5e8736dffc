import { logPoint, mostTrials } from './binomial-log-probability.ts';
import { logTailFrom } from './binomial-tails.ts';
import { type Chance, chanceAsNumbers } from './chance.ts';
import { requireWhole } from './domain.ts';

/** Beta distribution of the rate before the data; (1, 1) is uniform, (2, 2) leans to the middle. */
export interface BetaPrior {
  /** Whole, 1 ... 1000. */
  readonly a: number;
  /** Whole, 1 ... 1000. */
  readonly b: number;
}

/** Cut off at the chance this is uniform on the share of answers above guessing. */
export const uniformPrior: BetaPrior = { a: 1, b: 1 };

/** Shown beside the uniform one, so that the reader sees how much the prior matters. */
export const middlePrior: BetaPrior = { a: 2, b: 2 };

export interface BayesFactor {
  /** Natural logarithm of the evidence for a rate spread over 0 ... 1 against guessing. */
  readonly logFactor: number;
  /** The same for a rate spread over chance ... 1: the prior cut off at the chance. */
  readonly logFactorAbove: number;
}

/**
 * How many times better the data are explained by a rate drawn from a prior than by guessing.
 *
 * Whole parameters make every beta function a binomial coefficient and every incomplete one a binomial tail, so both
 * come from the sums that the tests use, in logarithms. Quoted with its prior; it never replaces the registered rule.
 *
 * @param successes right answers, whole, 0 ... trials
 * @param trials    answers, whole, 0 ... 98000; independent
 * @param chance    chance of a right answer by guessing
 * @param prior     Beta(a, b) of the rate, a and b whole
 * @returns logarithms of both factors; negative where guessing explains the data better
 * @throws RangeError when an argument is outside its domain
 * @example Math.exp(bayesFactor(12, 16, evenChance, uniformPrior).logFactorAbove) // 4.1324
 *   ; R: 2^16 * beta(13, 5) * pbeta(.5, 13, 5, lower.tail = FALSE) / .5
 * @see Kass & Raftery, "Bayes factors", JASA 90 (1995), 773-795
 */
export function bayesFactor(successes: number, trials: number, chance: Chance, prior: BetaPrior): BayesFactor {
  requireWhole('trials', trials, 0, mostTrials - 2000);
  requireWhole('successes', successes, 0, trials);
  requireWhole('a', prior.a, 1, 1000);
  requireWhole('b', prior.b, 1, 1000);
  const { right, wrong } = chanceAsNumbers(chance);
  const posterior = { a: prior.a + successes, b: prior.b + trials - successes };
  const logFactor = logWeight(posterior, right, wrong) - logWeight(prior, right, wrong);
  const logShareAbove = logAbove(posterior, right, wrong) - logAbove(prior, right, wrong);
  return { logFactor, logFactorAbove: logFactor + logShareAbove };
}

/** log of B(a, b) / (right^(a-1) wrong^(b-1)), from 1/B(a, b) = (a + b - 1) C(a + b - 2, a - 1). */
function logWeight({ a, b }: BetaPrior, right: number, wrong: number): number {
  return -Math.log(a + b - 1) - logPoint(a - 1, a + b - 2, right, wrong);
}

/** log of the share of Beta(a, b) above the chance: that of fewer than a successes in a + b - 1. */
function logAbove({ a, b }: BetaPrior, right: number, wrong: number): number {
  return logTailFrom(b, a + b - 1, wrong, right);
}
