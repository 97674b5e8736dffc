import type { Tx } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import type { MailContent } from './mails.ts';
import { deleteUnsent, deleteWaitingFor, eraseRecipient, insertMail } from './outbox.store.ts';
import { htmlOf, plainTextOf } from './render-mail.ts';

export type Addressed = {
  /** Whose owner sees that it was sent; null for mail between Fairlead and a person. */
  readonly organisationId: string | null;
  readonly recipient: string;
  /** A listener of a study, who can have the address erased. */
  readonly listenerId?: string;
};

export type Sending = {
  /** Not before this time, in milliseconds since 1970; at once unless it is said. */
  readonly dueAt?: number;
  readonly calendar?: { readonly method: 'REQUEST' | 'CANCEL'; readonly content: string };
};

/**
 * Writes a mail in the transaction of its act: it goes out if, and only if, the act happened.
 *
 * @returns the mail's id, by which one that is due later can be taken back
 */
export async function postMail(
  tx: Tx,
  deps: Deps,
  to: Addressed,
  content: MailContent,
  { dueAt, calendar }: Sending = {},
): Promise<string> {
  const now = deps.clock.now();
  const id = deps.random.id();
  await insertMail(tx, {
    id,
    organisationId: to.organisationId,
    recipient: to.recipient,
    listenerId: to.listenerId ?? null,
    subject: content.subject,
    text: plainTextOf(content),
    html: htmlOf(content),
    calendar: calendar?.content ?? null,
    calendarMethod: calendar?.method ?? null,
    state: deps.config.smtp === null ? 'kept' : 'waiting',
    attempts: 0,
    lastError: null,
    nextAttemptAt: new Date(dueAt ?? now),
    createdAt: new Date(now),
    sentAt: null,
  });
  return id;
}

/** Takes back a mail that has not gone out. */
export async function takeBack(tx: Tx, { clock }: Deps, id: string): Promise<void> {
  await deleteUnsent(tx, id, new Date(clock.now()));
}

/** Takes back what a listener was not sent yet, and erases their address and every text from what they were. */
export async function eraseMailTo(tx: Tx, listenerId: string): Promise<void> {
  await deleteWaitingFor(tx, listenerId);
  await eraseRecipient(tx, listenerId);
}
