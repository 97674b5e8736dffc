import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { methods } from '#shared/methods/methods.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { detectableRate } from '#shared/statistics/detectable-rate.ts';
import { normalQuantile } from '#shared/statistics/normal-quantile.ts';
import { normalUpperTail } from '#shared/statistics/normal-tail.ts';
import { plannedDetectableRate, plannedPowerCurve } from '#shared/statistics/planned-power.ts';
import { oneSidedPlan, twoSidedPlan } from '#shared/statistics/planned-test.ts';
import { correctRateAt, dPrimeAt } from '#shared/statistics/psychometric.ts';
import { sameDifferentPlan, sameDifferentSensitivity } from '#shared/statistics/same-different.ts';
import { unbiasedByDifference } from '#shared/statistics/unbiased-same-different.ts';

const even = oneSidedPlan(evenChance);

describe('the saw of power', () => {
  // R: 1 - pbinom(c - 1, n, .7) with the smallest c at .05, for 36 to 42 trials.
  it('rises and falls with the number needed, and holds the first and the safe number [W4]', () => {
    const needed = even.needed(0.05, 0.7, 0.8);
    expect(needed).toMatchObject({ nFirst: 37, nSafe: 42 });
    const { points } = plannedPowerCurve(even, { trials: 16, alpha: 0.05, rate: 0.7, ...needed });
    const at = (trials: number) => points.find((point) => point.trials === trials)?.power ?? Number.NaN;
    const fromR = [0.736514387942, 0.807095691653, 0.774451838686, 0.73971877913, 0.807448245265, 0.776188491664];
    expect(fromR.map((_, index) => at(36 + index))).toEqual(fromR.map((power) => expect.closeTo(power, 11)));
    expect(at(42)).toBeCloseTo(0.83599882022, 11);
  });

  // R: 1 - pbinom(c(12, 14), c(18, 20), .6)
  it('tells that 18 trials find more than 20 do, and nothing of the kind at the top of a tooth [W4]', () => {
    const question = { alpha: 0.05, rate: 0.6, ...even.needed(0.05, 0.6, 0.8) };
    const { stronger } = plannedPowerCurve(even, { ...question, trials: 20 });
    expect(stronger).toEqual({ trials: 18, power: expect.closeTo(0.208758371672, 11) });
    expect(plannedPowerCurve(even, { ...question, trials: 18 }).stronger).toBeNull();
  });

  it('is exact at every point, ascending, within what was looked at, and has the planned number if it gets so far [W4]', () => {
    fc.assert(
      fc.property(fc.integer({ min: 5, max: 1200 }), fc.integer({ min: 52, max: 98 }), (trials, percent) => {
        const rate = percent / 100;
        const needed = even.needed(0.05, rate, 0.8);
        const { points } = plannedPowerCurve(even, { trials, alpha: 0.05, rate, ...needed });
        const numbers = points.map((point) => point.trials);
        expect(numbers).toEqual([...new Set(numbers)].sort((a, b) => a - b));
        const last = numbers.at(-1) ?? 0;
        if (trials <= last) expect(numbers).toContain(trials);
        else expect(even.power(trials, 0.05, rate)).toBeGreaterThan(0.8);
        if (needed.nSafe !== null) expect(numbers).toContain(needed.nSafe);
        for (const point of points.filter((_, index) => index % 40 === 0))
          expect(point.power).toBe(even.power(point.trials, 0.05, rate));
      }),
      { numRuns: 40 },
    );
    const far = plannedPowerCurve(sameDifferentPlan, {
      trials: 900,
      alpha: 0.05,
      rate: 0.55,
      nFirst: null,
      nSafe: null,
    });
    const last = far.points.at(-1)?.trials ?? 0;
    expect(last).toBeLessThanOrEqual(sameDifferentPlan.searchedTo);
    expect(last).toBeGreaterThan(sameDifferentPlan.searchedTo - 5);
  });

  it('asks for more trials where more power is wanted, in every method [W3]', () => {
    for (const { planned } of Object.values(methods)) {
      const numbers = [0.5, 0.8, 0.9].map((goal) => planned.needed(0.05, planned.rates[2], goal).nSafe ?? Number.NaN);
      expect(numbers.toSorted((a, b) => a - b)).toEqual(numbers);
      expect(new Set(numbers).size).toBe(3);
    }
  });
});

describe('the smallest rate that is found', () => {
  it('is that of the one-sided test, and has the power asked for in every method [W8]', () => {
    expect(plannedDetectableRate(even, 16, 0.05, 0.8)).toBeCloseTo(detectableRate(16, evenChance, 0.05, 0.8) ?? 0, 6);
    // R: uniroot of pbinom(12, 16, r, lower.tail = FALSE) + pbinom(3, 16, r) at .8
    expect(plannedDetectableRate(twoSidedPlan, 16, 0.05, 0.8)).toBeCloseTo(0.852918121473, 6);
    for (const { planned } of Object.values(methods)) {
      const rate = plannedDetectableRate(planned, 40, 0.05, 0.8) ?? Number.NaN;
      expect(planned.power(40, 0.05, rate)).toBeCloseTo(0.8, 5);
    }
  });

  it('is none where the level is out of reach', () => {
    expect(plannedDetectableRate(even, 4, 0.05, 0.8)).toBeNull();
  });
});

describe('same-different without bias', () => {
  // R: uniroot for the criterion at which 2 pnorm(-t/sqrt(2)) equals the missed share.
  it('gives the hits that R finds, and is turned back [W2]', () => {
    const fromR = { 0.5: 0.513265265623, 1: 0.551338899758, 2: 0.674790941802, 3: 0.799897001079 };
    for (const [dPrime, hits] of Object.entries(fromR)) {
      expect(correctRateAt(unbiasedByDifference, Number(dPrime))).toBeCloseTo(hits, 10);
      expect(dPrimeAt(unbiasedByDifference, hits)).toBeCloseTo(Number(dPrime), 8);
    }
    expect(correctRateAt(unbiasedByDifference, 0)).toBeCloseTo(0.5, 12);
  });

  it('misses as many hits as it makes false alarms, however much is heard [W2]', () => {
    for (let dPrime = 0.05; dPrime < 12; dPrime += 0.05) {
      const wrong = unbiasedByDifference.wrong(dPrime);
      const criterion = -Math.SQRT2 * normalQuantile(wrong / 2);
      const missed =
        normalUpperTail((dPrime - criterion) / Math.SQRT2) - normalUpperTail((dPrime + criterion) / Math.SQRT2);
      expect(Math.abs(missed / wrong - 1), `${dPrime}`).toBeLessThan(1e-9);
    }
  });

  it('is the d′ that a report states of the same hits and false alarms [W2]', () => {
    for (const hits of [55, 60, 70, 80, 95]) {
      const { dPrime } = sameDifferentSensitivity({ count: hits, trials: 100 }, { count: 100 - hits, trials: 100 });
      expect(dPrimeAt(unbiasedByDifference, hits / 100)).toBeCloseTo(dPrime, 8);
    }
  });
});
