import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { exactBinomialUpperTail } from '#shared/statistics/exact-binomial.ts';
import { fractionToNumber, reduceFraction } from '#shared/statistics/fraction.ts';
import { sharedPresentationTest } from '#shared/statistics/shared-presentation-test.ts';

const oneAnswer = fc.record({
  counts: fc.constantFrom([1, 0], [0, 1]),
  truth: fc.constantFrom(0, 1),
  missing: fc.constant(0),
});
const anyTrial = fc.record({
  counts: fc.tuple(fc.nat(8), fc.nat(8)),
  truth: fc.constantFrom(0, 1),
  missing: fc.nat(3),
});

describe('laws of the shared-presentation test', () => {
  it('is the binomial test when each trial has one answer [T4]', () => {
    fc.assert(
      fc.property(fc.array(oneAnswer, { minLength: 1, maxLength: 40 }), (trials) => {
        const shared = sharedPresentationTest(trials, 'greater');
        const own = binomialTest(shared.matching, trials.length, evenChance, 'greater');
        expect(shared.p).toBeCloseTo(own.p, 12);
        expect(shared.pFraction).toEqual(
          reduceFraction(exactBinomialUpperTail(shared.matching, trials.length, evenChance)),
        );
        expect(shared.coins).toBe(trials.length);
        expect(shared.leastAttainable).toEqual({ numerator: 1n, denominator: 2n ** BigInt(trials.length) });
      }),
    );
  });

  it('has a distribution that adds up to one, and a p within it [T4]', () => {
    fc.assert(
      fc.property(fc.array(anyTrial, { minLength: 1, maxLength: 20 }), (trials) => {
        const { nullDistribution, p, leastAttainableP } = sharedPresentationTest(trials, 'greater');
        expect(nullDistribution.reduce((sum, { probability }) => sum + probability, 0)).toBeCloseTo(1, 10);
        expect(p).toBeGreaterThanOrEqual(leastAttainableP);
        expect(p).toBeLessThanOrEqual(1);
      }),
    );
  });

  it('does not change when the trials come in another order [T4]', () => {
    fc.assert(
      fc.property(fc.array(anyTrial, { minLength: 1, maxLength: 12 }), (trials) => {
        const there = sharedPresentationTest(trials, 'greater').pFraction;
        const back = sharedPresentationTest([...trials].reverse(), 'greater').pFraction;
        expect(there).toEqual(back);
      }),
    );
  });

  // Every one of the 2^n draws, one by one.
  it('agrees with counting all draws, on both sides and in its moments [T4]', () => {
    fc.assert(
      fc.property(fc.array(anyTrial, { minLength: 1, maxLength: 8 }), (trials) => {
        const counts = Array.from({ length: 2 ** trials.length }, (_, draw) =>
          trials.reduce((sum, trial, index) => sum + (trial.counts[(draw >> index) % 2 === 0 ? 0 : 1] ?? 0), 0),
        );
        const share = (isCounted: (count: number) => boolean) => counts.filter(isCounted).length / counts.length;
        const mean = counts.reduce((sum, count) => sum + count, 0) / counts.length;
        const greater = sharedPresentationTest(trials, 'greater');
        const observed = greater.matching;
        expect(greater.p).toBe(share((count) => count >= observed));
        expect(fractionToNumber(greater.lowerTail)).toBe(share((count) => count <= observed));
        expect(sharedPresentationTest(trials, 'two-sided').p).toBe(
          share((count) => Math.abs(count - mean) >= Math.abs(observed - mean)),
        );
        expect(greater.leastAttainableP).toBe(share((count) => count === Math.max(...counts)));
        expect(sharedPresentationTest(trials, 'two-sided').leastAttainableP).toBe(
          share((count) => Math.abs(count - mean) === Math.max(...counts.map((other) => Math.abs(other - mean)))),
        );
        expect(greater.mean).toBe(mean);
        expect(greater.variance).toBeCloseTo(
          counts.reduce((sum, count) => sum + (count - mean) ** 2, 0) / counts.length,
          10,
        );
        for (const { matching, probability } of greater.nullDistribution)
          expect(probability).toBe(share((count) => count === matching));
      }),
    );
  });

  // 16 listeners, 8 trials, all right: 1/256, not 2^-128.
  it('can never go below one over the number of draws, however many listen [T4]', () => {
    const trials = Array.from({ length: 8 }, (_, index) => ({
      counts: index % 2 === 0 ? [16, 0] : [0, 16],
      truth: index % 2,
      missing: 0,
    }));
    expect(sharedPresentationTest(trials, 'greater')).toMatchObject({
      matching: 128,
      coins: 8,
      pFraction: { numerator: 1n, denominator: 256n },
    });
  });

  it('takes a third label, trials of different size, and no trials at all [T4]', () => {
    const trials = [
      { counts: [2, 0, 1], truth: 0, missing: 0 },
      { counts: [0, 0, 0], truth: 2, missing: 3 },
      { counts: [1, 1], truth: 1, missing: 0 },
    ];
    // Nine draws of the first trial with the empty one, each twice: two of three labels give fewer than 3 matches.
    expect(sharedPresentationTest(trials, 'greater')).toMatchObject({
      matching: 3,
      answers: 8,
      missing: 3,
      coins: 1,
      pFraction: { numerator: 1n, denominator: 3n },
    });
    expect(sharedPresentationTest([], 'greater')).toMatchObject({ p: 1, logP: 0, answers: 0, coins: 0 });
  });
});
