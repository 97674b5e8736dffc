import { IsNull } from 'typeorm';
import { likePattern, pageOfRows } from '../../db/paging.ts';
import type { Tx } from '../../db/transaction.ts';
import { Invitation } from './invitation.entity.ts';

export function listInvitations(tx: Tx, organisationId: string, { q, page }: { q: string; page: number }) {
  const rows = tx
    .createQueryBuilder(Invitation, 'invitation')
    .where('invitation.organisationId = :organisationId and invitation.acceptedAt is null', { organisationId })
    .orderBy('invitation.invitedAt', 'DESC')
    .addOrderBy('invitation.id');
  if (q !== '') rows.andWhere('invitation.email like :q', { q: likePattern(q) });
  return pageOfRows(rows, page);
}

export async function insertInvitation(tx: Tx, invitation: Invitation): Promise<void> {
  await tx.insert(Invitation, invitation);
}

/** An invitation that is not accepted yet, locked. */
export function lockOpen(tx: Tx, organisationId: string, id: string): Promise<Invitation | null> {
  return tx.findOne(Invitation, {
    where: { organisationId, id, acceptedAt: IsNull() },
    lock: { mode: 'pessimistic_write' },
  });
}

export function findByToken(tx: Tx, tokenDigest: string): Promise<Invitation | null> {
  return tx.findOneBy(Invitation, { tokenDigest });
}

export function lockByToken(tx: Tx, tokenDigest: string): Promise<Invitation | null> {
  return tx.findOne(Invitation, { where: { tokenDigest }, lock: { mode: 'pessimistic_write' } });
}

export async function updateInvitation(tx: Tx, id: string, change: Partial<Invitation>): Promise<void> {
  await tx.update(Invitation, { id }, change);
}

/** Ends the links that were sent to an address and not used. */
export async function deleteOpenTo(tx: Tx, organisationId: string, email: string): Promise<void> {
  await tx.delete(Invitation, { organisationId, email, acceptedAt: IsNull() });
}
