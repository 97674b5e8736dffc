import { hashes, verify } from '@noble/ed25519';
import { sha512 } from '@noble/hashes/sha2.js';
import { canonicalJson } from './canonical-json.ts';
import type { Entry } from './chain.ts';
import { concatBytes, fileDigest, hexToBytes, utf8ToBytes } from './digest.ts';
import { type Moment, momentOf } from './moments.ts';

hashes.sha512 = sha512;

/** What a signing key signs, and nothing else: the name keeps a signature from being taken for another kind. */
export const headFormat = 'fairlead-signed-head/1';

/** What is said of a head: at this moment of this study's life, this was the last entry of its record. */
export type HeadStatement = {
  readonly format: typeof headFormat;
  readonly study: string;
  readonly sequence: number;
  /** Digest of the entry that is the head. */
  readonly head: string;
  readonly moment: Moment;
  /** ISO 8601, by the clock of whoever signs. */
  readonly at: string;
  /** Fingerprint of the key that signs. */
  readonly key: string;
};

export type HeadSignature = Pick<HeadStatement, 'study' | 'sequence' | 'head' | 'moment' | 'at' | 'key'> & {
  /** 64 bytes in hexadecimal digits. */
  readonly signature: string;
};

/** A key as everybody may see it. `createdAt` and `retiredAt` are ISO 8601; null while it is in use. */
export type PublicKey = {
  readonly fingerprint: string;
  /** 32 bytes in hexadecimal digits (RFC 8032, 5.1.5). */
  readonly publicKey: string;
  readonly createdAt: string;
  readonly retiredAt: string | null;
};

// SubjectPublicKeyInfo of an Ed25519 key: what stands before its 32 bytes (RFC 8410, section 4).
const spkiStart = hexToBytes('302a300506032b6570032100');

/** A public key as a file: SubjectPublicKeyInfo in DER, as `openssl pkey -pubin -outform DER` writes it. */
export function publicKeyDer(publicKey: string): Uint8Array {
  return concatBytes(spkiStart, hexToBytes(publicKey));
}

/** SHA-256 of that file, 64 hexadecimal digits: what people compare over another channel. */
export function fingerprintOf(publicKey: string): string {
  return fileDigest(publicKeyDer(publicKey));
}

/** The bytes that are signed and time-stamped: the statement's canonical JSON in UTF-8, whose SHA-256 a token carries. */
export function statementBytes({ study, sequence, head, moment, at, key }: Omit<HeadStatement, 'format'>): Uint8Array {
  return utf8ToBytes(canonicalJson({ format: headFormat, study, sequence, head, moment, at, key }));
}

/** SHA-256 of the statement: the imprint of its token. */
export function statementDigest(statement: Omit<HeadStatement, 'format'>): string {
  return fileDigest(statementBytes(statement));
}

/** Whether a signature (Ed25519) over some bytes was made by the key; all but the bytes in hexadecimal digits. */
export function isSignedBy(signature: string, bytes: Uint8Array, publicKey: string): boolean {
  try {
    return verify(hexToBytes(signature), bytes, hexToBytes(publicKey), { zip215: false });
  } catch {
    return false;
  }
}

/**
 * Why a signature does not hold for an entry, or null when it does.
 *
 * Verified as RFC 8032 says, without the leniency of ZIP 215.
 *
 * @param entry the entry that the signature says was the head
 * @param key   the key whose fingerprint the signature names, or undefined where none is known
 * @see RFC 8032, Edwards-Curve Digital Signature Algorithm, section 5.1.7
 */
export function signatureFault(
  signature: HeadSignature,
  entry: Entry | undefined,
  key: PublicKey | undefined,
): string | null {
  if (entry === undefined) return 'it signs an entry that is not on the record';
  const { study, sequence, head, moment } = signature;
  if (entry.study !== study || entry.sequence !== sequence) return 'it belongs to another entry';
  if (entry.digest !== head) return 'the head that was signed is not the entry on the record';
  if (momentOf(entry.kind) !== moment) return `it says “${moment}”, and the entry does not`;
  if (key === undefined) return 'no key of the organisation has the fingerprint that it names';
  if (fingerprintOf(key.publicKey) !== signature.key) return 'the key does not have the fingerprint that it names';
  if (signature.at < key.createdAt || (key.retiredAt !== null && signature.at > key.retiredAt))
    return 'it was made when its key was not in use';
  return isSignedBy(signature.signature, statementBytes(signature), key.publicKey)
    ? null
    : 'it does not match its key and what it says';
}

/** The public key in PEM, for `openssl pkeyutl -verify -pubin -inkey`. */
export function publicKeyPem(publicKey: string): string {
  return `-----BEGIN PUBLIC KEY-----\n${base64(publicKeyDer(publicKey))}\n-----END PUBLIC KEY-----\n`;
}

const base64Digits = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/';

/** Base64 (RFC 4648, section 4) without Node or a browser. */
function base64(bytes: Uint8Array): string {
  const bits = [...bytes].map((byte) => byte.toString(2).padStart(8, '0')).join('');
  const digits = (bits.match(/.{1,6}/g) ?? []).map((six) => base64Digits[Number.parseInt(six.padEnd(6, '0'), 2)]);
  return digits.join('').padEnd(Math.ceil(digits.length / 4) * 4, '=');
}
