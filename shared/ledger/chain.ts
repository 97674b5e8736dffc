import { canonicalJson, type Json } from './canonical-json.ts';
import { digest } from './digest.ts';

/** One entry of a study's record. `nonce` (16 random bytes) keeps sealed content from being guessed by its digest. */
export type Entry = {
  readonly study: string;
  readonly sequence: number;
  readonly at: string;
  readonly kind: string;
  readonly version: number;
  readonly payload: { readonly [key: string]: Json };
  readonly nonce: string;
  readonly previous: string;
  readonly digest: string;
};

/** What comes before the first entry. */
export const genesis = '0'.repeat(64);

export type EntryContent = Pick<Entry, 'study' | 'at' | 'kind' | 'version' | 'payload' | 'nonce'>;
export type Head = Pick<Entry, 'sequence' | 'digest'>;

function entryDigest(entry: Omit<Entry, 'digest'>): string {
  const { study, sequence, at, kind, version, payload, nonce, previous } = entry;
  return digest('entry', canonicalJson({ study, sequence, at, kind, version, payload, nonce, previous }));
}

/** The next entry after `head` (null for the first), with its sequence number, link and digest. */
export function nextEntry(head: Head | null, content: EntryContent): Entry {
  const { study, at, kind, version, payload, nonce } = content;
  const sequence = head === null ? 1 : head.sequence + 1;
  const unsealed = { study, sequence, at, kind, version, payload, nonce, previous: head?.digest ?? genesis };
  return { ...unsealed, digest: entryDigest(unsealed) };
}

export type ChainFault = { sequence: number; why: string };

/**
 * Reads a chain from its first entry on, or from the one after a head that was read before.
 *
 * @returns the first fault with the place where it lies, or null when every link holds
 */
export function chainFault(entries: readonly Entry[], after: Entry | null = null): ChainFault | null {
  let head: Head | null = after;
  const study = (after ?? entries[0])?.study;
  for (const [index, entry] of entries.entries()) {
    const sequence = (after?.sequence ?? 0) + index + 1;
    if (entry.sequence !== sequence)
      return { sequence, why: `expected entry ${sequence}, found entry ${entry.sequence}` };
    if (entry.study !== study) return { sequence, why: 'the entry belongs to another study' };
    if (entry.previous !== (head?.digest ?? genesis))
      return { sequence, why: 'it does not link to the entry before it' };
    if (entry.digest !== entryDigest(entry)) return { sequence, why: 'its content does not match its digest' };
    head = entry;
  }
  return null;
}
