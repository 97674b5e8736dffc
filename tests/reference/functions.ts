import { aboveGuessing } from '#shared/statistics/above-guessing.ts';
import { bayesFactor } from '#shared/statistics/bayes-factor.ts';
import { benjaminiHochberg } from '#shared/statistics/benjamini-hochberg.ts';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { chiSquareUpperTail } from '#shared/statistics/chi-square-tail.ts';
import { clopperPearson, clopperPearsonLower, clopperPearsonUpper } from '#shared/statistics/clopper-pearson.ts';
import { criticalCount } from '#shared/statistics/critical-count.ts';
import { equivalenceAboutHalf } from '#shared/statistics/equivalence.ts';
import { fractionToNumber } from '#shared/statistics/fraction.ts';
import { holm } from '#shared/statistics/holm.ts';
import { midPInterval } from '#shared/statistics/mid-p-interval.ts';
import { normalQuantile } from '#shared/statistics/normal-quantile.ts';
import { normalLogUpperTail, normalUpperTail } from '#shared/statistics/normal-tail.ts';
import { power } from '#shared/statistics/power.ts';
import { sampleSize } from '#shared/statistics/sample-size.ts';
import { sharedPresentationTest } from '#shared/statistics/shared-presentation-test.ts';
import { similarityCriticalCount, similarityPower, similaritySampleSize } from '#shared/statistics/similarity.ts';
import {
  exactTwoSidedEven,
  twoSidedCriticalCount,
  twoSidedPower,
  twoSidedSampleSize,
} from '#shared/statistics/two-sided-even.ts';
import { wilsonInterval } from '#shared/statistics/wilson.ts';
import type { Mapping } from './check-records.ts';
import { chanceOf, fractionText, of, pair } from './inputs.ts';
import { listenerMappings } from './listener-functions.ts';
import { methodMappings } from './method-functions.ts';
import { orderMappings } from './order-functions.ts';
import { physicsMappings } from './physics-functions.ts';

