import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { shareOfDay, shareOfWeek, shareText, soundDose } from '#shared/exposure/sound-dose.ts';
import { adviceOn } from '#shared/exposure/sound-level.ts';

describe('the sound dose', () => {
  it('of 80 dBA for 40 h is the 1.6 Pa²h that a week allows (WHO/ITU H.870) [S71]', () => {
    expect(soundDose({ tenthsDba: 800, minutes: 40 * 60 })).toBeCloseTo(1.6, 6);
    expect(shareOfWeek([{ tenthsDba: 750, minutes: 40 * 60 }], 'sensitive')).toBeCloseTo(1, 6);
  });

  // Computed beforehand from 10^((L - 80) / 10) * 1.5 h / 40 h.
  it.each([
    [78, 0.024],
    [83, 0.075],
    [85, 0.119],
    [90, 0.375],
  ])('of 90 minutes at %i dBA uses %f of the weekly allowance [S71]', (dba, share) => {
    expect(shareOfWeek([{ tenthsDba: dba * 10, minutes: 90 }], 'adults')).toBeCloseTo(share, 3);
  });

  it.each([
    [85, 480],
    [88, 240],
    [91, 120],
    [100, 15],
  ])('of %i dBA for %i minutes is a day by NIOSH [S71]', (dba, minutes) => {
    expect(shareOfDay([{ tenthsDba: dba * 10, minutes }])).toBeCloseTo(1, 9);
  });

  it('adds up, and doubles with the time [S71]', () => {
    fc.assert(
      fc.property(fc.integer({ min: 300, max: 1200 }), fc.integer({ min: 1, max: 600 }), (tenthsDba, minutes) => {
        const stay = { tenthsDba, minutes };
        for (const share of [shareOfWeek([stay, stay], 'adults') / shareOfWeek([stay], 'adults')])
          expect(share).toBeCloseTo(2, 9);
        expect(shareOfDay([{ tenthsDba, minutes: 2 * minutes }])).toBeCloseTo(shareOfDay([stay, stay]), 9);
      }),
      { numRuns: 30 },
    );
  });

  it('is never written smaller than it is, and refuses what cannot be [S71]', () => {
    expect([0.0748, 0.075, 0, 1.2001].map(shareText)).toEqual(['7.5 %', '7.5 %', '0.0 %', '120.1 %']);
    expect(() => soundDose({ tenthsDba: -1, minutes: 1 })).toThrow(RangeError);
    expect(() => shareOfDay([{ tenthsDba: 800, minutes: -1 }])).toThrow(RangeError);
  });
});

describe('advice on sound level', () => {
  it.each([
    [699, 'quiet'],
    [700, 'recommended'],
    [800, 'recommended'],
    [801, 'loud'],
    [829, 'loud'],
    [830, 'warned'],
    [899, 'warned'],
    [900, 'refused'],
  ] as const)('on %i tenths of dBA is “%s” [S72]', (tenthsDba, advice) => {
    expect(adviceOn({ tenthsDba })).toBe(advice);
  });
});
