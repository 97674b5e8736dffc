import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { evenChance } from '#shared/statistics/chance.ts';
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
});
