/**
 * Refuses a count that is not a whole number within its range.
 *
 * @param name    the argument as its function calls it, for the message
 * @param value   the argument
 * @param minimum smallest value allowed
 * @param maximum largest value allowed; Number.MAX_SAFE_INTEGER where nothing smaller applies
 * @throws RangeError naming the argument and its range
 * @example requireWhole('trials', 2.5, 1, 100) // RangeError: trials must be a whole number from 1 to 100, not 2.5
 */
export function requireWhole(name: string, value: number, minimum: number, maximum: number): void {
  if (!Number.isSafeInteger(value) || value < minimum || value > maximum) {
    throw new RangeError(`${name} must be a whole number from ${minimum} to ${maximum}, not ${value}`);
  }
}

/**
 * Refuses a number outside an interval; `NaN` is always outside.
 *
 * @param name  the argument as its function calls it, for the message
 * @param value the argument
 * @param low   lower end
 * @param high  upper end
 * @param ends  whether the two ends themselves are allowed
 * @throws RangeError naming the argument and its range
 * @example requireBetween('alpha', 0, 0, 1, 'open') // RangeError: alpha must lie strictly between 0 and 1, not 0
 */
export function requireBetween(name: string, value: number, low: number, high: number, ends: 'open' | 'closed'): void {
  const isInside = ends === 'open' ? value > low && value < high : value >= low && value <= high;
  if (!isInside) {
    const how = ends === 'open' ? 'strictly between' : 'between';
    throw new RangeError(`${name} must lie ${how} ${low} and ${high}, not ${value}`);
  }
}
