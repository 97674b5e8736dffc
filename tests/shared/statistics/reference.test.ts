import { describe, expect, it } from 'vitest';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { clopperPearson, clopperPearsonLower, clopperPearsonUpper } from '#shared/statistics/clopper-pearson.ts';
import { criticalCount } from '#shared/statistics/critical-count.ts';
import { type AbxModel, abxCorrectRate, abxDPrime } from '#shared/statistics/d-prime.ts';
import { holm } from '#shared/statistics/holm.ts';
import { power } from '#shared/statistics/power.ts';
import {
  correctRateAt,
  dPrimeAt,
  dPrimeLimits,
  matchingByDistance,
  matchingByMidpoint,
  moreOfAttribute,
  oddByDistance,
  type Psychometric,
} from '#shared/statistics/psychometric.ts';
import { sampleSize } from '#shared/statistics/sample-size.ts';
import { sharedPresentationTest } from '#shared/statistics/shared-presentation-test.ts';
import { expectClose, reference } from '../../support/reference.ts';

/** A third is stored as the nearest double in the check values; here it is the ratio. */
const chanceOf = (p0: number) =>
  p0 === 0.5 ? evenChance : Math.abs(p0 - 1 / 3) < 1e-15 ? { numerator: 1, denominator: 3 } : p0;

