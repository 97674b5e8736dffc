import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { aboveGuessing, correctRateOf } from '#shared/statistics/above-guessing.ts';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { equivalenceAboutHalf } from '#shared/statistics/equivalence.ts';
import {
  similarityCriticalCount,
  similarityPower,
  similaritySampleSize,
  similarityTest,
} from '#shared/statistics/similarity.ts';

const third = { numerator: 1, denominator: 3 };
const chances = fc.constantFrom(evenChance, third, 0.1);
const counts = fc.integer({ min: 1, max: 200 }).chain((trials) => fc.tuple(fc.nat(trials), fc.constant(trials)));
const margins = fc.integer({ min: 1, max: 99 }).map((percent) => percent / 100);

describe('similarity', () => {
  // R 4.2.2: pbinom(5, 16, .6), pbinom(8, 16, .75), exhaustive search with pbinom.
  it('licenses a margin of .2 in 16 trials with five right at most, and of .5 with eight [T27]', () => {
    expect(similarityCriticalCount(16, evenChance, 0.2, 0.05)).toMatchObject({ count: 5 });
    expect(similarityCriticalCount(16, evenChance, 0.5, 0.05)).toMatchObject({ count: 8 });
    expect(similarityTest(5, 16, evenChance, 0.2).p).toBeCloseTo(0.019141917618995207, 14);
    const question = { chance: evenChance, alpha: 0.05, trueShare: 0, targetPower: 0.9, limit: 3000 };
    expect(similaritySampleSize({ ...question, margin: 0.2 })).toMatchObject({ nFirst: 214, nSafe: 227 });
    expect([0.3, 0.5].map((margin) => similaritySampleSize({ ...question, margin }).nSafe)).toEqual([100, 35]);
  });

  it('reaches its level exactly when the upper limit lies below the margin [T27]', () => {
    fc.assert(
      fc.property(counts, chances, margins, ([right, trials], chance, margin) => {
        const { p } = similarityTest(right, trials, chance, margin);
        const { oneSidedUpper } = aboveGuessing(right, trials, chance, 0.95);
        fc.pre(Math.abs(p - 0.05) > 1e-9);
        expect(p < 0.05).toBe(oneSidedUpper < margin);
      }),
    );
  });

  it('is what the difference test at the margin leaves, and falls with the margin [T27] [T35]', () => {
    fc.assert(
      fc.property(counts, chances, margins, ([right, trials], chance, margin) => {
        fc.pre(right < trials && margin < 0.98);
        const rate = correctRateOf(margin, chance);
        const { p } = similarityTest(right, trials, chance, margin);
        expect(p + binomialTest(right + 1, trials, rate, 'greater').p).toBeCloseTo(1, 12);
        expect(similarityTest(right, trials, chance, margin + 0.01).p).toBeLessThanOrEqual(p * (1 + 1e-12));
        expect(similarityTest(right + 1, trials, chance, margin).p).toBeGreaterThanOrEqual(p * (1 - 1e-12));
      }),
    );
  });

  it('has a power that falls as more is heard, and no power where the level is out of reach [T27]', () => {
    const powers = [0, 0.05, 0.1, 0.15].map((share) => similarityPower(120, evenChance, 0.2, 0.05, share));
    expect(powers.toSorted((a, b) => b - a)).toEqual(powers);
    expect(similarityPower(3, evenChance, 0.1, 0.05, 0)).toBe(0);
    expect(similarityCriticalCount(3, evenChance, 0.1, 0.05)).toBeNull();
  });

  it('about one half needs both sides, and is the same for either side [T27] [T35]', () => {
    fc.assert(
      fc.property(counts, fc.double({ min: 0.01, max: 0.49, noNaN: true }), ([first, trials], margin) => {
        const there = equivalenceAboutHalf(first, trials, margin);
        const back = equivalenceAboutHalf(trials - first, trials, margin);
        expect(there.p).toBe(Math.max(there.pAgainstLower, there.pAgainstUpper));
        expect(back.p).toBeCloseTo(there.p, 12);
        expect(back.pAgainstLower).toBeCloseTo(there.pAgainstUpper, 12);
      }),
    );
  });
});
