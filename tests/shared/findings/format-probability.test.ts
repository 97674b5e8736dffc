import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { equationOfP, formatProbability, formatShare } from '#shared/findings/format-probability.ts';

describe('a probability on screen', () => {
  it.each([
    [2517 / 65536, '0.0384'],
    [0.5, '0.5000'],
    [0.001, '0.0010'],
    [0.000561, '0.00056'],
    [1.526e-5, '1.5e-5'],
    [1e-13, '< 1e-12'],
    [0, '< 1e-12'],
    [0.99999, '> 0.9999'],
    [1, '1'],
  ])('shows %f as %s [T21]', (p, text) => {
    expect(formatProbability(p)).toBe(text);
  });

  it('is never shown as nought, and never as one unless it is one [T21]', () => {
    const probability = fc.oneof(
      fc.double({ min: 0, max: 1, noNaN: true }),
      fc.integer({ min: 1, max: 320 }).map((power) => 10 ** -power),
      fc.integer({ min: 1, max: 52 }).map((power) => 1 - 2 ** -power),
    );
    fc.assert(
      fc.property(probability, (p) => {
        const text = formatProbability(p);
        expect(Number(text.replace(/^[<>] /, ''))).toBeGreaterThan(0);
        if (p < 1) expect(text).not.toMatch(/^1(\.0+)?$/);
      }),
    );
  });

  it('is shown on its own side of the level [T21]', () => {
    expect(equationOfP(2517 / 65536, 0.05)).toBe('p = 0.0384');
    expect(equationOfP(0.05004, 0.05)).toBe('p = 0.05004');
    expect(equationOfP(0.04996, 0.05)).toBe('p = 0.04996');
    expect(equationOfP(0.05, 0.05)).toBe('p = 0.0500');
    expect(equationOfP(1e-20, 0.05)).toBe('p < 1e-12');
    fc.assert(
      fc.property(fc.double({ min: 0.0499, max: 0.0501, noNaN: true }), (p) => {
        const shown = Number(equationOfP(p, 0.05).replace('p = ', ''));
        expect(Math.sign(shown - 0.05)).toBe(Math.sign(p - 0.05));
      }),
    );
  });

  it('rounds a limit in the direction that claims less [T21]', () => {
    expect(formatShare(0.3512, 'up')).toBe('36%');
    expect(formatShare(0.3588, 'down')).toBe('35%');
    expect(formatShare(0.355, 'nearest')).toBe('36%');
    expect(formatShare(0.55, 'up')).toBe('55%');
    expect(formatShare(0.57, 'down')).toBe('57%');
    expect(formatShare(0, 'up')).toBe('0%');
    expect(formatShare(1, 'down')).toBe('100%');
  });

  it('refuses what is no probability [T10]', () => {
    for (const value of [-0.01, 1.01, Number.NaN]) {
      expect(() => formatProbability(value)).toThrow(RangeError);
      expect(() => formatShare(value, 'up')).toThrow(RangeError);
    }
  });
});
