import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type BetaPrior, bayesFactor, middlePrior, uniformPrior } from '#shared/statistics/bayes-factor.ts';
import { benjaminiHochberg } from '#shared/statistics/benjamini-hochberg.ts';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { clopperPearson } from '#shared/statistics/clopper-pearson.ts';
import { holm } from '#shared/statistics/holm.ts';
import { midPInterval } from '#shared/statistics/mid-p-interval.ts';
import { sharedEvidence } from '#shared/statistics/shared-evidence.ts';
import { wilsonInterval } from '#shared/statistics/wilson.ts';

const counts = fc.integer({ min: 1, max: 300 }).chain((trials) => fc.tuple(fc.nat(trials), fc.constant(trials)));
const chances = fc.constantFrom(evenChance, { numerator: 1, denominator: 3 }, 0.1, 0.75);
const confidences = fc.constantFrom(0.8, 0.9, 0.95, 0.99);

describe('the laws of the binomial', () => {
  it('one tail is what the next leaves, and both mirror when right and wrong are exchanged [T35]', () => {
    fc.assert(
      fc.property(counts, fc.double({ min: 0.01, max: 0.99, noNaN: true }), ([right, trials], chance) => {
        const greater = binomialTest(right, trials, chance, 'greater');
        const beyond = right < trials ? binomialTest(right + 1, trials, chance, 'greater').p : 0;
        const less = binomialTest(right, trials, chance, 'less');
        expect(less.p + beyond).toBeCloseTo(1, 12);
        expect(greater.p + less.p).toBeGreaterThanOrEqual(1 - 1e-12);
        expect(greater.midP + less.midP).toBeCloseTo(1, 12);
        expect(greater.p).toBeGreaterThanOrEqual(beyond);
        const mirror = { numerator: 1, denominator: 2 };
        expect(binomialTest(trials - right, trials, mirror, 'less').p).toBe(
          binomialTest(right, trials, mirror, 'greater').p,
        );
      }),
    );
  });

  it('p falls with each right answer and rises with the chance [T35]', () => {
    fc.assert(
      fc.property(counts, fc.double({ min: 0.01, max: 0.9, noNaN: true }), ([right, trials], chance) => {
        const p = (k: number, rate: number) => binomialTest(k, trials, rate, 'greater').logP;
        if (right > 0) expect(p(right, chance)).toBeLessThanOrEqual(p(right - 1, chance));
        expect(p(right, chance + 0.05)).toBeGreaterThanOrEqual(p(right, chance));
      }),
    );
  });

  // Summed one by one, with the probabilities as they are.
  it('the two-sided p by least likelihood is a sum over counts, and 1 at the most likely one [T35]', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 40 }), fc.nat(40), chances, (trials, k, chance) => {
        const right = k % (trials + 1);
        const rate = typeof chance === 'number' ? chance : chance.numerator / chance.denominator;
        const points = [rate ** 0];
        let ways = 1;
        for (let count = 0; count <= trials; count++) {
          points[count] = ways * rate ** count * (1 - rate) ** (trials - count);
          ways = (ways * (trials - count)) / (count + 1);
        }
        const limit = (points[right] ?? 0) * (1 + 1e-7);
        const sum = points.filter((point) => point <= limit).reduce((total, point) => total + point, 0);
        expect(binomialTest(right, trials, chance, 'two-sided').p).toBeCloseTo(Math.min(1, sum), 10);
        const mode = points.indexOf(Math.max(...points));
        expect(binomialTest(mode, trials, chance, 'two-sided').p).toBe(1);
      }),
    );
  });
});

describe('the mid-P interval', () => {
  it('lies inside Clopper-Pearson’s, about the rate, and mirrors it [T26] [T35]', () => {
    fc.assert(
      fc.property(counts, confidences, ([right, trials], confidence) => {
        const { lower, upper } = midPInterval(right, trials, confidence);
        const outer = clopperPearson(right, trials, confidence);
        expect(lower).toBeGreaterThanOrEqual(outer.lower);
        expect(upper).toBeLessThanOrEqual(outer.upper);
        expect(lower <= right / trials && right / trials <= upper).toBe(true);
        const mirror = midPInterval(trials - right, trials, confidence);
        expect(mirror.lower).toBeCloseTo(1 - upper, 14);
      }),
    );
  });

  it('is, as the others, wider at a higher confidence and moved up by each right answer [T35]', () => {
    fc.assert(
      fc.property(
        counts,
        fc.constantFrom(midPInterval, clopperPearson, wilsonInterval),
        ([right, trials], interval) => {
          const [narrow, wide] = [interval(right, trials, 0.9), interval(right, trials, 0.99)];
          expect(wide.lower <= narrow.lower && narrow.upper <= wide.upper).toBe(true);
          if (right === trials) return;
          const next = interval(right + 1, trials, 0.9);
          expect(narrow.lower <= next.lower && narrow.upper <= next.upper).toBe(true);
        },
      ),
    );
  });

  it('has the limits at which its own mid tails are half of what is left [T26]', () => {
    const { lower, upper } = midPInterval(12, 16, 0.95);
    expect(binomialTest(12, 16, lower, 'greater').midP).toBeCloseTo(0.025, 12);
    expect(binomialTest(12, 16, upper, 'less').midP).toBeCloseTo(0.025, 12);
  });
});

