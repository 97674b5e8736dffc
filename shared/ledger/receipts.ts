import type { PayloadOf } from '../session/events.ts';
import type { Entry } from './chain.ts';

/** What a phone keeps of a trial that locked, as its listener copies it. */
export type Receipt = {
  readonly trial: number;
  /** 64 hexadecimal digits: what stands in the record for the answer. */
  readonly leaf: string;
  /** Number of the entry that locked the trial. */
  readonly sequence: number;
  /** 64 hexadecimal digits: the digest of that entry. */
  readonly digest: string;
};

export type ReceiptText = {
  /** Whose they are, as the first line says; null where it does not. */
  readonly seat: { readonly session: number; readonly label: string } | null;
  readonly receipts: readonly Receipt[];
  /** Answers that the phone sent and the server did not hold: no receipts, and nothing that a record can show. */
  readonly notHeld: number;
};

export type FoundReceipt = {
  readonly trial: number;
  readonly isOnRecord: boolean;
  /** In a sentence. */
  readonly words: string;
};

const receiptPattern = /\btrial\s+(\d{1,6})\s+leaf\s+([0-9a-f]{64})\s+entry\s+(\d{1,9})\s+([0-9a-f]{64})\b/gi;
const headPattern = /\bsession\s+(\d{1,6}),\s+seat\s+(L\d+)\b/gi;

/**
 * Reads the text that a phone lets its listener copy. Line ends and spaces do not matter: mail may have changed them.
 *
 * @returns what it holds; without receipts where it holds none
 */
export function readReceipts(text: string): ReceiptText {
  // The title is the study's own and may say anything; the last mention before the receipts is the phone's.
  const head = [...(text.split(/\btrial\s+\d+\s+leaf\b/i)[0] ?? '').matchAll(headPattern)].at(-1);
  return {
    seat: head === undefined ? null : { session: Number(head[1]), label: String(head[2]).toUpperCase() },
    receipts: [...text.matchAll(receiptPattern)].map(([, trial, leaf = '', sequence, digest = '']) => ({
      trial: Number(trial),
      leaf: leaf.toLowerCase(),
      sequence: Number(sequence),
      digest: digest.toLowerCase(),
    })),
    notHeld: [...text.matchAll(/\bsent by this phone and not held\b/gi)].length,
  };
}

function wordsOf(receipt: Receipt, seat: ReceiptText['seat'], entry: Entry | undefined): string | null {
  const { trial, leaf, sequence, digest } = receipt;
  if (entry === undefined) return `this record has no entry ${sequence}.`;
  if (entry.digest !== digest) return `entry ${sequence} is not the one that the phone was shown; its digest differs.`;
  if (entry.kind !== 'trial-locked') return `entry ${sequence} locks no trial.`;
  const locked = entry.payload as unknown as PayloadOf<'trial-locked'>;
  if (locked.trial !== trial || (seat !== null && locked.session !== seat.session))
    return `entry ${sequence} locks another trial: session ${locked.session}, trial ${locked.trial}.`;
  const found = locked.leaves.find((candidate) => candidate.leaf === leaf);
  if (found === undefined) return `entry ${sequence} does not hold this leaf; it holds another answer, or none.`;
  return seat !== null && found.seat !== seat.label
    ? `entry ${sequence} holds this leaf for ${found.seat}, not for ${seat.label}.`
    : null;
}

/**
 * Looks each receipt up in a record: the entry, its digest, and the leaf within it.
 *
 * @param entries a record whose chain holds; of any other this says nothing
 */
export function findReceipts({ seat, receipts }: ReceiptText, entries: readonly Entry[]): FoundReceipt[] {
  const bySequence = new Map(entries.map((entry) => [entry.sequence, entry]));
  return receipts.map((receipt) => {
    const why = wordsOf(receipt, seat, bySequence.get(receipt.sequence));
    return {
      trial: receipt.trial,
      isOnRecord: why === null,
      words: why ?? `locked by entry ${receipt.sequence} of this record, with this leaf.`,
    };
  });
}
