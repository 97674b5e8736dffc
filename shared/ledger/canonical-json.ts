import canonicalize from 'canonicalize';

/** What a record may hold: text, whole numbers that every reader keeps exactly, and nothing undefined. */
export type Json = string | boolean | null | number | readonly Json[] | { readonly [key: string]: Json };

function check(value: unknown, path: string): void {
  if (value === null || typeof value === 'boolean') return;
  if (typeof value === 'string') {
    if (/\p{Surrogate}/u.test(value)) throw new RangeError(`${path} holds a broken character`);
    return;
  }
  if (typeof value === 'number') {
    if (!Number.isSafeInteger(value) || Object.is(value, -0))
      throw new RangeError(`${path} is not a whole number; write decimals as text`);
    return;
  }
  if (Array.isArray(value)) {
    for (const [index, item] of value.entries()) check(item, `${path}/${index}`);
    return;
  }
  if (
    typeof value === 'object' &&
    (Object.getPrototypeOf(value) === Object.prototype || Object.getPrototypeOf(value) === null)
  ) {
    for (const [key, item] of Object.entries(value)) check(item, `${path}/${key}`);
    return;
  }
  throw new RangeError(`${path} is ${typeof value}, which a record cannot hold`);
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
  check(value, '');
  const text = canonicalize(value);
  if (text === undefined) throw new RangeError('nothing to write');
  return text;
}
