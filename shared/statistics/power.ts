import { binomialLogUpperTail } from './binomial-tails.ts';
import type { Chance } from './chance.ts';
import { type CriticalCount, criticalCount } from './critical-count.ts';
import { requireBetween } from './domain.ts';

export interface Power {
  /** What has to be reached, or null when the level is out of reach with so few trials. */
  readonly critical: CriticalCount | null;
  /** Chance that the test finds the difference; 0 when the level is out of reach. */
  readonly power: number;
}

/**
 * Chance that a test of `trials` answers finds a listener who is right at `correctRate`.
 *
 * The critical count is found anew for every number of trials. Because counts are whole, power does not rise with
 * every trial: 20 trials find a listener who is right 60 % of the time less often than 16 do.
 *
 * @param trials      answers, whole, 1 ... 100000; independent, one listener or draws of their own for each
 * @param chance      chance of a right answer by guessing
 * @param alpha       one-sided level, strictly between 0 and 1
 * @param correctRate true rate of right answers, strictly between 0 and 1
 * @returns the critical count in force and the power
 * @throws RangeError when an argument is outside its domain
 * @example power(16, evenChance, 0.05, 0.6).power // 0.1666 ; R: pbinom(11, 16, 0.6, lower.tail = FALSE)
 *   ; Leventhal, J. Audio Eng. Soc. 34 (1986), 437-453: missed with probability 0.8334
 * @see Cohen, Statistical Power Analysis for the Behavioral Sciences, 2nd ed. (1988), ch. 5
 */
export function power(trials: number, chance: Chance, alpha: number, correctRate: number): Power {
  requireBetween('correctRate', correctRate, 0, 1, 'open');
  const critical = criticalCount(trials, chance, alpha);
  if (critical === null) return { critical, power: 0 };
  return { critical, power: Math.exp(binomialLogUpperTail(critical.count, trials, correctRate)) };
}
