import fc from 'fast-check';
import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { describe, expect, it } from 'vitest';
import { evenChance } from '#shared/statistics/chance.ts';
import { groupFindings, pOfShared } from '#shared/statistics/group-power.ts';
import { groupTrialsNeeded } from '#shared/statistics/group-trials-needed.ts';
import { power } from '#shared/statistics/power.ts';
import { sharedPresentationTest } from '#shared/statistics/shared-presentation-test.ts';

const source = (seed: number) => {
  const generator = xoroshiro128plus(seed);
  return () => uniformFloat64(generator);
};
const half = { alpha: 0.05, alternative: 'greater' as const, labels: 2 };

describe('the power of a group', () => {
  it('runs the registered test: the same p in floating point as in whole numbers [W1]', () => {
    const trial = fc
      .integer({ min: 2, max: 3 })
      .chain((labels) => fc.array(fc.integer({ min: 0, max: 9 }), { minLength: labels, maxLength: labels }));
    fc.assert(
      fc.property(
        fc.array(trial, { minLength: 1, maxLength: 12 }),
        fc.constantFrom('greater' as const, 'two-sided' as const),
        (counts, alternative) => {
          const exact = sharedPresentationTest(
            counts.map((given) => ({ counts: given, truth: 0, missing: 0 })),
            alternative,
          );
          expect(pOfShared(counts, alternative)).toBeCloseTo(exact.p, 11);
        },
      ),
    );
  });

  it('of six listeners on seven trials, right seven times in ten, is .61 and not the .84 of own draws [W1]', () => {
    // Simulated with R 4.2.2 beside the specification of the test: .61; the binomial's .84 is exact.
    const found = groupFindings({ ...half, listeners: 6, trials: 7, rate: 0.7 }, 4_000, source(1)) / 4_000;
    expect(found).toBeGreaterThan(0.58);
    expect(found).toBeLessThan(0.64);
  });

  it('of one listener is that of the binomial test [W1]', () => {
    const found = groupFindings({ ...half, listeners: 1, trials: 24, rate: 0.7 }, 8_000, source(2)) / 8_000;
    const exact = power(24, evenChance, 0.05, 0.7).power;
    expect(Math.abs(found - exact)).toBeLessThan(4 * Math.sqrt(0.25 / 8_000));
  });

  it('stays at or below the level when nobody hears a difference, and is the same from the same seed [W1]', () => {
    const plan = { ...half, listeners: 8, trials: 16, rate: 0.5 };
    const found = groupFindings(plan, 4_000, source(3));
    expect(found / 4_000).toBeLessThan(0.05 + 4 * Math.sqrt((0.05 * 0.95) / 4_000));
    expect(groupFindings(plan, 4_000, source(3))).toBe(found);
  });

  it('refuses what is outside its domain', () => {
    expect(() => groupFindings({ ...half, listeners: 0, trials: 5, rate: 0.6 }, 10, source(4))).toThrow(RangeError);
    expect(() => groupFindings({ ...half, listeners: 2, trials: 5, rate: 1.2 }, 10, source(4))).toThrow(RangeError);
  });
});

describe('how many trials a group needs', () => {
  it('is the fewest that reach the goal where power rises, and none where it never does [W3]', () => {
    // 1 - .9^15 is .794, 1 - .9^16 is .815
    expect(groupTrialsNeeded((trials) => 1 - 0.9 ** trials, 0.8, 100)).toBe(16);
    expect(groupTrialsNeeded(() => 0.9, 0.8, 100)).toBe(5);
    expect(groupTrialsNeeded(() => 0.7, 0.8, 100)).toBeNull();
    fc.assert(
      fc.property(fc.integer({ min: 5, max: 400 }), fc.integer({ min: 5, max: 300 }), (from, most) => {
        const found = groupTrialsNeeded((trials) => (trials >= from ? 0.9 : 0.1), 0.8, most);
        expect(found).toBe(from <= most ? from : null);
      }),
    );
  });

  it('of six listeners, right seven times in ten, lies between what own draws and one listener need [W3]', () => {
    const powerOf = (trials: number) =>
      groupFindings({ ...half, listeners: 6, trials, rate: 0.7 }, 400, source(trials)) / 400;
    const needed = groupTrialsNeeded(powerOf, 0.8, 320) ?? Number.NaN;
    // One listener needs 42; 42 answers with draws of their own would be 7 trials of six.
    expect(needed).toBeGreaterThan(7);
    expect(needed).toBeLessThan(20);
  });
});
