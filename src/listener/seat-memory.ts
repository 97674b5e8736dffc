import type { LockReceipt } from '#shared/contracts/listener-live.ts';
import type { OwnAnswer } from './answers.ts';

// A seat lives in its tab: what belongs to it is kept in session storage under its token.

export type KeptReceipt = LockReceipt & {
  /** Whether the leaf in the record is the one this phone computed; null when the phone no longer has the answer. */
  readonly isOwn: boolean | null;
};

type Memory = {
  contribution: string | null;
  answer: OwnAnswer | null;
  receipts: KeptReceipt[];
};

const empty: Memory = { contribution: null, answer: null, receipts: [] };
const keyOf = (token: string) => `fairlead seat ${token}`;

export function recall(token: string): Memory {
  const text = sessionStorage.getItem(keyOf(token));
  return text === null ? empty : { ...empty, ...(JSON.parse(text) as Partial<Memory>) };
}

export function remember(token: string, change: Partial<Memory>): Memory {
  const memory = { ...recall(token), ...change };
  sessionStorage.setItem(keyOf(token), JSON.stringify(memory));
  return memory;
}

export function randomHex(bytes: number): string {
  const values = crypto.getRandomValues(new Uint8Array(bytes));
  return [...values].map((value) => value.toString(16).padStart(2, '0')).join('');
}
