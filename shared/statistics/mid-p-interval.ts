import { logPoint, mostTrials } from './binomial-log-probability.ts';
import { logTailFrom } from './binomial-tails.ts';
import type { Interval } from './clopper-pearson.ts';
import { requireBetween, requireWhole } from './domain.ts';
import { logOfSum } from './log-arithmetic.ts';

/**
 * Mid-P interval for a rate: the Clopper-Pearson interval with the observed count taken half on either side.
 *
 * Narrower than Clopper-Pearson, and at some rates it misses more often than stated; for display beside it, never for
 * a claim.
 *
 * @param successes  whole, 0 ... trials
 * @param trials     whole, 1 ... 100000; independent, one rate
 * @param confidence strictly between 0 and 1, for both sides together
 * @returns the rates at which P(X > k) + P(X = k)/2, and P(X < k) + P(X = k)/2, are (1 - confidence)/2; exactly 0 when
 *   successes = 0, exactly 1 when successes = trials
 * @throws RangeError when an argument is outside its domain
 * @example midPInterval(81, 263, 0.95) // 0.2544, 0.3658 ; Newcombe, Statistics in Medicine 17 (1998), table I
 * @see Lancaster, "Significance tests in discrete distributions", JASA 56 (1961), 223-234;
 *   Berry & Armitage, "Mid-P confidence intervals: a brief review", The Statistician 44 (1995), 417-423
 */
export function midPInterval(successes: number, trials: number, confidence: number): Interval {
  requireWhole('trials', trials, 1, mostTrials);
  requireWhole('successes', successes, 0, trials);
  requireBetween('confidence', confidence, 0, 1, 'open');
  const logTail = Math.log((1 - confidence) / 2);
  return {
    lower: lowerLimit(successes, trials, logTail),
    upper: 1 - lowerLimit(trials - successes, trials, logTail),
  };
}

/** The mid tail rises with the rate, as the tail does. */
function lowerLimit(successes: number, trials: number, logTail: number): number {
  if (successes === 0) return 0;
  let low = 0;
  let high = 1;
  for (;;) {
    const middle = low + (high - low) / 2;
    if (middle <= low || middle >= high) return middle;
    const beyond = logTailFrom(successes + 1, trials, middle, 1 - middle);
    const half = logPoint(successes, trials, middle, 1 - middle) - Math.LN2;
    if (logOfSum(beyond, half) < logTail) low = middle;
    else high = middle;
  }
}
