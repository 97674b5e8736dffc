import { strFromU8, strToU8 } from 'fflate';

/** Bytes as text in UTF-8, or null where they are none: what does not come back as the same bytes is none. */
export function utf8Text(bytes: Uint8Array): string | null {
  const text = strFromU8(bytes);
  return sameBytes(strToU8(text), bytes) ? text : null;
}

export function sameBytes(a: Uint8Array, b: Uint8Array): boolean {
  if (a.length !== b.length) return false;
  for (let at = 0; at < a.length; at += 1) if (a[at] !== b[at]) return false;
  return true;
}
