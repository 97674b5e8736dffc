import { mostTrials } from './binomial-log-probability.ts';
import { clopperPearson, type Interval } from './clopper-pearson.ts';
import { requireWhole } from './domain.ts';
import {
  correctRateAt,
  dPrimeAt,
  dPrimeLimits,
  matchingByDistance,
  matchingByMidpoint,
  type Psychometric,
} from './psychometric.ts';

/**
 * How a listener is supposed to decide in ABX: by which of A and B lies nearer to X (differencing), or by which side
 * of the midpoint X falls, having put A and B in order (independent observation).
 */
export type AbxModel = 'differencing' | 'independent';

const rules: Record<AbxModel, Psychometric> = { differencing: matchingByDistance, independent: matchingByMidpoint };

/**
 * Rate of right answers that a listener of sensitivity d′ reaches in ABX.
 *
 * One dimension, unit-variance normal percepts, no bias. With a = d′/√2 and b = d′/√6 (differencing) or d′/2
 * (independent observation) the rate is Φ(a)Φ(b) + Φ(-a)Φ(-b) = 1/2 + 2 (Φ(a) - 1/2)(Φ(b) - 1/2).
 *
 * @param dPrime sensitivity, at least 0
 * @param model  supposed way of deciding; there is no default, both are reported
 * @returns between 1/2 and 1
 * @throws RangeError when dPrime is negative or not finite
 * @example abxCorrectRate(2, 'differencing') // 0.7468 ; R: a <- pnorm(2/sqrt(2)); b <- pnorm(2/sqrt(6)); a*b + (1-a)*(1-b)
 * @see Macmillan, Kaplan & Creelman, "The psychophysics of categorical perception", Psychological Review 84 (1977), 452-471;
 *   Hautus & Meng, "Decision strategies in the ABX (matching-to-sample) psychophysical task",
 *   Perception & Psychophysics 64 (2002), 89-106
 */
export function abxCorrectRate(dPrime: number, model: AbxModel): number {
  return correctRateAt(rules[model], dPrime);
}

/**
 * Sensitivity d′ of a listener who is right at `correctRate` in ABX: the inverse of abxCorrectRate.
 *
 * @param correctRate rate of right answers, 0 ... 1
 * @param model       supposed way of deciding
 * @returns d′; 0 at and below one half, Infinity at 1
 * @throws RangeError when correctRate is outside 0 ... 1
 * @example abxDPrime(0.75, 'differencing') // 2.0200 ; R: uniroot of the above
 * @see as for abxCorrectRate
 */
export function abxDPrime(correctRate: number, model: AbxModel): number {
  return dPrimeAt(rules[model], correctRate);
}

export interface DPrimeEstimate {
  readonly dPrime: number;
  /** Clopper-Pearson limits of the rate, taken through the inverse; never below 0, Infinity when all are right. */
  readonly interval: Interval;
}

/**
 * Sensitivity behind `successes` right in `trials` of ABX, with exact limits.
 *
 * Near guessing the rate grows with the square of d′, so small numbers of trials fix d′ badly: the interval says so.
 * With free replay the sensitivity per presentation is not identified; report it as effective d′ per trial.
 *
 * @param successes  right answers, whole, 0 ... trials
 * @param trials     answers, whole, 1 ... 100000; independent
 * @param confidence strictly between 0 and 1, for both sides together
 * @param model      supposed way of deciding
 * @returns d′ and its limits
 * @throws RangeError when an argument is outside its domain
 * @example abxDPrimeEstimate(30, 50, 0.95, 'differencing') // 1.12, interval 0 ... 1.93
 * @see Brockhoff & Christensen, "Thurstonian models for sensory discrimination tests as generalized linear models",
 *   Food Quality and Preference 21 (2010), 330-338
 */
export function abxDPrimeEstimate(
  successes: number,
  trials: number,
  confidence: number,
  model: AbxModel,
): DPrimeEstimate {
  requireWhole('trials', trials, 1, mostTrials);
  requireWhole('successes', successes, 0, trials);
  return {
    dPrime: abxDPrime(successes / trials, model),
    interval: abxDPrimeInterval(clopperPearson(successes, trials, confidence), model),
  };
}

/**
 * Limits of the rate of right answers as limits of d′.
 *
 * @param interval limits of the rate, each 0 ... 1
 * @param model    supposed way of deciding
 * @returns limits of d′, from 0 to Infinity
 * @throws RangeError when a limit is outside 0 ... 1
 * @example abxDPrimeInterval({ lower: 0.5, upper: 1 }, 'independent') // 0, Infinity
 */
export function abxDPrimeInterval(interval: Interval, model: AbxModel): Interval {
  return dPrimeLimits(rules[model], interval);
}
