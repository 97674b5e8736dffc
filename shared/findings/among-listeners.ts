import { z } from 'zod';
import { betaBinomialFit } from '../statistics/beta-binomial.ts';
import type { Chance } from '../statistics/chance.ts';
import { criticalCount } from '../statistics/critical-count.ts';
import { heterogeneity, heterogeneityAboutChance } from '../statistics/heterogeneity.ts';
import { listenerClusterInterval } from '../statistics/listener-cluster-interval.ts';
import { prevalence } from '../statistics/prevalence.ts';
import { taroneTest } from '../statistics/tarone.ts';
import type { ListenerResult } from './forced-choice-result.ts';
import { recordDecimal } from './record-decimal.ts';
import { count, decimal } from './result-frame.ts';

const tested = z.strictObject({ statistic: decimal, degreesOfFreedom: count, tail: decimal });

/** How listeners differ from one another, where each of them had draws of their own. It decides nothing. */
export const amongListeners = z.strictObject({
  /** Chi-square about the pooled rate, and about chance. */
  aboutPooled: tested,
  aboutChance: tested,
  tarone: z.strictObject({ z: decimal, tail: decimal }).nullable(),
  betaBinomial: z.strictObject({ rate: decimal, correlation: decimal, tail: decimal }),
  /** Variance of the rate over that of as many independent answers; null where all answers are right, or none. */
  designEffect: decimal.nullable(),
  /** Listeners significant on their own and what that bounds from below; null where they had different numbers of answers. */
  prevalence: z
    .strictObject({ significant: count, size: decimal, estimate: decimal, lowerLimit: decimal, confidence: decimal })
    .nullable(),
});
export type AmongListeners = z.output<typeof amongListeners>;

const confidence = 0.95;

/**
 * How the listeners of a study with own draws differ.
 *
 * @param byListener each listener's own result; those without an answer due are left out
 * @param chance     chance of a right answer by guessing
 * @param alpha      the registered level
 * @returns null with fewer than two listeners
 * @see heterogeneity, taroneTest, betaBinomialFit, listenerClusterInterval and prevalence for the sources
 */
export function amongListenersOf(
  byListener: readonly ListenerResult[],
  chance: Chance,
  alpha: number,
): AmongListeners | null {
  const scores = byListener
    .filter(({ answers }) => answers > 0)
    .map(({ correct, answers }) => ({ successes: correct, trials: answers }));
  if (scores.length < 2) return null;
  const record = ({ statistic, degreesOfFreedom, p }: ReturnType<typeof heterogeneity>) => ({
    statistic: recordDecimal(statistic),
    degreesOfFreedom,
    tail: recordDecimal(p),
  });
  const tarone = scores.some(({ trials }) => trials > 1) ? taroneTest(scores) : null;
  const fit = betaBinomialFit(scores);
  const { designEffect } = listenerClusterInterval(scores, confidence);
  return {
    aboutPooled: record(heterogeneity(scores)),
    aboutChance: record(heterogeneityAboutChance(scores, chance)),
    tarone: tarone && { z: recordDecimal(tarone.z), tail: recordDecimal(tarone.p) },
    betaBinomial: {
      rate: recordDecimal(fit.rate),
      correlation: recordDecimal(fit.correlation),
      tail: recordDecimal(fit.p),
    },
    designEffect: designEffect === null ? null : recordDecimal(designEffect),
    prevalence: prevalenceOf(scores, chance, alpha),
  };
}

function prevalenceOf(
  scores: readonly { successes: number; trials: number }[],
  chance: Chance,
  alpha: number,
): AmongListeners['prevalence'] {
  const trials = scores[0]?.trials ?? 0;
  const critical = scores.every((score) => score.trials === trials) ? criticalCount(trials, chance, alpha) : null;
  if (critical === null) return null;
  const significant = scores.filter(({ successes }) => successes >= critical.count).length;
  const { estimate, lowerLimit } = prevalence(significant, scores.length, critical.attainedSize, confidence);
  return {
    significant,
    size: recordDecimal(critical.attainedSize),
    estimate: recordDecimal(estimate),
    lowerLimit: recordDecimal(lowerLimit),
    confidence: recordDecimal(confidence),
  };
}
