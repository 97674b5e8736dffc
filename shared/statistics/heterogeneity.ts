import { type Chance, chanceAsNumbers } from './chance.ts';
import { chiSquareUpperTail } from './chi-square-tail.ts';
import { type ListenerScore, pooledScore } from './listener-scores.ts';

export interface Heterogeneity {
  readonly statistic: number;
  readonly degreesOfFreedom: number;
  readonly p: number;
}

/**
 * Whether listeners differ among one another more than a common rate explains: Pearson's chi-square about the pooled
 * rate, on one degree of freedom fewer than there are listeners.
 *
 * By the large-sample approximation, for listeners with draws of their own. From fewer than six listeners nothing
 * follows when it finds nothing.
 *
 * @param scores one for each listener, at least two
 * @returns statistic and p; 0 and 1 when all answers are right, or none
 * @throws RangeError when an argument is outside its domain
 * @example heterogeneity([8, 9, 14, 7, 10, 16, 8, 9, 12, 8].map((successes) => ({ successes, trials: 16 }))).p // 0.0119
 *   ; R: chisq.test(rbind(x, 16 - x), correct = FALSE)
 * @see Pearson, Philosophical Magazine 50 (1900), 157-175; Cochran, "Some methods for strengthening the common chi-square
 *   tests", Biometrics 10 (1954), 417-451
 */
export function heterogeneity(scores: readonly ListenerScore[]): Heterogeneity {
  const { rate } = pooledScore(scores, 2);
  return about(scores, rate, 1 - rate, scores.length - 1);
}

/**
 * The same about the chance of a right answer by guessing, on as many degrees of freedom as there are listeners: sensitive
 * to a panel in which some hear a difference and others do not.
 *
 * @param scores one for each listener, at least one
 * @param chance chance of a right answer by guessing
 * @returns statistic and p
 * @throws RangeError when an argument is outside its domain
 * @example heterogeneityAboutChance([{ successes: 12, trials: 16 }], evenChance).statistic // 4
 * @see heterogeneity
 */
export function heterogeneityAboutChance(scores: readonly ListenerScore[], chance: Chance): Heterogeneity {
  pooledScore(scores, 1);
  const { right, wrong } = chanceAsNumbers(chance);
  return about(scores, right, wrong, scores.length);
}

function about(scores: readonly ListenerScore[], right: number, wrong: number, degreesOfFreedom: number) {
  const statistic = squaredDeviations(scores, right, wrong);
  return { statistic, degreesOfFreedom, p: chiSquareUpperTail(statistic, degreesOfFreedom) };
}

/** Sum of (x - n p)^2 / (n p q); 0 where the rate is 0 or 1, because then nobody deviates. */
function squaredDeviations(scores: readonly ListenerScore[], right: number, wrong: number): number {
  if (right === 0 || wrong === 0) return 0;
  return scores.reduce(
    (sum, { successes, trials }) => sum + (successes - trials * right) ** 2 / (trials * right * wrong),
    0,
  );
}
