import { betaBinomialFit } from '#shared/statistics/beta-binomial.ts';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { heterogeneity, heterogeneityAboutChance } from '#shared/statistics/heterogeneity.ts';
import { listenerClusterInterval } from '#shared/statistics/listener-cluster-interval.ts';
import { pooledScore } from '#shared/statistics/listener-scores.ts';
import { prevalence } from '#shared/statistics/prevalence.ts';
import { trialClusterInterval, twoWayClusterInterval } from '#shared/statistics/shared-cluster-interval.ts';
import { studentTQuantile } from '#shared/statistics/student-t-quantile.ts';
import { taroneTest } from '#shared/statistics/tarone.ts';
import type { Mapping } from './check-records.ts';
import { chanceOf, of, pair } from './inputs.ts';

/** Functions of the check values about several listeners with draws of their own. */
export const listenerMappings: { readonly [fn: string]: Mapping } = {
  replicatedListeners: of<{ x: number[]; n: number[]; p0: number }>(({ x, n, p0 }) => {
    const scores = x.map((successes, index) => ({ successes, trials: n[index] ?? 0 }));
    const { successes, trials, rate } = pooledScore(scores, 1);
    const among = heterogeneity(scores);
    const aboutChance = heterogeneityAboutChance(scores, chanceOf(p0));
    const tarone = taroneTest(scores);
    const fit = betaBinomialFit(scores);
    const clusters = listenerClusterInterval(scores, 0.95);
    return {
      relative: {
        pooled: rate,
        pooledUpperP: binomialTest(successes, trials, chanceOf(p0), 'greater').p,
        taroneP: tarone.p,
        chisqHeterogeneityP: among.p,
        chisqAgainstChanceP: aboutChance.p,
        lrtPBoundary: fit.p,
      },
      scaled: {
        taroneZ: tarone.z,
        taroneZknownP0: taroneTest(scores, chanceOf(p0)).z,
        chisqHeterogeneity: among.statistic,
        chisqAgainstChance: aboutChance.statistic,
        binomialLogLik: fit.logLikelihoodCommon,
        betaBinomialLogLik: fit.logLikelihood,
        betaBinomialMu: fit.rate,
        betaBinomialRho: fit.correlation,
        lrtStatistic: fit.statistic,
        clusterSe: clusters.standardError,
        designEffect: clusters.designEffect,
        effectiveN: clusters.effectiveAnswers,
        clusterTInterval95: pair(clusters.tInterval),
      },
      exact: {
        chisqHeterogeneityDf: among.degreesOfFreedom,
        chisqAgainstChanceDf: aboutChance.degreesOfFreedom,
      },
    };
  }),

  sharedClusters: of<{ right: (0 | 1 | null)[][]; conf: number }>(({ right, conf }) => {
    const answers = right.flatMap((row, trial) =>
      row.flatMap((value, listener) =>
        value === null ? [] : [{ listener: `L${listener}`, trial: `${trial}`, isRight: value === 1 }],
      ),
    );
    const byTrial = trialClusterInterval(answers, conf);
    const twoWay = twoWayClusterInterval(answers, conf);
    return {
      relative: { rate: byTrial.rate },
      scaled: {
        seTrial: byTrial.standardError,
        trialInterval: byTrial.interval && pair(byTrial.interval),
        seTwoWay: twoWay.standardError,
        twoWayInterval: twoWay.interval && pair(twoWay.interval),
      },
      exact: { dfTwoWay: twoWay.degreesOfFreedom },
    };
  }),

  studentQuantile: of<{ tail: number; df: number }>(({ tail, df }) => ({ scaled: { t: studentTQuantile(tail, df) } })),

  prevalenceOfHearers: of<{ significant: number; listeners: number; attainedSize: number; conf: number }>(
    ({ significant, listeners, attainedSize, conf }) => {
      const found = prevalence(significant, listeners, attainedSize, conf);
      return {
        relative: { pAnyoneHears: found.pAnyone },
        scaled: { estimate: found.estimate, lowerBound: found.lowerLimit },
      };
    },
  ),
};
