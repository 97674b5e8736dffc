import type { LockReceipt } from '#shared/contracts/listener-live.ts';
import type { ExitAnswers } from '#shared/contracts/remarks.ts';
import type { OwnAnswer } from './answers.ts';
import { emptyExit, type OwnRemark } from './remarks.ts';

// A seat lives in its tab: what belongs to it is kept in session storage under its token.

export type KeptReceipt = LockReceipt & {
  /** Whether the leaf in the record is the one this phone computed; null when the phone cannot tell. */
  readonly isOwn: boolean | null;
};

type Memory = {
  /** The phone's 32 random bytes (hex); null when another tab or phone took the seat. */
  readonly contribution: string | null;
  readonly answers: readonly OwnAnswer[];
  readonly receipts: readonly KeptReceipt[];
  /** What this phone sent where the server holds something else under the same revision. */
  readonly disputed: readonly OwnAnswer[];
  readonly remarks: readonly OwnRemark[];
  /** What is typed of the exit questions and not sent yet. */
  readonly exitDraft: ExitAnswers;
};

const empty: Memory = {
  contribution: null,
  answers: [],
  receipts: [],
  disputed: [],
  remarks: [],
  exitDraft: emptyExit,
};
const keyOf = (token: string) => `fairlead seat ${token}`;
const lastSeatKey = 'fairlead last seat';

export function recall(token: string): Memory {
  const text = sessionStorage.getItem(keyOf(token));
  return text === null ? empty : { ...empty, ...(JSON.parse(text) as Partial<Memory>) };
}

export function remember(token: string, change: Partial<Memory>): void {
  sessionStorage.setItem(keyOf(token), JSON.stringify({ ...recall(token), ...change }));
}

/** The token of the seat that this tab took last. */
export function lastSeat(): string | null {
  return sessionStorage.getItem(lastSeatKey);
}

export function rememberSeat(token: string): void {
  sessionStorage.setItem(lastSeatKey, token);
}

export function randomHex(bytes: number): string {
  const values = crypto.getRandomValues(new Uint8Array(bytes));
  return [...values].map((value) => value.toString(16).padStart(2, '0')).join('');
}
