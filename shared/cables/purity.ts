/**
 * Purity as a percentage, from the trade's count of nines: a digit after N follows the nines.
 *
 * @param nines "1N" ... "9N", or with a digit 1 ... 9 after it
 * @returns the percentage as text; it is a statement, and is not rounded
 * @throws RangeError for anything else
 * @example purityPercent('4N5') // "99.995"
 */
export function purityPercent(nines: string): string {
  const [, count, last] = /^([1-9])N([1-9])?$/.exec(nines) ?? [];
  if (count === undefined) throw new RangeError(`nines must be written like 4N or 4N5, not ${nines}`);
  const digits = `${'9'.repeat(Number(count))}${last ?? ''}`.padEnd(2, '0');
  return digits.length === 2 ? digits : `${digits.slice(0, 2)}.${digits.slice(2)}`;
}