describe('against R 4.2.2, SciPy and mpmath', () => {
  it('gives R’s binomial tails, their logs, mid-p and the two-sided p by least likelihood [T1]', () => {
    type Inputs = { k: number; n: number; p0: number };
    type Expected = Record<
      'pUpper' | 'pLower' | 'pTwoSidedMinlike' | 'logPUpper' | 'logPLower' | 'midPUpper' | 'midPLower',
      number | string | null
    >;
    for (const { id, inputs, expected, tol } of reference<Inputs, Expected>('binomial-tests.json')) {
      const { k, n, p0 } = inputs;
      const test = (alternative: Parameters<typeof binomialTest>[3]) => binomialTest(k, n, chanceOf(p0), alternative);
      const compare = (actual: number, value: number | string | null, floor: 0 | 1, what: string) =>
        value === null ? undefined : expectClose(actual, value, tol, floor, `${id} ${what}`);
      compare(test('greater').p, expected.pUpper, 0, 'upper');
      compare(test('less').p, expected.pLower, 0, 'lower');
      compare(test('two-sided').p, expected.pTwoSidedMinlike, 0, 'two-sided');
      compare(test('greater').logP, expected.logPUpper, 1, 'log upper');
      compare(test('less').logP, expected.logPLower, 1, 'log lower');
      compare(test('greater').midP, expected.midPUpper, 0, 'mid-p upper');
      compare(test('less').midP, expected.midPLower, 0, 'mid-p lower');
    }
  });

  it('gives the smallest number correct and the size that it attains [T2]', () => {
    type Expected = { minCorrect: (number | null)[]; attainedSize: (number | null)[] };
    for (const { id, inputs, expected, tol } of reference<{ n: number; p0: number; alphas: number[] }, Expected>(
      'critical-values.json',
    ))
      for (const [index, alpha] of inputs.alphas.entries()) {
        // All right at chance 0.1 has a chance of exactly 0.1, 0.01 ...: a tie, which R's doubles miss and fractions do not.
        if (Math.abs(inputs.p0 ** inputs.n - alpha) < 1e-12) continue;
        const found = criticalCount(inputs.n, chanceOf(inputs.p0), alpha);
        expect(found?.count ?? null, `${id} ${alpha}`).toBe(expected.minCorrect[index]);
        const size = expected.attainedSize[index];
        if (found !== null && size !== null && size !== undefined) expectClose(found.attainedSize, size, tol, 0, id);
      }
  });

  it('gives R’s Clopper-Pearson limits, two-sided and one-sided [T3]', () => {
    type Expected = { clopperPearson: [number, number]; oneSidedLower: number; oneSidedUpper: number };
    for (const { id, inputs, expected, tol } of reference<{ k: number; n: number; conf: number }, Expected>(
      'intervals.json',
    )) {
      const { k, n, conf } = inputs;
      const { lower, upper } = clopperPearson(k, n, conf);
      expectClose(lower, expected.clopperPearson[0], tol, 1, id);
      expectClose(upper, expected.clopperPearson[1], tol, 1, id);
      expectClose(clopperPearsonLower(k, n, conf), expected.oneSidedLower, tol, 1, id);
      expectClose(clopperPearsonUpper(k, n, conf), expected.oneSidedUpper, tol, 1, id);
    }
  });

  it('gives the exact p of shared presentations, answers held fixed [T4]', () => {
    type Inputs = { choices: number[][]; truth: number[] };
    type Expected = {
      answers: number;
      matching: number;
      pUpper: number;
      pTwoSidedByDistance: number;
      mean: number;
      variance: number;
      pUpperFraction?: string;
    };
    for (const { id, inputs, expected, tol } of reference<Inputs, Expected>('shared-presentations.json')) {
      const trials = inputs.choices.map((counts, index) => ({ counts, truth: inputs.truth[index] ?? 0, missing: 0 }));
      const greater = sharedPresentationTest(trials, 'greater');
      expect(greater.matching, id).toBe(expected.matching);
      expect(greater.answers, id).toBe(expected.answers);
      expectClose(greater.p, expected.pUpper, tol, 0, id);
      expectClose(greater.mean, expected.mean, tol, 1, id);
      expectClose(greater.variance, expected.variance, tol, 1, id);
      expectClose(sharedPresentationTest(trials, 'two-sided').p, expected.pTwoSidedByDistance, tol, 0, id);
      if (expected.pUpperFraction !== undefined) {
        const [numerator = '', denominator = '1'] = expected.pUpperFraction.split('/');
        const { pFraction } = greater;
        expect(pFraction.numerator * BigInt(denominator), id).toBe(BigInt(numerator) * pFraction.denominator);
      }
    }
  });

  it('gives exact power, and the saw-tooth’s first and safe number of trials [T5]', () => {
    type Inputs = { n: number; p0: number; alpha: number; pd: number; targetPower: number };
    type Expected = { pc: number; minCorrect: number | null; power: number; nFirst: number; nSafe: number };
    for (const { id, fn, inputs, expected, tol } of reference<Inputs, Expected>(
      'power-similarity.json',
      'powerExact',
      'sampleSizeExact',
    )) {
      const chance = chanceOf(inputs.p0);
      if (fn === 'powerExact') {
        const found = power(inputs.n, chance, inputs.alpha, expected.pc);
        expect(found.critical?.count ?? null, id).toBe(expected.minCorrect);
        expectClose(found.power, expected.power, tol, 0, id);
        continue;
      }
      const correctRate = inputs.p0 + inputs.pd * (1 - inputs.p0);
      const found = sampleSize({
        chance,
        alpha: inputs.alpha,
        correctRate,
        targetPower: inputs.targetPower,
        limit: 3000,
      });
      expect([found.nFirst, found.nSafe], id).toEqual([expected.nFirst, expected.nSafe]);
    }
  });

  it('gives Holm’s adjusted p-values [T6]', () => {
    for (const { id, inputs, expected, tol } of reference<{ p: number[] }, { holm: number[] }>('multiplicity.json'))
      for (const [index, value] of holm(inputs.p).entries())
        expectClose(value, expected.holm[index] ?? Number.NaN, tol, 0, id);
  });

  it('gives d′ of ABX by both models, and the rate that it comes from [T7]', () => {
    const models: Record<string, AbxModel> = { abxDifferencing: 'differencing', abxIndependent: 'independent' };
    type Inputs = { method: string; dPrime: number; pc: number };
    for (const { id, fn, inputs, expected, tol } of reference<Inputs, { pc: number; dPrime: number }>('d-prime.json')) {
      const model = models[inputs.method];
      if (model === undefined) throw new Error(`no model for ${inputs.method}`);
      if (fn === 'psychometric') expectClose(abxCorrectRate(inputs.dPrime, model), expected.pc, tol, 0, id);
      else expectClose(abxDPrime(inputs.pc, model), expected.dPrime, Math.max(tol, 1e-7), 1, id);
    }
  });
});

