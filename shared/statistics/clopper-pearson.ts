import { mostTrials } from './binomial-log-probability.ts';
import { logTailFrom } from './binomial-tails.ts';
import { requireBetween, requireWhole } from './domain.ts';

/** Two limits of a rate, each between 0 and 1. */
export interface Interval {
  readonly lower: number;
  readonly upper: number;
}

/**
 * Interval for the rate behind `successes` in `trials` that misses it at most (1 - confidence)/2 of the time on each side.
 *
 * @param successes  whole, 0 ... trials
 * @param trials     whole, 1 ... 100000; independent, one rate
 * @param confidence strictly between 0 and 1, for both sides together
 * @returns lower and upper limit; exactly 0 when successes = 0, exactly 1 when successes = trials
 * @throws RangeError when an argument is outside its domain
 * @example clopperPearson(12, 16, 0.95) // 0.4762, 0.9273 ; R: binom.test(12, 16)$conf.int
 * @see Clopper & Pearson, "The use of confidence or fiducial limits illustrated in the case of the binomial",
 *   Biometrika 26 (1934), 404-413
 */
export function clopperPearson(successes: number, trials: number, confidence: number): Interval {
  requireBetween('confidence', confidence, 0, 1, 'open');
  const tail = (1 - confidence) / 2;
  return { lower: lowerLimit(successes, trials, tail), upper: upperLimit(successes, trials, tail) };
}

/**
 * One-sided lower limit of a rate: the dual of the one-sided test that asks for more right answers than guessing gives.
 *
 * @param successes  whole, 0 ... trials
 * @param trials     whole, 1 ... 100000; independent, one rate
 * @param confidence strictly between 0 and 1, all on one side
 * @returns the rate at which P(X >= successes) = 1 - confidence; exactly 0 when successes = 0
 * @throws RangeError when an argument is outside its domain
 * @example clopperPearsonLower(12, 16, 0.95) // 0.5156 ; R: binom.test(12, 16, alternative = "greater")$conf.int[1]
 * @see Clopper & Pearson (1934), as above
 */
export function clopperPearsonLower(successes: number, trials: number, confidence: number): number {
  requireBetween('confidence', confidence, 0, 1, 'open');
  return lowerLimit(successes, trials, 1 - confidence);
}

/**
 * One-sided upper limit of a rate: what a test that found nothing has not excluded.
 *
 * @param successes  whole, 0 ... trials
 * @param trials     whole, 1 ... 100000; independent, one rate
 * @param confidence strictly between 0 and 1, all on one side
 * @returns the rate at which P(X <= successes) = 1 - confidence; exactly 1 when successes = trials
 * @throws RangeError when an argument is outside its domain
 * @example clopperPearsonUpper(8, 16, 0.95) // 0.7214 ; R: binom.test(8, 16, alternative = "less")$conf.int[2]
 * @see Clopper & Pearson (1934), as above
 */
export function clopperPearsonUpper(successes: number, trials: number, confidence: number): number {
  requireBetween('confidence', confidence, 0, 1, 'open');
  return upperLimit(successes, trials, 1 - confidence);
}

/** The upper limit of the successes is what the lower limit of the failures leaves. */
function upperLimit(successes: number, trials: number, tail: number): number {
  return 1 - lowerLimit(trials - successes, trials, tail);
}

/** The tail rises with the rate, so halving the bracket until no double lies between its ends finds the limit. */
function lowerLimit(successes: number, trials: number, tail: number): number {
  requireWhole('trials', trials, 1, mostTrials);
  requireWhole('successes', successes, 0, trials);
  if (successes === 0) return 0;
  const logTail = Math.log(tail);
  if (successes === trials) return Math.exp(logTail / trials);
  let low = 0;
  let high = 1;
  for (;;) {
    const middle = low + (high - low) / 2;
    if (middle <= low || middle >= high) return middle;
    if (logTailFrom(successes, trials, middle, 1 - middle) < logTail) low = middle;
    else high = middle;
  }
}
