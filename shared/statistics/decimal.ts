import type { Fraction } from './fraction.ts';

const written = /^(\d+)(?:\.(\d+))?(?:e([+-]?\d{1,3}))?$/;

/**
 * The exact ratio that a written decimal stands for.
 *
 * A level such as 0.05 has no exact double; read as 5/100 it can be compared with an exact p-value without rounding.
 *
 * @param text digits with an optional point and exponent, not negative: "0.05", "1", "1e-7"
 * @returns the ratio, not reduced
 * @throws RangeError when the text is not such a decimal
 * @example parseDecimal('0.05') // 5/100
 */
export function parseDecimal(text: string): Fraction {
  const parts = written.exec(text);
  if (parts === null) throw new RangeError(`"${text}" is not a decimal number`);
  const [, whole = '', part = '', exponent = '0'] = parts;
  const shift = Number(exponent) - part.length;
  const digits = BigInt(whole + part);
  return shift >= 0
    ? { numerator: digits * 10n ** BigInt(shift), denominator: 1n }
    : { numerator: digits, denominator: 10n ** BigInt(-shift) };
}

/**
 * The exact ratio of the shortest decimal that a number prints as: 0.1 is read as 1/10, which is what was meant,
 * and not as the double 0.1000000000000000055 that stands in for it.
 *
 * @param value a finite number, at least 0
 * @returns the ratio, not reduced
 * @throws RangeError when the value is negative or not finite
 * @example decimalOfNumber(0.05) // 5/100
 */
export function decimalOfNumber(value: number): Fraction {
  return parseDecimal(String(value));
}
