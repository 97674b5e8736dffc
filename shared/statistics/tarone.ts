import { type Chance, chanceAsNumbers } from './chance.ts';
import { type ListenerScore, pooledScore } from './listener-scores.ts';
import { normalUpperTail } from './normal-tail.ts';

export interface TaroneTest {
  /** Above 0 when listeners differ more than a common rate explains, below 0 when they differ less. */
  readonly z: number;
  /** One-sided, by the normal approximation. */
  readonly p: number;
}

/**
 * Tarone's test of a common rate against the beta-binomial: whether the answers of one listener resemble each other.
 *
 * For listeners with draws of their own, at least one of whom has two trials or more.
 *
 * @param scores one for each listener, at least two
 * @param chance a known rate to measure from, instead of the pooled one
 * @returns z and its upper tail; 0 and one half when all answers are right, or none, at the pooled rate
 * @throws RangeError when an argument is outside its domain, or every listener has one trial
 * @example taroneTest([8, 9, 14, 7, 10, 16, 8, 9, 12, 8].map((successes) => ({ successes, trials: 16 }))).z // 2.5830
 * @see Tarone, "Testing the goodness of fit of the binomial distribution", Biometrika 66 (1979), 585-590
 */
export function taroneTest(scores: readonly ListenerScore[], chance?: Chance): TaroneTest {
  const { trials, rate } = pooledScore(scores, 2);
  const { right, wrong } = chance === undefined ? { right: rate, wrong: 1 - rate } : chanceAsNumbers(chance);
  const pairs = scores.reduce((sum, score) => sum + score.trials * (score.trials - 1), 0);
  if (pairs === 0) throw new RangeError('one listener at least must have two trials or more');
  if (right === 0 || wrong === 0) return { z: 0, p: 0.5 };
  const deviations = scores.reduce((sum, score) => sum + (score.successes - score.trials * right) ** 2, 0);
  const z = (deviations / (right * wrong) - trials) / Math.sqrt(2 * pairs);
  return { z, p: normalUpperTail(z) };
}
