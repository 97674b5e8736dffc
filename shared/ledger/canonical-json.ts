import canonicalize from 'canonicalize';

/** What a record may hold: text, whole numbers that every reader keeps exactly, and nothing undefined. */
export type Json = string | boolean | null | number | readonly Json[] | { readonly [key: string]: Json };

/** What keeps a value from being written, and where: the path is put together only where there is a fault to tell. */
type Fault = { readonly path: string; readonly what: string };

// The second pattern reads pairs and is slow; hardly any text holds a half of one.
const isBroken = (text: string) => /[\ud800-\udfff]/.test(text) && /\p{Surrogate}/u.test(text);

function faultIn(value: unknown): Fault | null {
  if (value === null || typeof value === 'boolean') return null;
  if (typeof value === 'string') return isBroken(value) ? { path: '', what: 'holds a broken character' } : null;
  if (typeof value === 'number')
    return Number.isSafeInteger(value) && !Object.is(value, -0)
      ? null
      : { path: '', what: 'is not a whole number; write decimals as text' };
  const isPlain =
    typeof value === 'object' &&
    (Array.isArray(value) ||
      Object.getPrototypeOf(value) === Object.prototype ||
      Object.getPrototypeOf(value) === null);
  if (!isPlain) return { path: '', what: `is ${typeof value}, which a record cannot hold` };
  // By number in a list, so that one with holes is refused.
  for (const key of Array.isArray(value) ? value.keys() : Object.keys(value)) {
    const fault = faultIn((value as Record<string | number, unknown>)[key]);
    if (fault !== null) return { ...fault, path: `/${key}${fault.path}` };
  }
  return null;
}

/**
 * The canonical text of a value (RFC 8785): the same value gives the same bytes everywhere.
 *
 * Narrower than the RFC on purpose: numbers are safe integers, decimals travel as text.
 *
 * @throws RangeError for anything else than `Json`, naming the place
 * @example canonicalJson({ b: 1, a: 'x' }) // {"a":"x","b":1}
 * @see RFC 8785, JSON Canonicalization Scheme, section 3.2
 */
export function canonicalJson(value: Json): string {
  const fault = faultIn(value);
  if (fault !== null) throw new RangeError(`${fault.path} ${fault.what}`);
  const text = canonicalize(value);
  if (text === undefined) throw new RangeError('nothing to write');
  return text;
}