describe('d′ of the other methods', () => {
  const rules: Record<string, Psychometric> = {
    twoAFC: moreOfAttribute,
    duoTrio: matchingByDistance,
    triangle: oddByDistance,
  };
  type Inputs = { method: string; dPrime: number; pc: number; k: number; n: number; conf: number };
  type Expected = { pc: number; dPrime: number; exactInterval: [number | string, number | string] };

  it('gives the rate at d′, its inverse, and exact limits through the inverse [C3]', () => {
    const seen = new Set<string>();
    for (const { id, fn, inputs, expected, tol } of reference<Inputs, Expected>('d-prime-methods.json')) {
      const rule = rules[inputs.method];
      if (rule === undefined) throw new Error(`no rule for ${inputs.method}`);
      seen.add(`${fn} ${inputs.method}`);
      if (fn === 'psychometric') expectClose(correctRateAt(rule, inputs.dPrime), expected.pc, tol, 0, id);
      else if (fn === 'dPrimeFromPc')
        expectClose(dPrimeAt(rule, inputs.pc), expected.dPrime, Math.max(tol, 1e-7), 1, id);
      else {
        const { k, n, conf } = inputs;
        const limits = dPrimeLimits(rule, clopperPearson(k, n, conf));
        expectClose(dPrimeAt(rule, k / n), expected.dPrime, tol, 1, id);
        expectClose(limits.lower, expected.exactInterval[0], tol, 1, id);
        expectClose(limits.upper, expected.exactInterval[1], tol, 1, id);
      }
    }
    expect(seen.size).toBe(9);
  });

  // A d′ of 12 is wrong about once in 10^12: the inverse takes the rate's complement, and loses nothing.
  it('comes back from the rate to d′ all the way up, and rises with it [C3]', () => {
    for (const rule of [...Object.values(rules), matchingByMidpoint]) {
      for (let dPrime = 0.25; dPrime <= 8; dPrime += 0.25) {
        expect(correctRateAt(rule, dPrime)).toBeGreaterThan(correctRateAt(rule, dPrime - 0.25));
        expect(Math.abs(dPrimeAt(rule, correctRateAt(rule, dPrime)) - dPrime)).toBeLessThan(1e-6);
      }
      expect(dPrimeAt(rule, rule.chance)).toBe(0);
      expect(dPrimeAt(rule, 1)).toBe(Number.POSITIVE_INFINITY);
      expect(() => correctRateAt(rule, -1)).toThrow(RangeError);
      expect(() => dPrimeAt(rule, 1.1)).toThrow(RangeError);
    }
  });
});

describe('published examples', () => {
  // H. Leventhal, "How conventional statistical analyses can prevent finding audible differences in listening tests",
  // J. Audio Eng. Soc. 34 (1986), 437-453: 16 trials at the .05 level.
  it('misses a listener who is right 60 % of the time in 83 % of 16-trial tests [T5]', () => {
    expect(criticalCount(16, evenChance, 0.05)).toMatchObject({ count: 12 });
    expect(1 - power(16, evenChance, 0.05, 0.6).power).toBeCloseTo(0.8334, 4);
  });

  // ISO 4120:2004, table A.1, as recomputed: 24 assessors, alpha .05 need 13 correct.
  it('needs 13 right of 24 in a triangle test at 5 % [T2]', () => {
    expect(criticalCount(24, { numerator: 1, denominator: 3 }, 0.05)).toMatchObject({ count: 13 });
  });
});
