import { In, LessThan, LessThanOrEqual, MoreThan } from 'typeorm';
import type { MailState } from '#shared/contracts/mail.ts';
import { likePattern, pageOfRows } from '../db/paging.ts';
import type { Tx } from '../db/transaction.ts';
import { OutgoingMail } from './outgoing-mail.entity.ts';

export async function insertMail(tx: Tx, mail: OutgoingMail): Promise<void> {
  await tx.insert(OutgoingMail, mail);
}

/** Mails that are due, locked; what another server has locked is passed over. */
export function lockDue(tx: Tx, now: Date, most: number): Promise<OutgoingMail[]> {
  return tx.find(OutgoingMail, {
    where: { state: 'waiting', nextAttemptAt: LessThanOrEqual(now) },
    order: { nextAttemptAt: 'ASC' },
    take: most,
    lock: { mode: 'pessimistic_write', onLocked: 'skip_locked' },
  });
}

export async function updateMail(tx: Tx, id: string, change: Partial<OutgoingMail>): Promise<void> {
  await tx.update(OutgoingMail, { id }, change);
}

export async function eraseTexts(tx: Tx, writtenBefore: Date, states: readonly MailState[]): Promise<void> {
  const old = { state: In([...states]), createdAt: LessThan(writtenBefore) };
  await tx.update(OutgoingMail, old, textErased);
}

/** Without its text a mail is also without its calendar file, which names the recipient and holds the link. */
export const textErased = { text: '', html: '', calendar: null, calendarMethod: null };

/** Deletes a mail that has not gone out, or that the mailbox does not show yet. */
export async function deleteUnsent(tx: Tx, id: string, now: Date): Promise<void> {
  await tx.delete(OutgoingMail, [
    { id, state: 'waiting' },
    { id, state: 'kept', nextAttemptAt: MoreThan(now) },
  ]);
}

export async function deleteWaitingFor(tx: Tx, listenerId: string): Promise<void> {
  await tx.delete(OutgoingMail, { listenerId, state: 'waiting' });
}

export async function eraseRecipient(tx: Tx, listenerId: string): Promise<void> {
  await tx.update(OutgoingMail, { listenerId }, { ...textErased, recipient: 'erased', lastError: null });
}

function newestFirst(tx: Tx, q: string) {
  const rows = tx.createQueryBuilder(OutgoingMail, 'mail').orderBy('mail.createdAt', 'DESC').addOrderBy('mail.id');
  if (q !== '') rows.andWhere('(mail.recipient like :q or mail.subject like :q)', { q: likePattern(q) });
  return rows;
}

export function listMail(
  tx: Tx,
  organisationId: string,
  { q, page, state }: { q: string; page: number; state: MailState | 'any' },
) {
  const rows = newestFirst(tx, q).andWhere('mail.organisationId = :organisationId', { organisationId });
  if (state !== 'any') rows.andWhere('mail.state = :state', { state });
  return pageOfRows(rows, page);
}

/** Mail that a server would have sent by now. */
export function listKept(tx: Tx, { q, page, now }: { q: string; page: number; now: Date }) {
  const kept = newestFirst(tx, q).andWhere("mail.state = 'kept' and mail.nextAttemptAt <= :now", { now });
  return pageOfRows(kept, page);
}

export function findKept(tx: Tx, id: string, now: Date): Promise<OutgoingMail | null> {
  return tx.findOneBy(OutgoingMail, { id, state: 'kept', nextAttemptAt: LessThanOrEqual(now) });
}

export function lockMail(tx: Tx, organisationId: string, id: string): Promise<OutgoingMail | null> {
  return tx.findOne(OutgoingMail, { where: { organisationId, id }, lock: { mode: 'pessimistic_write' } });
}
