import { type Fraction, reduceFraction } from '../statistics/fraction.ts';

/** Figures that a decimal on the record keeps. */
const figures = 12;

/** What recordDecimal writes. */
export const recordDecimalPattern = /^-?\d+(\.\d+)?(e[+-]\d+)?$/;

/**
 * A number as it stands on the record: decimal text of 12 significant figures, so that every reader hashes the same.
 *
 * @param value a finite number
 * @returns fixed notation from 0.000001 up to 999999999999, exponential outside
 * @throws RangeError when the value is not finite
 * @example recordDecimal(0.5) // "0.500000000000"
 * @example recordDecimal(1 / 65536) // "0.0000152587890625"
 * @see ECMA-262, Number.prototype.toPrecision, which fixes every digit
 */
export function recordDecimal(value: number): string {
  if (!Number.isFinite(value)) throw new RangeError(`${value} has no place on the record`);
  return (value === 0 ? 0 : value).toPrecision(figures);
}

/**
 * A limit as it stands on the record: a decimal, or "Infinity" for a limit that does not exist.
 *
 * @param value a number or Infinity
 * @returns as recordDecimal, or "Infinity"
 * @throws RangeError for NaN and -Infinity
 * @example recordLimit(Number.POSITIVE_INFINITY) // "Infinity"
 */
export function recordLimit(value: number): string {
  return value === Number.POSITIVE_INFINITY ? 'Infinity' : recordDecimal(value);
}

/**
 * A fraction as it stands on the record, in the same notation, computed in whole numbers: it does not underflow and is
 * the same on every machine.
 *
 * @param fraction at least 0, with a positive denominator
 * @returns decimal text of 12 significant figures, halves rounded up
 * @throws RangeError when the fraction is negative or its denominator not positive
 * @example recordDecimalOfFraction({ numerator: 2517n, denominator: 65536n }) // "0.0384063720703"
 */
export function recordDecimalOfFraction(fraction: Fraction): string {
  const { numerator, denominator } = reduceFraction(fraction);
  if (numerator < 0n) throw new RangeError('a negative fraction is no probability');
  if (numerator === 0n) return recordDecimal(0);
  let exponent = numerator.toString().length - denominator.toString().length;
  if (isBelowPowerOfTen(numerator, denominator, exponent)) exponent--;
  const shift = figures - 1 - exponent;
  const top = shift > 0 ? numerator * 10n ** BigInt(shift) : numerator;
  const bottom = shift < 0 ? denominator * 10n ** BigInt(-shift) : denominator;
  const digits = ((2n * top + bottom) / (2n * bottom)).toString();
  return digits.length > figures ? write(digits.slice(0, figures), exponent + 1) : write(digits, exponent);
}

function isBelowPowerOfTen(numerator: bigint, denominator: bigint, exponent: number): boolean {
  return exponent >= 0
    ? numerator < denominator * 10n ** BigInt(exponent)
    : numerator * 10n ** BigInt(-exponent) < denominator;
}

/** Places the point as toPrecision does. */
function write(digits: string, exponent: number): string {
  if (exponent < -6 || exponent >= figures) {
    return `${digits.slice(0, 1)}.${digits.slice(1)}e${exponent < 0 ? '-' : '+'}${Math.abs(exponent)}`;
  }
  if (exponent < 0) return `0.${'0'.repeat(-exponent - 1)}${digits}`;
  const whole = digits.slice(0, exponent + 1);
  const part = digits.slice(exponent + 1);
  return part === '' ? whole : `${whole}.${part}`;
}
