import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { betaBinomialFit } from '#shared/statistics/beta-binomial.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { heterogeneity, heterogeneityAboutChance } from '#shared/statistics/heterogeneity.ts';
import { listenerClusterInterval } from '#shared/statistics/listener-cluster-interval.ts';
import type { ListenerScore } from '#shared/statistics/listener-scores.ts';
import { prevalence } from '#shared/statistics/prevalence.ts';
import {
  type SharedAnswer,
  trialClusterInterval,
  twoWayClusterInterval,
} from '#shared/statistics/shared-cluster-interval.ts';
import { taroneTest } from '#shared/statistics/tarone.ts';

const of16 = (...right: number[]): ListenerScore[] => right.map((successes) => ({ successes, trials: 16 }));
const mirrored = (scores: readonly ListenerScore[]) =>
  scores.map(({ successes, trials }) => ({ successes: trials - successes, trials }));
const score = fc
  .integer({ min: 2, max: 30 })
  .chain((trials) => fc.record({ successes: fc.nat(trials), trials: fc.constant(trials) }));
const panels = fc.array(score, { minLength: 2, maxLength: 12 });

describe('listeners with draws of their own', () => {
  it('are told to differ or not in the same way whatever their order, and whatever is called right [T30] [T35]', () => {
    fc.assert(
      fc.property(panels, (panel) => {
        const figures = (scores: readonly ListenerScore[]) => {
          const fit = betaBinomialFit(scores);
          return [heterogeneity(scores).statistic, taroneTest(scores).z, fit.statistic, fit.correlation];
        };
        const expected = figures(panel);
        for (const same of [panel.toReversed(), mirrored(panel)])
          for (const [index, value] of figures(same).entries())
            expect(Math.abs(value - (expected[index] ?? Number.NaN))).toBeLessThan(2e-6 * Math.max(1, Math.abs(value)));
        expect(betaBinomialFit(mirrored(panel)).rate).toBeCloseTo(1 - betaBinomialFit(panel).rate, 5);
      }),
      { numRuns: 40 },
    );
  });

  it('are fitted no worse than by a common rate, and no better than by the best of many [T30]', () => {
    fc.assert(
      fc.property(panels, (panel) => {
        const { logLikelihood, logLikelihoodCommon, statistic, p, rate, correlation } = betaBinomialFit(panel);
        expect(logLikelihood).toBeGreaterThanOrEqual(logLikelihoodCommon);
        expect(statistic).toBeGreaterThanOrEqual(0);
        expect(p === 1 || p <= 0.5).toBe(true);
        expect(correlation >= 0 && correlation <= 1 && rate >= 0 && rate <= 1).toBe(true);
      }),
      { numRuns: 60 },
    );
  });

  it('who are all right, none right, no different or all-or-none are ordinary cases [T30]', () => {
    for (const panel of [of16(16, 16, 16), of16(0, 0)]) {
      expect(heterogeneity(panel)).toMatchObject({ statistic: 0, p: 1 });
      expect(taroneTest(panel)).toEqual({ z: 0, p: 0.5 });
      expect(betaBinomialFit(panel)).toMatchObject({ correlation: 0, statistic: 0, p: 1 });
    }
    expect(betaBinomialFit(of16(8, 8, 8))).toMatchObject({ rate: 0.5, correlation: 0, p: 1 });
    const split = betaBinomialFit(of16(16, 16, 0, 16));
    expect(split).toMatchObject({ rate: 0.75, correlation: 1 });
    expect(split.logLikelihood).toBeCloseTo(3 * Math.log(0.75) + Math.log(0.25), 12);
  });

  it('who hear and who do not are seen against chance [T30]', () => {
    const found = heterogeneityAboutChance(of16(12, 4), evenChance);
    expect(found).toMatchObject({ statistic: 8, degreesOfFreedom: 2 });
    expect(found.p).toBeCloseTo(Math.exp(-4), 14);
  });

  it('have a mean in general by Student’s t, and by Clopper-Pearson where they do not differ [T31]', () => {
    const varied = listenerClusterInterval(of16(8, 9, 14, 7, 10, 16, 8, 9, 12, 8), 0.95);
    expect(varied.basis).toBe('listeners');
    expect(varied.interval.lower).toBeCloseTo(0.49887, 5);
    const alike = listenerClusterInterval(of16(8, 8, 8, 8, 8, 8), 0.95);
    expect(alike).toMatchObject({ basis: 'binomial', effectiveAnswers: Number.POSITIVE_INFINITY });
    expect(alike.interval.upper - alike.interval.lower).toBeGreaterThan(0.1);
    expect(listenerClusterInterval(of16(16, 16), 0.95)).toMatchObject({ designEffect: null, effectiveAnswers: null });
  });

  it('who were significant bound from below how many hear it [T34]', () => {
    expect(prevalence(3, 12, 0.0384, 0.95).lowerLimit).toBeCloseTo(0.0348068, 6);
    expect(prevalence(0, 8, 0.0384, 0.95)).toEqual({ estimate: 0, lowerLimit: 0, pAnyone: 1 });
    const limits = Array.from({ length: 13 }, (_, k) => prevalence(k, 12, 0.0384, 0.95).lowerLimit);
    expect(limits.toSorted((a, b) => a - b)).toEqual(limits);
  });
});

const table = fc.tuple(fc.integer({ min: 2, max: 8 }), fc.integer({ min: 2, max: 8 })).chain(([trials, listeners]) =>
  fc.array(fc.array(fc.boolean(), { minLength: listeners, maxLength: listeners }), {
    minLength: trials,
    maxLength: trials,
  }),
);
const answersOf = (rows: readonly (readonly boolean[])[]): SharedAnswer[] =>
  rows.flatMap((row, trial) =>
    row.map((isRight, listener) => ({ trial: `T${trial}`, listener: `L${listener}`, isRight })),
  );

describe('listeners who hear the same presentations', () => {
  it('have a two-way error no smaller than by trial or by listener, whatever the order and the names [T31] [T35]', () => {
    fc.assert(
      fc.property(table, (rows) => {
        const answers = answersOf(rows);
        const byTrial = trialClusterInterval(answers, 0.95);
        const byListener = trialClusterInterval(
          answers.map(({ trial, listener, isRight }) => ({ trial: listener, listener: trial, isRight })),
          0.95,
        );
        const both = twoWayClusterInterval(answers, 0.95);
        expect(both.standardError).toBeGreaterThanOrEqual(Math.max(byTrial.standardError, byListener.standardError));
        const renamed = answers.toReversed().map((answer) => ({ ...answer, listener: `of ${answer.listener}` }));
        expect(twoWayClusterInterval(renamed, 0.95).standardError).toBeCloseTo(both.standardError, 12);
        const wrong = twoWayClusterInterval(
          answers.map((answer) => ({ ...answer, isRight: !answer.isRight })),
          0.95,
        );
        expect(wrong.rate).toBeCloseTo(1 - both.rate, 12);
        expect(wrong.standardError).toBeCloseTo(both.standardError, 12);
      }),
    );
  });

  it('get no interval where nothing varies, rather than one of no width [T31]', () => {
    const allRight = answersOf([
      [true, true],
      [true, true],
    ]);
    expect(trialClusterInterval(allRight, 0.95).interval).toBeNull();
    expect(twoWayClusterInterval(allRight, 0.95).interval).toBeNull();
  });
});
