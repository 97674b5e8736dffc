import { readFileSync } from 'node:fs';
import { expect } from 'vitest';

export type ReferenceRecord<I, E> = { id: string; fn: string; inputs: I; expected: E; tol: number; source: string };

/** Check values from R, SciPy and mpmath, of the functions named or of all; the source stands in each record. */
export function reference<I, E>(file: string, ...functions: string[]): ReferenceRecord<I, E>[] {
  const url = new URL(`../fixtures/reference/${file}`, import.meta.url);
  const records = JSON.parse(readFileSync(url, 'utf8')) as ReferenceRecord<I, E>[];
  return functions.length === 0 ? records : records.filter(({ fn }) => functions.includes(fn));
}

const numberOf = (value: number | string) =>
  typeof value === 'number' ? value : value === 'Infinity' ? Infinity : -Infinity;

/** The pass rule: within tol of the larger of |expected| and the floor; 0 for probabilities, 1 for logs, limits and d'. */
export function expectClose(actual: number, expected: number | string, tol: number, floor: 0 | 1, what: string): void {
  const wanted = numberOf(expected);
  if (!Number.isFinite(wanted)) {
    expect(actual, what).toBe(wanted);
    return;
  }
  const allowed = wanted === 0 && floor === 0 ? 1e-12 : tol * Math.max(Math.abs(wanted), floor);
  expect(Math.abs(actual - wanted), `${what}: ${actual} for ${wanted}`).toBeLessThanOrEqual(allowed);
}
