/**
 * The logarithm of a sum of two numbers given by their logarithms.
 *
 * @param first  natural logarithm of the first number; -Infinity stands for 0
 * @param second natural logarithm of the second
 * @returns log(exp(first) + exp(second)) without leaving the range of a double
 * @example logOfSum(-1000, -1000) // -999.3068528194401 = -1000 + ln 2
 */
export function logOfSum(first: number, second: number): number {
  const larger = Math.max(first, second);
  if (larger === Number.NEGATIVE_INFINITY) return larger;
  return larger + Math.log1p(Math.exp(Math.min(first, second) - larger));
}

/**
 * The logarithm of the complement of a probability given by its logarithm.
 *
 * Uses expm1 near 1 and log1p elsewhere, so that neither end loses digits.
 *
 * @param logProbability natural logarithm of a probability, at most 0
 * @returns log(1 - exp(logProbability)); -Infinity for probability 1
 * @example logOfComplement(Math.log(0.25)) // -0.2876820724517809 = ln 0.75
 * @see Machler, "Accurately computing log(1 - exp(-|a|))", vignette of the R package Rmpfr (2012), sec. 2
 */
export function logOfComplement(logProbability: number): number {
  return logProbability > -Math.LN2 ? Math.log(-Math.expm1(logProbability)) : Math.log1p(-Math.exp(logProbability));
}
