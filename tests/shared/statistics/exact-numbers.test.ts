import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { chanceAsFraction, chanceAsNumbers } from '#shared/statistics/chance.ts';
import { decimalOfNumber, parseDecimal } from '#shared/statistics/decimal.ts';
import { compareFractions, fractionToLog, fractionToNumber, reduceFraction } from '#shared/statistics/fraction.ts';
import { expectClose } from '../../support/reference.ts';

const positive = fc.bigInt({ min: 1n, max: 10n ** 40n });

describe('exact numbers', () => {
  it('become the nearest double, as a division of two doubles does [T11]', () => {
    const small = fc.integer({ min: 1, max: 2 ** 31 });
    fc.assert(
      fc.property(small, small, (a, b) => {
        expect(fractionToNumber({ numerator: BigInt(a), denominator: BigInt(b) })).toBe(a / b);
        expect(fractionToNumber({ numerator: BigInt(-a), denominator: BigInt(b) })).toBe(-a / b);
      }),
    );
  });

  it('become the nearest double beyond its whole numbers too, down to the smallest [T11]', () => {
    // 2^53 + 1 lies halfway between two doubles and goes to the even one; one more bit tips it upwards.
    expect(fractionToNumber({ numerator: 2n ** 53n + 1n, denominator: 1n })).toBe(2 ** 53);
    expect(fractionToNumber({ numerator: 2n ** 63n + 2n ** 10n + 1n, denominator: 2n ** 10n })).toBe(2 ** 53 + 2);
    expect(fractionToNumber({ numerator: 1n, denominator: 2n ** 1074n })).toBe(Number.MIN_VALUE);
    expect(fractionToNumber({ numerator: 1n, denominator: 2n ** 2000n })).toBe(0);
    expect(fractionToNumber({ numerator: 0n, denominator: 5n })).toBe(0);
  });

  it('keep their logarithm where a double gives out [T11]', () => {
    expectClose(fractionToLog({ numerator: 1n, denominator: 2n ** 2000n }), -2000 * Math.LN2, 1e-15, 1, '2^-2000');
    expectClose(fractionToLog({ numerator: 3n ** 2000n, denominator: 1n }), 2000 * Math.log(3), 1e-15, 1, '3^2000');
    // log(1 - 1e-20) = -1e-20: the logarithm of the nearest double, 1, would be 0.
    expectClose(fractionToLog({ numerator: 10n ** 20n - 1n, denominator: 10n ** 20n }), -1e-20, 1e-15, 0, 'near 1');
    expect(fractionToLog({ numerator: 0n, denominator: 1n })).toBe(Number.NEGATIVE_INFINITY);
  });

  it('compare without rounding, and keep their value in lowest terms [T11]', () => {
    fc.assert(
      fc.property(positive, positive, positive, (numerator, denominator, factor) => {
        const fraction = { numerator, denominator };
        const blownUp = { numerator: numerator * factor, denominator: denominator * factor };
        expect(compareFractions(fraction, blownUp)).toBe(0);
        expect(reduceFraction(blownUp)).toEqual(reduceFraction(fraction));
        expect(
          compareFractions(fraction, { numerator: blownUp.numerator + 1n, denominator: blownUp.denominator }),
        ).toBe(-1);
      }),
    );
  });

  it('are read from decimals as they are written [T11]', () => {
    expect(parseDecimal('0.05')).toEqual({ numerator: 5n, denominator: 100n });
    expect(parseDecimal('1e-7')).toEqual({ numerator: 1n, denominator: 10_000_000n });
    expect(parseDecimal('2e3')).toEqual({ numerator: 2000n, denominator: 1n });
    expect(reduceFraction(decimalOfNumber(0.1))).toEqual({ numerator: 1n, denominator: 10n });
    for (const text of ['', '.5', '-0.05', '5 %', '0,05', 'NaN', '1e9999'])
      expect(() => parseDecimal(text), text).toThrow(RangeError);
  });

  it('make a third of a chance the third itself, converted once [T11]', () => {
    expect(chanceAsNumbers({ numerator: 1, denominator: 3 })).toEqual({ right: 1 / 3, wrong: 2 / 3 });
    expect(chanceAsFraction({ numerator: 1, denominator: 3 })).toEqual({ numerator: 1n, denominator: 3n });
    expect(chanceAsFraction(0.25)).toEqual({ numerator: 25n, denominator: 100n });
  });
});
