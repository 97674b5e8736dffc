import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { aboveGuessing, aboveGuessingRate, correctRateOf } from '#shared/statistics/above-guessing.ts';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { clopperPearson, clopperPearsonLower, clopperPearsonUpper } from '#shared/statistics/clopper-pearson.ts';
import { wilsonInterval } from '#shared/statistics/wilson.ts';
import { expectClose, reference } from '../../support/reference.ts';

const third = { numerator: 1, denominator: 3 };
const outcome = fc
  .integer({ min: 1, max: 200 })
  .chain((trials) => fc.tuple(fc.integer({ min: 0, max: trials }), fc.constant(trials)));
const confidence = fc.constantFrom(0.5, 0.8, 0.9, 0.95, 0.99, 0.999);

describe('Clopper-Pearson limits', () => {
  it('rise with every right answer and enclose the rate [T3]', () => {
    fc.assert(
      fc.property(outcome, confidence, ([successes, trials], level) => {
        const { lower, upper } = clopperPearson(successes, trials, level);
        expect(lower).toBeLessThanOrEqual(successes / trials);
        expect(upper).toBeGreaterThanOrEqual(successes / trials);
        if (successes === trials) return;
        const next = clopperPearson(successes + 1, trials, level);
        expect(next.lower).toBeGreaterThan(lower);
        expect(next.upper).toBeGreaterThanOrEqual(upper);
      }),
    );
  });

  it('grow wider with confidence, and mirror right into wrong answers [T3]', () => {
    fc.assert(
      fc.property(outcome, ([successes, trials]) => {
        const narrow = clopperPearson(successes, trials, 0.9);
        const wide = clopperPearson(successes, trials, 0.99);
        expect(wide.lower).toBeLessThanOrEqual(narrow.lower);
        expect(wide.upper).toBeGreaterThanOrEqual(narrow.upper);
        expect(clopperPearson(trials - successes, trials, 0.9).upper).toBeCloseTo(1 - narrow.lower, 14);
      }),
    );
  });

  it('put exactly the stated tail beyond the lower limit [T3]', () => {
    fc.assert(
      fc.property(outcome, confidence, ([successes, trials], level) => {
        if (successes === 0) return;
        const lower = clopperPearsonLower(successes, trials, level);
        expectClose(binomialTest(successes, trials, lower, 'greater').p, 1 - level, 1e-10, 0, `${successes}/${trials}`);
      }),
    );
  });

  // None of n right: the upper limit solves (1 - p)^n = tail.
  it('are exactly 0 and 1 at the ends, with the closed form on the other side [T3]', () => {
    expect(clopperPearson(0, 16, 0.95).lower).toBe(0);
    expect(clopperPearson(16, 16, 0.95).upper).toBe(1);
    expect(clopperPearsonUpper(0, 16, 0.95)).toBeCloseTo(1 - 0.05 ** (1 / 16), 14);
    expect(clopperPearsonLower(16, 16, 0.95)).toBeCloseTo(0.05 ** (1 / 16), 14);
  });
});

describe('the Wilson interval', () => {
  it('agrees with prop.test of R without its correction [T12]', () => {
    for (const { id, inputs, expected, tol } of reference<
      { k: number; n: number; conf: number },
      { wilson: [number, number] }
    >('intervals.json')) {
      const { lower, upper } = wilsonInterval(inputs.k, inputs.n, inputs.conf);
      expectClose(lower, expected.wilson[0], tol, 1, id);
      expectClose(upper, expected.wilson[1], tol, 1, id);
    }
  });
});

describe('the share above guessing', () => {
  it('agrees with Abbott’s correction of R’s limits, raw and clipped [T13]', () => {
    type Inputs = { k: number; n: number; guess: number; conf: number };
    type Expected = {
      pdRaw: number;
      pd: number;
      pdIntervalRaw: [number, number];
      pdIntervalClipped: [number, number];
      pdLowerOneSided95: number;
      pdUpperOneSided95: number;
    };
    for (const { id, inputs, expected, tol } of reference<Inputs, Expected>(
      'power-similarity.json',
      'proportionDiscriminators',
    )) {
      const chance = inputs.guess === 0.5 ? evenChance : third;
      const found = aboveGuessing(inputs.k, inputs.n, chance, inputs.conf);
      const pairs: [number, number][] = [
        [found.rawRate, expected.pdRaw],
        [found.rate, expected.pd],
        [found.rawInterval.lower, expected.pdIntervalRaw[0]],
        [found.rawInterval.upper, expected.pdIntervalRaw[1]],
        [found.interval.lower, expected.pdIntervalClipped[0]],
        [found.interval.upper, expected.pdIntervalClipped[1]],
        [found.oneSidedLower, expected.pdLowerOneSided95],
        [found.oneSidedUpper, expected.pdUpperOneSided95],
      ];
      for (const [actual, value] of pairs) expectClose(actual, value, tol, 1, id);
    }
  });

  it('comes back to the rate of right answers that it came from [T13]', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 1, noNaN: true }), fc.constantFrom(evenChance, third), (rate, chance) => {
        expect(correctRateOf(aboveGuessingRate(rate, chance), chance)).toBeCloseTo(rate, 14);
      }),
    );
  });

  // A 95 % one-sided lower limit is the dual of the one-sided test at .05; the two-sided interval is not.
  it('has a one-sided lower limit above 0 exactly when the one-sided test is below its level [T13]', () => {
    fc.assert(
      fc.property(outcome, ([successes, trials]) => {
        const isSignificant = binomialTest(successes, trials, evenChance, 'greater').p < 0.05;
        expect(aboveGuessing(successes, trials, evenChance, 0.95).oneSidedLower > 0).toBe(isSignificant);
      }),
    );
    const twelve = aboveGuessing(12, 16, evenChance, 0.95);
    expect(twelve.interval.lower).toBe(0);
    expect(twelve.oneSidedLower).toBeCloseTo(0.0312, 4);
  });
});
