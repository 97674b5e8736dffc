import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { shareInterval } from '#shared/findings/listener-preferences.ts';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { fractionToNumber } from '#shared/statistics/fraction.ts';
import { planFigures } from '#shared/statistics/plan-figures.ts';
import { twoSidedPlan } from '#shared/statistics/planned-test.ts';
import {
  exactTwoSidedEven,
  twoSidedCriticalCount,
  twoSidedPower,
  twoSidedSampleSize,
} from '#shared/statistics/two-sided-even.ts';
import { expectClose, reference } from '../../support/reference.ts';

const records = <I, E>(wanted: string) => reference<I, E>('preference.json').filter(({ fn }) => fn === wanted);

describe('the two-sided test at an even chance', () => {
  it('gives R’s p and limits of binom.test [F3] [F4]', () => {
    type Expected = { p: number; interval: [number, number] };
    const sides = records<{ k: number; n: number; conf: number }, Expected>('sides');
    expect(sides.length).toBeGreaterThan(250);
    for (const { id, inputs, expected, tol } of sides) {
      const { k, n, conf } = inputs;
      expectClose(fractionToNumber(exactTwoSidedEven(k, n)), expected.p, tol, 0, id);
      const { lower, upper } = shareInterval([k, n - k], 1 - conf) ?? { lower: '', upper: '' };
      expectClose(Number(lower), expected.interval[0], tol, 1, `${id} lower`);
      expectClose(Number(upper), expected.interval[1], tol, 1, `${id} upper`);
    }
  });

  it('is the least-likelihood p, symmetric, and 1 at an even split [F3]', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 300 }), fc.double({ min: 0, max: 1, noNaN: true }), (trials, share) => {
        const k = Math.round(share * trials);
        const p = fractionToNumber(exactTwoSidedEven(k, trials));
        expectClose(p, binomialTest(k, trials, evenChance, 'two-sided').p, 1e-10, 0, `${k} of ${trials}`);
        expect(exactTwoSidedEven(trials - k, trials)).toEqual(exactTwoSidedEven(k, trials));
        if (2 * k === trials) expect(p).toBe(1);
      }),
    );
    expect(fractionToNumber(exactTwoSidedEven(0, 0))).toBe(1);
  });

  it('needs what R finds by trying every count, with R’s size and power [F7]', () => {
    type Expected = { count: number | null; size: number; power: number[] };
    for (const { id, inputs, expected, tol } of records<{ n: number; alpha: number }, Expected>('need')) {
      const { n, alpha } = inputs;
      const found = twoSidedCriticalCount(n, alpha);
      expect(found?.count ?? null, id).toBe(expected.count);
      if (found === null) continue;
      expectClose(found.attainedSize, expected.size, tol, 0, id);
      for (const [index, rate] of [0.6, 0.7, 0.8].entries())
        expectClose(twoSidedPower(n, alpha, rate).power, expected.power[index] ?? Number.NaN, tol, 0, `${id} ${rate}`);
    }
    expect(twoSidedPower(4, 0.05, 0.9)).toEqual({ critical: null, power: 0 });
  });

  it('says how many trials are needed, as R finds by trying every number [F7]', () => {
    type Inputs = { alpha: number; rate: number; targetPower: number };
    for (const { id, inputs, expected } of records<Inputs, { nFirst: number; nSafe: number }>('trials'))
      expect(twoSidedSampleSize({ ...inputs, limit: 5000 }), id).toMatchObject(expected);
  });

  it('plans a pair: two fittings a trial, both sides, and the least p of two draws [F7]', () => {
    const plan = {
      sessions: 1,
      trials: 16,
      alpha: '0.05',
      test: twoSidedPlan,
      listeners: 3,
      presentationsPerTrial: 2,
      changeMs: 30_000,
      listenMs: 20_000,
      answerMs: 15_000,
      resetMs: 0,
      breaks: null,
    };
    const figures = planFigures(plan);
    // Two changes of 30 s and two excerpts of 20 s, and 15 s to answer: 115 s; 16 of them and 100 s before.
    expect(figures.session).toMatchObject({ fittings: 34, trialMs: 115_000, durationMs: 1_940_000 });
    // R: binom.test(13, 16)$p.value
    expect(figures.critical?.count).toBe(13);
    expectClose(figures.critical?.attainedSize ?? 0, 0.021270751953125, 1e-10, 0, 'size');
    expect([figures.leastPDenominator, figures.leastAttainableP]).toEqual([2n ** 15n, 2 ** -15]);
    expect(planFigures({ ...plan, trials: 5 }).canReachAlpha).toBe(false);
    expect(planFigures({ ...plan, trials: 6 }).canReachAlpha).toBe(true);
  });

  it('refuses what is out of its domain [F3]', () => {
    expect(() => exactTwoSidedEven(3, 2)).toThrow(RangeError);
    expect(() => exactTwoSidedEven(Number.NaN, 2)).toThrow(RangeError);
    expect(() => twoSidedCriticalCount(10, 1)).toThrow(RangeError);
    expect(() => twoSidedPower(10, 0.05, 1)).toThrow(RangeError);
    expect(() => twoSidedSampleSize({ alpha: 0.05, rate: 0.5, targetPower: 0.8, limit: 100 })).toThrow(RangeError);
  });
});
