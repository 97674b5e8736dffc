import type { Json } from '../ledger/canonical-json.ts';
import { recordDecimalPattern } from './record-decimal.ts';

/** How far limits and d′ may lie apart: engines differ in the last digits of Math.log, Math.exp and their like. */
const tolerance = 1e-9;

/** p values come from fractions of whole numbers, which every machine computes alike. */
const isExact = (name: string) => name === 'p' || name.endsWith('P');

/** Whole numbers written as text are counts or parts of a fraction, and no decimals. */
const isDecimal = (value: Json): value is string =>
  typeof value === 'string' && recordDecimalPattern.test(value) && /[.e]/.test(value);

function isNear(a: string, b: string): boolean {
  const [x, y] = [Number(a), Number(b)];
  return Math.abs(x - y) <= tolerance * Math.max(1, Math.abs(x), Math.abs(y));
}

/**
 * The first place at which two results differ, whatever their method: whole numbers, words, fractions and p values
 * exactly, other decimals within 1e-9 (absolute below 1, relative above).
 *
 * Fields named `p`, or ending in `P`, and all that lies inside them are compared exactly.
 *
 * @returns a path such as `estimates/interval/lower`, or null when nothing differs
 */
export function differentFigure(a: Json, b: Json, path = '', exact = false): string | null {
  const here = path === '' ? 'the whole' : path;
  if (Array.isArray(a) && Array.isArray(b)) {
    if (a.length !== b.length) return here;
    return firstOf(a.keys(), (index) =>
      differentFigure(a[index] ?? null, b[index] ?? null, join(path, String(index)), exact),
    );
  }
  if (isObject(a) && isObject(b)) {
    const names = [...new Set([...Object.keys(a), ...Object.keys(b)])];
    return firstOf(names, (name) => {
      const [left, right] = [a[name], b[name]];
      if (left === undefined || right === undefined) return join(path, name);
      return differentFigure(left, right, join(path, name), exact || isExact(name));
    });
  }
  if (a === b) return null;
  return !exact && isDecimal(a) && isDecimal(b) && isNear(a, b) ? null : here;
}

const join = (path: string, name: string) => (path === '' ? name : `${path}/${name}`);

const isObject = (value: Json): value is { readonly [key: string]: Json } =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

function firstOf<T>(items: Iterable<T>, look: (item: T) => string | null): string | null {
  for (const item of items) {
    const found = look(item);
    if (found !== null) return found;
  }
  return null;
}