/** Each function of the check values, in terms of the functions of shared/. */
export const mappings: { readonly [fn: string]: Mapping } = {
  ...listenerMappings,
  ...methodMappings,
  ...orderMappings,
  ...physicsMappings,

  binomialTest: of<{ k: number; n: number; p0: number }>(({ k, n, p0 }) => {
    const chance = chanceOf(p0);
    const greater = binomialTest(k, n, chance, 'greater');
    const less = binomialTest(k, n, chance, 'less');
    return {
      relative: {
        pUpper: greater.p,
        pLower: less.p,
        pTwoSidedMinlike: binomialTest(k, n, chance, 'two-sided').p,
        midPUpper: greater.midP,
        midPLower: less.midP,
      },
      scaled: { logPUpper: greater.logP, logPLower: less.logP },
    };
  }),

  proportionInterval: of<{ k: number; n: number; conf: number }>(({ k, n, conf }) => ({
    scaled: {
      clopperPearson: pair(clopperPearson(k, n, conf)),
      wilson: pair(wilsonInterval(k, n, conf)),
      midP: pair(midPInterval(k, n, conf)),
      oneSidedLower: clopperPearsonLower(k, n, conf),
      oneSidedUpper: clopperPearsonUpper(k, n, conf),
    },
  })),

  minimumCorrect: of<{ n: number; p0: number; alphas: number[] }>(({ n, p0, alphas }) => {
    const found = alphas.map((alpha) => criticalCount(n, chanceOf(p0), alpha));
    return {
      exact: { minCorrect: found.map((critical) => critical?.count ?? null) },
      relative: { attainedSize: found.map((critical) => critical?.attainedSize ?? null) },
    };
  }),

  minimumAgreeingTwoSided: of<{ n: number; alphas: number[] }>(({ n, alphas }) => ({
    exact: { minAgreeing: alphas.map((alpha) => twoSidedCriticalCount(n, alpha)?.count ?? null) },
  })),

  proportionDiscriminators: of<{ k: number; n: number; guess: number; conf: number }>(({ k, n, guess, conf }) => {
    const found = aboveGuessing(k, n, chanceOf(guess), conf);
    return {
      scaled: {
        pc: k / n,
        pdRaw: found.rawRate,
        pd: found.rate,
        pdIntervalRaw: pair(found.rawInterval),
        pdIntervalClipped: pair(found.interval),
        pdLowerOneSided95: found.oneSidedLower,
        pdUpperOneSided95: found.oneSidedUpper,
      },
    };
  }),

  powerExact: of<{ n: number; p0: number; alpha: number; pd: number }>(({ n, p0, alpha, pd }) => {
    const pc = p0 + pd * (1 - p0);
    const found = power(n, chanceOf(p0), alpha, pc);
    return { exact: { minCorrect: found.critical?.count ?? null }, relative: { pc, power: found.power } };
  }),

  sampleSizeExact: of<{ p0: number; alpha: number; pd: number; targetPower: number }>(
    ({ p0, alpha, pd, targetPower }) => {
      const found = sampleSize({
        chance: chanceOf(p0),
        alpha,
        correctRate: p0 + pd * (1 - p0),
        targetPower,
        limit: 3000,
      });
      const { nFirst, nSafe, powerAtFirst, powerAtSafe } = found;
      return { exact: { nFirst, nSafe }, relative: { powerAtFirst, powerAtSafe } };
    },
  ),

  similarityCritical: of<{ n: number; p0: number; pdMax: number; alpha: number }>(({ n, p0, pdMax, alpha }) => {
    const critical = similarityCriticalCount(n, chanceOf(p0), pdMax, alpha);
    return {
      exact: { maxCorrect: critical?.count ?? null },
      relative: {
        attainedSize: critical?.attainedSize ?? null,
        powerAtPd0: similarityPower(n, chanceOf(p0), pdMax, alpha, 0),
      },
    };
  }),

  similaritySampleSize: of<{ p0: number; pdMax: number; alpha: number; targetPower: number; truePd: number }>(
    ({ p0, pdMax, alpha, targetPower, truePd }) => {
      const found = similaritySampleSize({
        chance: chanceOf(p0),
        margin: pdMax,
        alpha,
        trueShare: truePd,
        targetPower,
        limit: 3000,
      });
      const { nFirst, nSafe, powerAtFirst, powerAtSafe } = found;
      return { exact: { nFirst, nSafe }, relative: { powerAtFirst, powerAtSafe } };
    },
  ),

  equivalenceTwoSided: of<{ k: number; n: number; margin: number }>(({ k, n, margin }) => {
    const { pAgainstLower, pAgainstUpper, p } = equivalenceAboutHalf(k, n, margin);
    return { relative: { pAgainstLower, pAgainstUpper, pTost: p } };
  }),

  bayesFactorBinomial: of<BayesInputs>((inputs) => {
    const { logFactor, logFactorAbove } = factorOf(inputs);
    return {
      scaled: { logBF10: logFactor, logBFPlus0: logFactorAbove },
      relative: { BF10: Math.exp(logFactor), BFPlus0: Math.exp(logFactorAbove) },
    };
  }),

  eValueBernoulli: of<BayesInputs>((inputs) => {
    const { logFactor, logFactorAbove } = factorOf(inputs);
    return { scaled: { logE: logFactor, logEOneSided: logFactorAbove } };
  }),

  chiSquareUpper: of<{ x: number; df: number }>(({ x, df }) => ({ relative: { upper: chiSquareUpperTail(x, df) } })),

  adjustPValues: of<{ p: number[] }>(({ p }) => ({
    relative: { holm: holm(p), benjaminiHochberg: benjaminiHochberg(p) },
  })),

  sharedPresentationTest: of<{ choices: number[][]; truth: number[] }>(({ choices, truth }) => {
    const trials = choices.map((counts, index) => ({ counts, truth: truth[index] ?? 0, missing: 0 }));
    const { answers, matching, p, pFraction, mean, variance } = sharedPresentationTest(trials, 'greater');
    return {
      exact: { answers, matching, pUpperFraction: fractionText(pFraction) },
      relative: {
        pUpper: p,
        pTwoSidedByDistance: sharedPresentationTest(trials, 'two-sided').p,
        pUpperIfBinomial: pooledBinomial(choices, matching, answers),
      },
      scaled: { mean, variance },
    };
  }),

  sides: of<{ k: number; n: number; conf: number }>(({ k, n, conf }) => ({
    relative: { p: fractionToNumber(exactTwoSidedEven(k, n)) },
    scaled: { interval: pair(clopperPearson(k, n, conf)) },
  })),

  need: of<{ n: number; alpha: number }>(({ n, alpha }) => {
    const critical = twoSidedCriticalCount(n, alpha);
    return {
      exact: { count: critical?.count ?? null },
      relative: {
        size: critical?.attainedSize ?? null,
        power: [0.6, 0.7, 0.8].map((rate) => twoSidedPower(n, alpha, rate).power),
      },
    };
  }),

  trials: of<{ alpha: number; rate: number; targetPower: number }>((question) => {
    const { nFirst, nSafe } = twoSidedSampleSize({ ...question, limit: 3000 });
    return { exact: { nFirst, nSafe } };
  }),

  normalQuantile: of<{ p: number }>(({ p }) => ({ scaled: { z: normalQuantile(p) } })),

  normalTail: of<{ z: number }>(({ z }) => ({
    relative: { lower: normalUpperTail(-z), upper: normalUpperTail(z) },
    scaled: { logLower: normalLogUpperTail(-z), logUpper: normalLogUpperTail(z) },
  })),
};

interface BayesInputs {
  readonly k: number;
  readonly n: number;
  readonly p0: number;
  readonly priorA: number;
  readonly priorB: number;
}

const factorOf = ({ k, n, p0, priorA, priorB }: BayesInputs) =>
  bayesFactor(k, n, chanceOf(p0), { a: priorA, b: priorB });

/** What the answers would give, were they independent: shown beside the test to warn of it. */
function pooledBinomial(choices: readonly number[][], matching: number, answers: number): number | null {
  const labels = choices[0]?.length ?? 2;
  if (answers === 0) return 1;
  return binomialTest(matching, answers, { numerator: 1, denominator: labels }, 'greater').p;
}
