/** A ratio of two whole numbers, exact at any size. The denominator is positive. */
export interface Fraction {
  readonly numerator: bigint;
  readonly denominator: bigint;
}

/**
 * The same ratio in lowest terms.
 *
 * @param fraction any fraction with a positive denominator
 * @returns numerator and denominator without a common divisor
 * @throws RangeError when the denominator is not positive
 * @example reduceFraction({ numerator: 2517n, denominator: 65536n }) // unchanged: 2517 is odd, 65536 = 2^16
 * @see Knuth, The Art of Computer Programming, vol. 2, 3rd ed. (1997), sec. 4.5.1
 */
export function reduceFraction({ numerator, denominator }: Fraction): Fraction {
  requirePositive(denominator);
  let a = numerator < 0n ? -numerator : numerator;
  let b = denominator;
  while (b !== 0n) [a, b] = [b, a % b];
  return { numerator: numerator / a, denominator: denominator / a };
}

/**
 * Which of two fractions is the larger, without rounding.
 *
 * @param left  first fraction
 * @param right second fraction
 * @returns -1 when left is smaller, 0 when they are equal, 1 when left is larger
 * @throws RangeError when a denominator is not positive
 * @example compareFractions({ numerator: 1n, denominator: 16n }, { numerator: 625n, denominator: 10000n }) // 0
 */
export function compareFractions(left: Fraction, right: Fraction): -1 | 0 | 1 {
  requirePositive(left.denominator);
  requirePositive(right.denominator);
  const difference = left.numerator * right.denominator - right.numerator * left.denominator;
  if (difference === 0n) return 0;
  return difference < 0n ? -1 : 1;
}

/**
 * The double nearest to a fraction.
 *
 * Divides in whole numbers to 66 bits, keeps a sticky bit for the remainder, and lets one rounding to 53 bits follow.
 *
 * @param fraction any fraction with a positive denominator
 * @returns the nearest double; 0 only when the fraction is 0 or smaller than half of 5e-324
 * @throws RangeError when the denominator is not positive
 * @example fractionToNumber({ numerator: 299n, denominator: 4096n }) // 0.072998046875 ; R: 299/4096
 * @see Goldberg, "What every computer scientist should know about floating-point arithmetic",
 *   ACM Computing Surveys 23 (1991), 5-48, on guard and sticky digits
 */
export function fractionToNumber({ numerator, denominator }: Fraction): number {
  requirePositive(denominator);
  if (numerator < 0n) return -fractionToNumber({ numerator: -numerator, denominator });
  if (numerator === 0n) return 0;
  const shift = 66 - (bitLength(numerator) - bitLength(denominator));
  const top = shift > 0 ? numerator << BigInt(shift) : numerator;
  const bottom = shift < 0 ? denominator << BigInt(-shift) : denominator;
  const quotient = top / bottom;
  const sticky = top % bottom === 0n ? quotient : quotient | 1n;
  const half = Math.trunc(shift / 2);
  return Number(sticky) * 2 ** -half * 2 ** -(shift - half);
}

/**
 * The natural logarithm of a fraction, also where the fraction itself is too small or too large for a double.
 *
 * @param fraction a fraction that is not negative
 * @returns its logarithm; -Infinity for 0
 * @throws RangeError when the numerator is negative or the denominator not positive
 * @example fractionToLog({ numerator: 1n, denominator: 2n ** 2000n }) // -1386.294361119890... = -2000 ln 2
 */
export function fractionToLog({ numerator, denominator }: Fraction): number {
  requirePositive(denominator);
  if (numerator < 0n) throw new RangeError('a negative fraction has no logarithm');
  if (numerator === 0n) return Number.NEGATIVE_INFINITY;
  const exponent = bitLength(numerator) - bitLength(denominator);
  if (Math.abs(exponent) <= 1) {
    return Math.log1p(fractionToNumber({ numerator: numerator - denominator, denominator }));
  }
  const scaled =
    exponent > 0
      ? { numerator, denominator: denominator << BigInt(exponent) }
      : { numerator: numerator << BigInt(-exponent), denominator };
  return exponent * Math.LN2 + Math.log(fractionToNumber(scaled));
}

function bitLength(positive: bigint): number {
  const hexadecimal = positive.toString(16);
  return (hexadecimal.length - 1) * 4 + (32 - Math.clz32(Number.parseInt(hexadecimal.charAt(0), 16)));
}

function requirePositive(denominator: bigint): void {
  if (denominator <= 0n) throw new RangeError('the denominator of a fraction must be positive');
}
