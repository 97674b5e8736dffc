import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  recordDecimal,
  recordDecimalOfFraction,
  recordDecimalPattern,
  recordLimit,
} from '#shared/findings/record-decimal.ts';
import { fractionToNumber } from '#shared/statistics/fraction.ts';

describe('a decimal on the record', () => {
  it('has twelve significant figures, in text [T20]', () => {
    expect(recordDecimal(0.5)).toBe('0.500000000000');
    expect(recordDecimal(0)).toBe('0.00000000000');
    expect(recordDecimal(-0)).toBe('0.00000000000');
    expect(recordDecimal(1 / 65536)).toBe('0.0000152587890625');
    expect(recordDecimal(2 ** -40)).toBe('9.09494701773e-13');
    expect(recordLimit(Number.POSITIVE_INFINITY)).toBe('Infinity');
  });

  it('refuses what is no number [T10]', () => {
    for (const value of [Number.NaN, Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY])
      expect(() => recordDecimal(value)).toThrow(RangeError);
    expect(() => recordLimit(Number.NaN)).toThrow(RangeError);
    expect(() => recordDecimalOfFraction({ numerator: -1n, denominator: 2n })).toThrow(RangeError);
  });

  it('comes back within twelve figures, and in the pattern of the record [T20]', () => {
    fc.assert(
      fc.property(fc.double({ min: -1e15, max: 1e15, noNaN: true }), (value) => {
        const text = recordDecimal(value);
        expect(text).toMatch(recordDecimalPattern);
        expect(Math.abs(Number(text) - value)).toBeLessThanOrEqual(5.001e-12 * Math.abs(value));
      }),
    );
  });

  it('is the same from a fraction as from its double, digit for digit [T20]', () => {
    const whole = fc.bigInt({ min: 1n, max: 10n ** 14n });
    fc.assert(
      fc.property(whole, whole, (numerator, denominator) => {
        const fraction = { numerator, denominator };
        const text = recordDecimalOfFraction(fraction);
        const exact = numerator * 10n ** 40n;
        // Where the next figures are a five and noughts the double may fall to the other side; nothing else may differ.
        if (isNearHalf(text, exact / denominator)) return;
        expect(text).toBe(recordDecimal(fractionToNumber(fraction)));
      }),
    );
  });

  it('does not vanish where a double does [T20]', () => {
    expect(recordDecimalOfFraction({ numerator: 1n, denominator: 10n ** 400n })).toBe('1.00000000000e-400');
    expect(recordDecimalOfFraction({ numerator: 2517n, denominator: 65536n })).toBe('0.0384063720703');
    expect(recordDecimalOfFraction({ numerator: 999_999_999_999_9n, denominator: 10n ** 13n })).toBe('1.00000000000');
    expect(recordDecimalOfFraction({ numerator: 0n, denominator: 7n })).toBe('0.00000000000');
  });
});

/** Whether the figures after the twelfth begin with 4999 or 5000. */
function isNearHalf(text: string, scaled: bigint): boolean {
  const figures = scaled.toString();
  return text.length > 0 && /^\d{12}(4999|5000)/.test(figures);
}
