import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { evenChance } from '#shared/statistics/chance.ts';
import { criticalCount } from '#shared/statistics/critical-count.ts';
import { detectableRate } from '#shared/statistics/detectable-rate.ts';
import { power } from '#shared/statistics/power.ts';
import { sampleSize } from '#shared/statistics/sample-size.ts';
import { isUpperTailAtMost } from '#shared/statistics/tail-at-most.ts';
import { expectClose } from '../../support/reference.ts';

describe('the smallest number right', () => {
  // 1/10, 1/100 and 1/1000 are ties with the level; R's pbinom misses them by its last bit.
  it('reaches a level that it equals, whatever doubles make of 0.1 [T11]', () => {
    expect(criticalCount(1, 0.1, 0.1)?.count).toBe(1);
    expect(criticalCount(2, 0.1, 0.01)?.count).toBe(2);
    expect(criticalCount(3, { numerator: 1, denominator: 10 }, 0.001)?.count).toBe(3);
  });

  // 1/16 = 0.0625 and 2517/65536 = 0.0384063720703125, written out.
  it('takes a tie with the level as reached, and a hair less as not [T11]', () => {
    expect(isUpperTailAtMost(4, 4, evenChance, 0.0625)).toBe(true);
    expect(isUpperTailAtMost(4, 4, evenChance, 0.06249999999)).toBe(false);
    expect(isUpperTailAtMost(12, 16, evenChance, 0.0384063720703125)).toBe(true);
    expect(isUpperTailAtMost(12, 16, evenChance, 0.0384063720703)).toBe(false);
  });

  it('is the smallest: one fewer does not reach the level [T2]', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 400 }), fc.constantFrom(0.1, 0.05, 0.01, 0.001), (trials, alpha) => {
        const found = criticalCount(trials, evenChance, alpha);
        expect(isUpperTailAtMost((found?.count ?? trials + 1) - 1, trials, evenChance, alpha)).toBe(false);
        expect(found?.attainedSize ?? 0).toBeLessThanOrEqual(alpha);
        expect(found === null).toBe(0.5 ** trials > alpha);
      }),
    );
  });

  it('does not exist where even all right falls short [T2]', () => {
    expect(criticalCount(4, evenChance, 0.05)).toBeNull();
    expect(power(4, evenChance, 0.05, 0.9)).toEqual({ critical: null, power: 0 });
  });
});

describe('power and the number of trials', () => {
  it('is weaker with 20 trials than with 16 for a listener right 60 % of the time [T5]', () => {
    expect(power(20, evenChance, 0.05, 0.6).power).toBeLessThan(power(16, evenChance, 0.05, 0.6).power);
  });

  it('has the power asked for at every number from the safe one on, and not just before it [T5]', () => {
    for (const correctRate of [0.6, 0.7, 0.75, 0.9]) {
      const found = sampleSize({ chance: evenChance, alpha: 0.05, correctRate, targetPower: 0.8, limit: 3000 });
      const { nSafe, nFirst, guaranteedFrom } = found;
      if (nSafe === null || nFirst === null) throw new Error(`no number of trials for ${correctRate}`);
      const reaches = (trials: number) => power(trials, evenChance, 0.05, correctRate).power >= 0.8;
      for (let trials = nSafe; trials <= guaranteedFrom + 50; trials++) expect(reaches(trials), `${trials}`).toBe(true);
      for (let trials = 1; trials < nFirst; trials++) expect(reaches(trials), `${trials}`).toBe(false);
      if (nSafe > nFirst) expect(reaches(nSafe - 1)).toBe(false);
    }
  });

  it('does not call a number safe when the limit of the search cannot show it [T5]', () => {
    const question = { chance: evenChance, alpha: 0.05, correctRate: 0.75, targetPower: 0.8 };
    expect(sampleSize({ ...question, limit: 30 })).toMatchObject({ nFirst: 23, nSafe: null, powerAtSafe: null });
    expect(sampleSize({ ...question, limit: 20 })).toMatchObject({ nFirst: null, nSafe: null });
    expect(sampleSize({ ...question, limit: 1000 })).toMatchObject({ nFirst: 23, nSafe: 28 });
  });

  it('is exactly the power asked for at the detectable rate, and has none where the level is out of reach [T5]', () => {
    for (const trials of [5, 16, 40, 1000]) {
      const rate = detectableRate(trials, evenChance, 0.05, 0.8);
      if (rate === null) throw new Error(`none for ${trials}`);
      expectClose(power(trials, evenChance, 0.05, rate).power, 0.8, 1e-10, 0, `${trials}`);
    }
    expect(detectableRate(4, evenChance, 0.05, 0.8)).toBeNull();
  });
});
