import fc from 'fast-check';
import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { describe, expect, it } from 'vitest';
import { groupUpperLimits, upperLimitOverTrials } from '#shared/statistics/group-margin.ts';
import { trialClusterInterval } from '#shared/statistics/shared-cluster-interval.ts';

const source = (seed: number) => {
  const generator = xoroshiro128plus(seed);
  return () => uniformFloat64(generator);
};

describe('what a guessing group leaves open', () => {
  // R: r <- c(3,1,2,2); p <- mean(r)/3; p + qt(.95, 3) * sqrt(4/3 * sum((r - 3*p)^2)) / 12
  it('is the limit over trials that R gives, and everything where nothing varies [W6]', () => {
    expect(upperLimitOverTrials([3, 1, 2, 2], 3)).toBeCloseTo(0.986918866366, 11);
    expect(upperLimitOverTrials([2, 2, 2], 4)).toBe(1);
  });

  it('is the upper end of the interval of .90 that the analysis gives of the same answers [W6]', () => {
    const groups = fc
      .integer({ min: 1, max: 6 })
      .chain((listeners) =>
        fc.tuple(
          fc.constant(listeners),
          fc.array(fc.integer({ min: 0, max: listeners }), { minLength: 2, maxLength: 20 }),
        ),
      );
    fc.assert(
      fc.property(groups, ([listeners, right]) => {
        const answers = right.flatMap((count, trial) =>
          Array.from({ length: listeners }, (_, listener) => ({
            listener: `L${listener}`,
            trial: `${trial}`,
            isRight: listener < count,
          })),
        );
        const { interval } = trialClusterInterval(answers, 0.9);
        expect(upperLimitOverTrials(right, listeners)).toBeCloseTo(interval?.upper ?? 1, 10);
      }),
    );
  });

  // R, 20,000 studies: 6 listeners on 42 trials stay below a margin of .2 in .932, on 16 trials in .583; medians .553, .588.
  it('shows a margin as often as simulated in R, and the same from the same seed [W6]', () => {
    const shown = (trials: number) => {
      const limits = groupUpperLimits({ listeners: 6, trials, guessing: 0.5 }, 4_000, source(5));
      return { share: limits.filter((limit) => limit < 0.6).length / 4_000, limits };
    };
    expect(Math.abs(shown(42).share - 0.932)).toBeLessThan(4 * Math.sqrt((0.932 * 0.068) / 4_000));
    expect(Math.abs(shown(16).share - 0.583)).toBeLessThan(4 * Math.sqrt((0.583 * 0.417) / 4_000));
    expect(shown(16).limits).toEqual(shown(16).limits);
    expect(shown(42).limits.toSorted((a, b) => a - b)[2_000]).toBeCloseTo(0.553, 2);
  });

  it('refuses what is outside its domain', () => {
    const plan = { listeners: 2, trials: 5, guessing: 0.5 };
    expect(() => groupUpperLimits({ ...plan, trials: 1 }, 1, source(1))).toThrow(RangeError);
    expect(() => groupUpperLimits({ ...plan, guessing: 1 }, 1, source(1))).toThrow(RangeError);
  });
});
