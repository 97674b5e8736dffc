import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { redrawTest } from '#shared/statistics/redraw-test.ts';
import { repeatableUniform } from '#shared/statistics/repeatable-uniform.ts';
import { sharedPresentationTest } from '#shared/statistics/shared-presentation-test.ts';

describe('the test over fresh draws', () => {
  it('gives the p, mean and variance of the shared-presentation test, which counts in whole numbers [S101]', () => {
    const trial = fc.record({ counts: fc.array(fc.nat(9), { minLength: 3, maxLength: 3 }), truth: fc.nat(2) });
    fc.assert(
      fc.property(fc.array(trial, { maxLength: 8 }), (trials) => {
        const exact = sharedPresentationTest(
          trials.map((one) => ({ ...one, missing: 0 })),
          'two-sided',
        );
        const test = redrawTest(
          trials.map(({ counts, truth }) => ({ scores: counts.map((n) => n - 4), drawn: truth })),
        );
        expect(test.p).toBeCloseTo(exact.p, 9);
        expect(test.deviation ** 2).toBeCloseTo(exact.variance, 6);
      }),
      { numRuns: 60 },
    );
  });

  it('is 1 without trials, takes very large scores coarsely, and refuses what is no score [S101]', () => {
    expect(redrawTest([]).p).toBe(1);
    const large = Array.from({ length: 12 }, (_, index) => ({ scores: [1e6 + index, -1e6 - index], drawn: 0 }));
    expect(redrawTest(large).p).toBeCloseTo(2 / 2 ** 12, 9);
    expect(() => redrawTest([{ scores: [0.5, 1], drawn: 0 }])).toThrow(RangeError);
    expect(() => redrawTest([{ scores: [0, 1], drawn: 2 }])).toThrow(RangeError);
  });
});

describe('numbers for a simulation', () => {
  it('start as the published generator does, and refuse a seed of 0 [S106]', () => {
    const uniform = repeatableUniform(2463534242);
    expect(uniform() * 2 ** 32).toBe(723471715);
    expect(uniform() * 2 ** 32).toBe(2497366906);
    expect(() => repeatableUniform(0)).toThrow(RangeError);
  });
});
