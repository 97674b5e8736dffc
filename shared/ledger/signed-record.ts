import type { ChainFault, Entry } from './chain.ts';
import { momentOf } from './moments.ts';
import { type HeadSignature, type PublicKey, signatureFault } from './signed-head.ts';

/**
 * Checks the signatures of a record: each holds for its entry and key, and no moment is unsigned.
 *
 * A record can be older than its organisation's first key; entries from before it need no signature.
 *
 * @param keys every key of the organisation, retired ones too
 * @returns the first fault with the place where it lies, or null when all hold
 */
export function signaturesFault(
  entries: readonly Entry[],
  signatures: readonly HeadSignature[],
  keys: readonly PublicKey[],
): ChainFault | null {
  const byFingerprint = new Map(keys.map((key) => [key.fingerprint, key]));
  const bySequence = new Map(signatures.map((signature) => [signature.sequence, signature]));
  const firstKeyAt = keys.map(({ createdAt }) => createdAt).sort()[0];
  const last = entries.at(-1)?.sequence ?? 0;
  for (const { sequence } of signatures)
    if (sequence > last) return { sequence, why: 'a head was signed here, and the record ends before it' };
  for (const entry of entries) {
    const signature = bySequence.get(entry.sequence);
    if (signature !== undefined) {
      const why = signatureFault(signature, entry, byFingerprint.get(signature.key));
      if (why !== null) return { sequence: entry.sequence, why: `the signature does not hold: ${why}` };
    } else if (momentOf(entry.kind) !== null && firstKeyAt !== undefined && entry.at >= firstKeyAt)
      return { sequence: entry.sequence, why: 'its signature is missing' };
  }
  return null;
}
