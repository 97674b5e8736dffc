import { requireWhole } from './domain.ts';

/**
 * In how many ways `chosen` of `all` can be chosen, exactly.
 *
 * @param all    whole, 0 ... 100000
 * @param chosen any whole number; there is no way below 0 and above `all`
 * @returns C(all, chosen)
 * @throws RangeError when an argument is outside its domain
 * @example binomialCoefficient(8, 4) // 70n ; R: choose(8, 4)
 * @see Knuth, The Art of Computer Programming, vol. 1, 3rd ed. (1997), sec. 1.2.6
 */
export function binomialCoefficient(all: number, chosen: number): bigint {
  requireWhole('all', all, 0, 100_000);
  requireWhole('chosen', chosen, Number.MIN_SAFE_INTEGER, Number.MAX_SAFE_INTEGER);
  if (chosen < 0 || chosen > all) return 0n;
  let ways = 1n;
  for (let k = 1; k <= Math.min(chosen, all - chosen); k++) ways = (ways * BigInt(all - k + 1)) / BigInt(k);
  return ways;
}
