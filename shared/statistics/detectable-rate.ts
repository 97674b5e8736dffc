import { logTailFrom } from './binomial-tails.ts';
import { type Chance, chanceAsNumbers } from './chance.ts';
import { criticalCount } from './critical-count.ts';
import { requireBetween } from './domain.ts';

/**
 * The smallest rate of right answers that a test of `trials` answers finds with the power asked for: what a test that
 * found nothing could have found.
 *
 * @param trials      answers, whole, 1 ... 100000; independent
 * @param chance      chance of a right answer by guessing
 * @param alpha       one-sided level, strictly between 0 and 1
 * @param targetPower power asked for, strictly between 0 and 1
 * @returns the rate, or null when the level is out of reach with so few trials
 * @throws RangeError when an argument is outside its domain
 * @example detectableRate(16, evenChance, 0.05, 0.8) // 0.8006 ; R: pbinom(11, 16, 0.8006, lower.tail = FALSE) is 0.800
 * @see power for the test it inverts
 */
export function detectableRate(trials: number, chance: Chance, alpha: number, targetPower: number): number | null {
  requireBetween('targetPower', targetPower, 0, 1, 'open');
  const critical = criticalCount(trials, chance, alpha);
  if (critical === null) return null;
  const logTarget = Math.log(targetPower);
  let low = 0;
  let high = 1;
  for (;;) {
    const middle = low + (high - low) / 2;
    if (middle <= low || middle >= high) return Math.max(middle, chanceAsNumbers(chance).right);
    if (logTailFrom(critical.count, trials, middle, 1 - middle) < logTarget) low = middle;
    else high = middle;
  }
}
