/** What a record expects of one field: numbers, "Infinity", a fraction as text, null for undefined, or lists of these. */
export type Expected = number | string | null | readonly Expected[] | { readonly [name: string]: Expected };

/** How a field is compared. Relative: probabilities, lengths. Scaled: logs, z, d', statistics, limits. Exact: counts. */
export type Kind = 'relative' | 'scaled' | 'exact';

export interface Comparison {
  readonly agrees: boolean;
  /** Largest error in units of max(|expected|, floor); 0 where nothing but equality counts. */
  readonly error: number;
}

const same: Comparison = { agrees: true, error: 0 };
const different: Comparison = { agrees: false, error: 0 };

/**
 * The pass rule of the check values: |actual - expected| <= tol * max(|expected|, floor).
 *
 * The floor is 0 for the relative kind and 1 for the scaled one; an expected 0 of the relative kind must come out below
 * 1e-12; the exact kind has tol 0. Infinities, texts and null must be equal; NaN agrees with nothing.
 */
export function compare(actual: unknown, expected: Expected, tol: number, kind: Kind): Comparison {
  if (Array.isArray(expected)) {
    if (!Array.isArray(actual) || actual.length !== expected.length) return different;
    return worst(expected.map((value, index) => compare(actual[index], value, tol, kind)));
  }
  if (typeof expected === 'object' && expected !== null) {
    if (typeof actual !== 'object' || actual === null) return different;
    const fields = actual as Record<string, unknown>;
    return worst(Object.entries(expected).map(([name, value]) => compare(fields[name], value, tol, kind)));
  }
  const wanted = expected === 'Infinity' ? Infinity : expected === '-Infinity' ? -Infinity : expected;
  if (typeof wanted !== 'number' || !Number.isFinite(wanted) || typeof actual !== 'number') {
    return actual === wanted ? same : different;
  }
  const distance = Math.abs(actual - wanted);
  if (kind === 'exact') return distance === 0 ? same : different;
  if (kind === 'relative' && wanted === 0) return distance <= 1e-12 ? same : different;
  const size = Math.max(Math.abs(wanted), kind === 'scaled' ? 1 : 0);
  return { agrees: distance <= tol * size, error: distance / size };
}

function worst(comparisons: readonly Comparison[]): Comparison {
  return {
    agrees: comparisons.every(({ agrees }) => agrees),
    error: comparisons.reduce((largest, { error }) => Math.max(largest, error), 0),
  };
}
