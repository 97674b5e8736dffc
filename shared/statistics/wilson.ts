import { mostTrials } from './binomial-log-probability.ts';
import type { Interval } from './clopper-pearson.ts';
import { requireBetween, requireWhole } from './domain.ts';
import { normalQuantile } from './normal-quantile.ts';

/**
 * Wilson's score interval for a rate: close to its nominal coverage on average, so it draws well in a chart.
 *
 * For display only. It may miss more often than stated at single rates; claims use the Clopper-Pearson interval.
 *
 * @param successes  whole, 0 ... trials
 * @param trials     whole, 1 ... 100000; independent, one rate
 * @param confidence from 0.000001 to 0.999999999, for both sides together
 * @returns lower and upper limit; exactly 0 when successes = 0, exactly 1 when successes = trials
 * @throws RangeError when an argument is outside its domain
 * @example wilsonInterval(81, 263, 0.95) // 0.2553, 0.3662 ; Newcombe, Statistics in Medicine 17 (1998), table I
 * @see Wilson, "Probable inference, the law of succession, and statistical inference", JASA 22 (1927), 209-212
 */
export function wilsonInterval(successes: number, trials: number, confidence: number): Interval {
  requireWhole('trials', trials, 1, mostTrials);
  requireWhole('successes', successes, 0, trials);
  requireBetween('confidence', confidence, 1e-6, 1 - 1e-9, 'closed');
  const z = normalQuantile(0.5 + confidence / 2);
  const rate = successes / trials;
  const shrink = 1 + (z * z) / trials;
  const centre = (rate + (z * z) / (2 * trials)) / shrink;
  const reach = (z / shrink) * Math.sqrt((rate * (1 - rate)) / trials + (z * z) / (4 * trials * trials));
  return {
    lower: successes === 0 ? 0 : centre - reach,
    upper: successes === trials ? 1 : centre + reach,
  };
}
