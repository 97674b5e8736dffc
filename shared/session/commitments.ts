import { canonicalJson } from '../ledger/canonical-json.ts';
import { digest, hexToBytes } from '../ledger/digest.ts';

// Every commitment carries 32 random bytes of salt: a bare three-digit code or a short draw could be guessed.

export type CodeKeyRow = {
  readonly code: string;
  readonly specimen: string;
  readonly serial: string;
  readonly cable: number;
};

/** The commitment to a code key: binds code, specimen and serial, in the protocol's order of specimens. */
export function codeKeyCommitment(salt: string, rows: readonly CodeKeyRow[]): string {
  const plain = rows.map(({ code, specimen, serial, cable }) => ({ code, specimen, serial, cable }));
  return digest('codeKey', hexToBytes(salt), canonicalJson(plain));
}

/** The commitment to a session's server secret, published before the first phone joins. */
export function drawSecretCommitment(salt: string, secret: string): string {
  return digest('drawSecret', hexToBytes(salt), hexToBytes(secret));
}
