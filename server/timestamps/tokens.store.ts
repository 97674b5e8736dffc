import { LessThanOrEqual } from 'typeorm';
import type { Tx } from '../db/transaction.ts';
import { TimestampToken } from './timestamp-token.entity.ts';
import { TokenRequest } from './token-request.entity.ts';

type Head = { studyId: string; sequence: number };

/** Asks for a token, in the transaction of the signature; it is fetched once that has committed. */
export async function requestToken(tx: Tx, head: Head, now: Date): Promise<void> {
  await tx.insert(TokenRequest, { ...head, attempts: 0, lastError: null, nextAttemptAt: now });
}

/** A request that is due, locked; what another server has locked is passed over. */
export function lockDueRequest(tx: Tx, now: Date): Promise<TokenRequest | null> {
  return tx.findOne(TokenRequest, {
    where: { nextAttemptAt: LessThanOrEqual(now) },
    order: { nextAttemptAt: 'ASC', sequence: 'ASC' },
    lock: { mode: 'pessimistic_write', onLocked: 'skip_locked' },
  });
}

export async function updateRequest(tx: Tx, { studyId, sequence }: Head, change: Partial<TokenRequest>): Promise<void> {
  await tx.update(TokenRequest, { studyId, sequence }, change);
}

/** Keeps a token; its request is done. */
export async function storeToken(tx: Tx, token: TimestampToken): Promise<void> {
  const { studyId, sequence } = token;
  await tx.insert(TimestampToken, token);
  await tx.delete(TokenRequest, { studyId, sequence });
}

export function tokensOf(tx: Tx, studyId: string): Promise<TimestampToken[]> {
  return tx.find(TimestampToken, { where: { studyId }, order: { sequence: 'ASC' } });
}

export function requestsOf(tx: Tx, studyId: string): Promise<TokenRequest[]> {
  return tx.find(TokenRequest, { where: { studyId } });
}
