import { hmac } from '@noble/hashes/hmac.js';
import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, concatBytes, hexToBytes, utf8ToBytes } from '@noble/hashes/utils.js';

// Digests come from @noble/hashes and not from crypto.subtle: browsers withhold the latter on plain-http
// addresses of a local network, where phones are, and it is asynchronous.

/** What a digest is made for. The domain is hashed first, so that a digest made for one purpose never passes for another. */
export const domains = {
  protocol: 'fairlead/protocol/1',
  entry: 'fairlead/entry/1',
  answer: 'fairlead/answer/1',
  remark: 'fairlead/remark/1',
  request: 'fairlead/request/1',
  contribution: 'fairlead/contribution/1',
  drawSecret: 'fairlead/draw-secret/1',
  codeKey: 'fairlead/code-key/1',
  drawSeed: 'fairlead/draw-seed/1',
  studyMark: 'fairlead/study-mark/1',
} as const;
export type Domain = keyof typeof domains;

/**
 * SHA-256 over a domain, a zero byte and the parts in order.
 *
 * Parts are joined without separators: give parts of fixed length, or one canonical text.
 *
 * @returns 64 lower-case hexadecimal digits
 * @see FIPS 180-4, Secure Hash Standard
 */
export function digest(domain: Domain, ...parts: readonly (string | Uint8Array)[]): string {
  const bytes = parts.map((part) => (typeof part === 'string' ? utf8ToBytes(part) : part));
  return bytesToHex(sha256(concatBytes(utf8ToBytes(domains[domain]), new Uint8Array(1), ...bytes)));
}

/** HMAC-SHA-256 (RFC 2104) of a message under a key. */
export function keyedDigest(key: Uint8Array, message: Uint8Array): Uint8Array {
  return hmac(sha256, key, message);
}

/** SHA-256 of a file's bytes and nothing else, as `sha256sum` prints it; 64 lower-case hexadecimal digits. */
export function fileDigest(bytes: Uint8Array): string {
  return bytesToHex(sha256(bytes));
}

export { bytesToHex, concatBytes, hexToBytes, utf8ToBytes };
