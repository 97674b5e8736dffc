import { In } from 'typeorm';
import type { RequestContent } from '#shared/session/request-leaf.ts';
import type { Tx } from '../../db/transaction.ts';
import { PresentationRequest } from './request.entity.ts';

export async function insertRequest(tx: Tx, request: PresentationRequest): Promise<void> {
  await tx.insert(PresentationRequest, request);
}

/** What was asked for in a trial, in order. */
export function requestsInTrial(tx: Tx, sessionId: string, trial: number): Promise<PresentationRequest[]> {
  return tx.find(PresentationRequest, { where: { sessionId, trial }, order: { presentation: 'ASC' } });
}

/** Every request of these sessions, in order, with what its leaf is made of: for what is closed. */
export async function requestsOfSessions(tx: Tx, sessionIds: readonly string[]): Promise<RequestContent[]> {
  if (sessionIds.length === 0) return [];
  const rows = await tx.find(PresentationRequest, {
    where: { sessionId: In([...sessionIds]) },
    order: { sessionId: 'ASC', trial: 'ASC', presentation: 'ASC' },
  });
  return rows.map(({ sessionId, seat, trial, presentation, label, salt }) => ({
    session: sessionId,
    seat,
    trial,
    presentation,
    label,
    salt,
  }));
}
