import { z } from 'zod';
import type { ChainFault, Entry } from './chain.ts';
import { moments } from './moments.ts';
import { statementDigest } from './signed-head.ts';
import { signaturesFault } from './signed-record.ts';
import { readTimestampReply, UnreadableReply } from './timestamp-token.ts';

const hex = (bytes: number) => z.string().regex(new RegExp(`^[0-9a-f]{${bytes * 2}}$`));

const token = z.strictObject({
  authority: z.string(),
  /** Made on the server's own machine: it proves nothing about time. */
  isLocal: z.boolean(),
  time: z.iso.datetime(),
  /** The question and the answer (TimeStampReq, TimeStampResp) in DER, as base64. */
  request: z.base64(),
  reply: z.base64(),
  /** Certificates that confirm it, in PEM. */
  certificates: z.string(),
});

/** Everything that confirms the signed heads of a record: public keys, signatures, tokens and their certificates. */
export const headProofs = z.strictObject({
  format: z.literal('fairlead-signed-heads'),
  version: z.literal(1),
  /** Every key that signed one of the heads. */
  keys: z.array(
    z.strictObject({
      fingerprint: hex(32),
      publicKey: hex(32),
      createdAt: z.iso.datetime(),
      retiredAt: z.iso.datetime().nullable(),
    }),
  ),
  heads: z.array(
    z.strictObject({
      study: z.uuid(),
      sequence: z.int().min(1),
      head: hex(32),
      moment: z.enum(moments),
      at: z.iso.datetime(),
      key: hex(32),
      signature: hex(64),
      /** Null while the authority has not answered. */
      token: token.nullable(),
    }),
  ),
});
export type HeadProofs = z.output<typeof headProofs>;

function tokenFault(head: HeadProofs['heads'][number], bytesOf: (base64: string) => Uint8Array): string | null {
  if (head.token === null) return null;
  try {
    const read = readTimestampReply(bytesOf(head.token.reply)).token;
    if (read === null) return 'its token is no token';
    if (read.imprint !== statementDigest(head)) return 'its token is for another statement';
    return read.time === head.token.time ? null : 'its token says another time';
  } catch (error) {
    if (error instanceof UnreadableReply) return `its token cannot be read: ${error.message}`;
    throw error;
  }
}

/**
 * Checks signed heads against a record: every signature, no moment unsigned, every token for its statement. That a
 * token's own signature holds is for whoever has the cryptography at hand: `openssl ts -verify`.
 *
 * @param bytesOf decodes base64
 * @returns the first fault with the place where it lies, or null when all hold
 */
export function headProofsFault(
  entries: readonly Entry[],
  { keys, heads }: HeadProofs,
  bytesOf: (base64: string) => Uint8Array,
): ChainFault | null {
  const signed = signaturesFault(entries, heads, keys);
  if (signed !== null) return signed;
  for (const head of heads) {
    const why = tokenFault(head, bytesOf);
    if (why !== null) return { sequence: head.sequence, why };
  }
  return null;
}
