import { canonicalJson } from '../ledger/canonical-json.ts';
import { digest, hexToBytes } from '../ledger/digest.ts';

export type AnswerContent = {
  readonly salt: string;
  readonly session: string;
  readonly seat: string;
  readonly trial: number;
  readonly choice: string;
  readonly confidence: string | null;
};

/**
 * The leaf that stands for an answer in the record: SHA-256 over the phone's salt and the answer's canonical text.
 * Phone and server compute it alike, so that a phone can tell whether the record holds what it sent.
 */
export function answerLeaf({ salt, session, seat, trial, choice, confidence }: AnswerContent): string {
  return digest('answer', hexToBytes(salt), canonicalJson({ session, seat, trial, choice, confidence }));
}

/** The commitment of a phone to its 32 random bytes (hex), published before the server's secret is of any use. */
export function contributionCommitment(value: string): string {
  return digest('contribution', hexToBytes(value));
}
