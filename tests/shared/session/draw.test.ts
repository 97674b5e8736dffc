import { describe, expect, it } from 'vitest';
import { abx } from '#shared/methods/abx.ts';
import { isUsableCode } from '#shared/session/blind-codes.ts';
import { drawSeed, drawSession } from '#shared/session/draw.ts';
import { fairNumber } from '#shared/session/fair-number.ts';

describe('the draw', () => {
  const seed = drawSeed('01'.repeat(32), ['02'.repeat(32), '03'.repeat(32)]);

  it('depends on every part of the seed and on their order [B1]', () => {
    const others = [
      drawSeed('04'.repeat(32), ['02'.repeat(32), '03'.repeat(32)]),
      drawSeed('01'.repeat(32), ['03'.repeat(32), '02'.repeat(32)]),
      drawSeed('01'.repeat(32), ['02'.repeat(32)]),
    ];
    expect(new Set([seed, ...others]).size).toBe(4);
  });

  it('is fair: 6,000 numbers below 6 pass a chi-square test at .001 [B1]', () => {
    const counts = [0, 0, 0, 0, 0, 0];
    for (let index = 0; index < 6000; index += 1) {
      const value = fairNumber(seed, `try/${index}`, 6);
      counts[value] = (counts[value] ?? 0) + 1;
    }
    const chiSquare = counts.reduce((sum, count) => sum + (count - 1000) ** 2 / 1000, 0);
    // qchisq(.999, 5) in R
    expect(chiSquare).toBeLessThan(20.52);
  });

  it('draws each trial for itself: more trials leave the earlier ones as they were [B1]', () => {
    const short = drawSession(seed, abx, { specimenCounts: [2, 2], trials: 10 });
    const long = drawSession(seed, abx, { specimenCounts: [2, 2], trials: 18 });
    expect(long.truths.slice(0, 10)).toEqual(short.truths);
    expect(new Set(long.truths)).toEqual(new Set(['A', 'B']));
  });
});

describe('blind codes', () => {
  it.each(['000', '111', '123', '321', '666', '012', '061', '198'])('leaves out %s [B3]', (code) => {
    expect(isUsableCode(code, [])).toBe(false);
  });

  it('leaves out the reverse and the neighbours of a drawn code [B3]', () => {
    expect(isUsableCode('714', ['417'])).toBe(false);
    expect(isUsableCode('986', ['689'])).toBe(false);
    expect(isUsableCode('418', ['417'])).toBe(false);
    expect(isUsableCode('529', ['417'])).toBe(true);
  });
});
