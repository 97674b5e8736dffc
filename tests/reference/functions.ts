import { aboveGuessing } from '#shared/statistics/above-guessing.ts';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { type Chance, evenChance } from '#shared/statistics/chance.ts';
import { clopperPearson, clopperPearsonLower, clopperPearsonUpper } from '#shared/statistics/clopper-pearson.ts';
import { criticalCount } from '#shared/statistics/critical-count.ts';
import { type Fraction, fractionToNumber } from '#shared/statistics/fraction.ts';
import { holm } from '#shared/statistics/holm.ts';
import { normalLogUpperTail, normalUpperTail } from '#shared/statistics/normal-tail.ts';
import { power } from '#shared/statistics/power.ts';
import { sampleSize } from '#shared/statistics/sample-size.ts';
import { sharedPresentationTest } from '#shared/statistics/shared-presentation-test.ts';
import {
  exactTwoSidedEven,
  twoSidedCriticalCount,
  twoSidedPower,
  twoSidedSampleSize,
} from '#shared/statistics/two-sided-even.ts';
import { wilsonInterval } from '#shared/statistics/wilson.ts';
import type { Mapping, Outcome } from './check-records.ts';

/** A third is stored as the nearest double in the check values; here it is the ratio. */
const chanceOf = (p0: number): Chance =>
  p0 === 0.5 ? evenChance : Math.abs(p0 - 1 / 3) < 1e-15 ? { numerator: 1, denominator: 3 } : p0;

const of =
  <I>(compute: (inputs: I) => Outcome): Mapping =>
  (inputs) =>
    compute(inputs as I);

const fractionText = ({ numerator, denominator }: Fraction) =>
  denominator === 1n ? `${numerator}` : `${numerator}/${denominator}`;

const pair = ({ lower, upper }: { lower: number; upper: number }) => [lower, upper];

/** Each function of the check values, in terms of the functions of shared/. */
export const mappings: { readonly [fn: string]: Mapping } = {
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

  adjustPValues: of<{ p: number[] }>(({ p }) => ({ relative: { holm: holm(p) } })),

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

  normalTail: of<{ z: number }>(({ z }) => ({
    relative: { lower: normalUpperTail(-z), upper: normalUpperTail(z) },
    scaled: { logLower: normalLogUpperTail(-z), logUpper: normalLogUpperTail(z) },
  })),
};

/** What the answers would give, were they independent: shown beside the test to warn of it. */
function pooledBinomial(choices: readonly number[][], matching: number, answers: number): number | null {
  const labels = choices[0]?.length ?? 2;
  if (answers === 0) return 1;
  return binomialTest(matching, answers, { numerator: 1, denominator: labels }, 'greater').p;
}