describe('families of p-values', () => {
  const pValues = fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { maxLength: 20 });

  it('Benjamini and Hochberg’s are between p and Holm’s, in any order [T28] [T35]', () => {
    fc.assert(
      fc.property(pValues, (values) => {
        const adjusted = benjaminiHochberg(values);
        const byHolm = holm(values);
        for (const [index, value] of adjusted.entries()) {
          expect(value).toBeGreaterThanOrEqual(values[index] ?? Number.NaN);
          expect(value).toBeLessThanOrEqual((byHolm[index] ?? Number.NaN) * (1 + 1e-15));
        }
        expect(benjaminiHochberg(values.toReversed())).toEqual(adjusted.toReversed());
        expect(holm(values.toReversed())).toEqual(byHolm.toReversed());
      }),
    );
  });
});

describe('the Bayes factor', () => {
  const priors = fc.record({ a: fc.integer({ min: 1, max: 5 }), b: fc.integer({ min: 1, max: 5 }) });

  // mpmath 1.2.1, 40 digits.
  it('of 12 in 16 is 4.13 with a uniform share above guessing, and 4.68 with Beta(2, 2) [T29]', () => {
    const factor = (prior: BetaPrior) => Math.exp(bayesFactor(12, 16, evenChance, prior).logFactorAbove);
    expect(factor(uniformPrior)).toBeCloseTo(4.132449903038139, 12);
    expect(factor(middlePrior)).toBeCloseTo(4.677355152587351, 12);
  });

  it('mirrors at an even chance, is 1 without data and rises with each right answer [T29] [T35]', () => {
    fc.assert(
      fc.property(counts, chances, priors, ([right, trials], chance, prior) => {
        const here = bayesFactor(right, trials, evenChance, prior).logFactor;
        const mirror = bayesFactor(trials - right, trials, evenChance, { a: prior.b, b: prior.a }).logFactor;
        expect(mirror).toBeCloseTo(here, 10);
        const none = bayesFactor(0, 0, chance, prior);
        expect(none.logFactor).toBeCloseTo(0, 12);
        expect(none.logFactorAbove).toBeCloseTo(0, 12);
        if (right === trials) return;
        const above = bayesFactor(right, trials, chance, prior).logFactorAbove;
        expect(bayesFactor(right + 1, trials, chance, prior).logFactorAbove).toBeGreaterThan(above);
      }),
    );
  });

  it('averages to 1 over what guessing gives, so that it seldom misleads [T29]', () => {
    for (const prior of [uniformPrior, middlePrior]) {
      let mean = 0;
      let ways = 1;
      for (let right = 0; right <= 20; right++) {
        mean += (ways / 2 ** 20) * Math.exp(bayesFactor(right, 20, evenChance, prior).logFactorAbove);
        ways = (ways * (20 - right)) / (right + 1);
      }
      expect(mean).toBeCloseTo(1, 12);
    }
  });
});

describe('evidence from shared presentations', () => {
  it('is the Bayes factor with the uniform prior where every trial has one answer [T39] [T29]', () => {
    fc.assert(
      fc.property(fc.array(fc.boolean(), { maxLength: 60 }), fc.constantFrom(2, 3), (marks, labels) => {
        const trials = marks.map((isRight) => ({
          counts: Array.from({ length: labels }, (_, label) => (label === (isRight ? 0 : 1) ? 1 : 0)),
          truth: 0,
          missing: 0,
        }));
        const right = marks.filter((mark) => mark).length;
        const chance = { numerator: 1, denominator: labels };
        const { logFactorAbove } = bayesFactor(right, marks.length, chance, uniformPrior);
        expect(sharedEvidence(trials, labels)).toBeCloseTo(logFactorAbove, 9);
      }),
    );
  });

  // A panel that shares a habit of 80 to 20 on every trial hears nothing. Counting answers, evidence of twenty would come in
  // 39 to 61 % of such studies; over every draw the factor of trials averages to 1 at the most, so in 5 % at the most.
  it('averages to one over all draws of what was heard, whatever the panel answered [T39]', () => {
    fc.assert(
      fc.property(fc.array(fc.tuple(fc.nat(6), fc.nat(6)), { minLength: 1, maxLength: 7 }), (answers) => {
        let mean = 0;
        for (let draw = 0; draw < 2 ** answers.length; draw += 1) {
          const trials = answers.map((counts, index) => ({ counts, truth: (draw >> index) & 1, missing: 0 }));
          mean += Math.exp(sharedEvidence(trials, 2)) / 2 ** answers.length;
        }
        expect(mean).toBeCloseTo(1, 9);
      }),
      { numRuns: 30 },
    );
  });

  it('takes silence as right, so that it never speaks for guessing [T39]', () => {
    const trial = { counts: [2, 1], truth: 0, missing: 2 };
    expect(sharedEvidence([trial], 2)).toBeCloseTo(sharedEvidence([{ counts: [4, 1], truth: 0, missing: 0 }], 2), 12);
    expect(() => sharedEvidence([], 1)).toThrow(RangeError);
  });
});
