import type { Tx } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import type { MailContent } from './mails.ts';
import { insertMail } from './outbox.store.ts';
import { htmlOf, plainTextOf } from './render-mail.ts';

export type Addressed = {
  /** Whose owner sees that it was sent; null for mail between Fairlead and a person. */
  readonly organisationId: string | null;
  readonly recipient: string;
};

/** Writes a mail in the transaction of its act: it goes out if, and only if, the act happened. */
export async function postMail(tx: Tx, deps: Deps, to: Addressed, content: MailContent): Promise<void> {
  const now = new Date(deps.clock.now());
  await insertMail(tx, {
    id: deps.random.id(),
    organisationId: to.organisationId,
    recipient: to.recipient,
    subject: content.subject,
    text: plainTextOf(content),
    html: htmlOf(content),
    state: deps.config.smtp === null ? 'kept' : 'waiting',
    attempts: 0,
    lastError: null,
    nextAttemptAt: now,
    createdAt: now,
    sentAt: null,
  });
}
