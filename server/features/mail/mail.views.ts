import type { MailboxMail, MailboxRow, MailRow } from '#shared/contracts/mail.ts';
import type { OutgoingMail } from '../../mail/outgoing-mail.entity.ts';

export function mailRowView(mail: OutgoingMail): MailRow {
  return {
    id: mail.id,
    recipient: mail.recipient,
    subject: mail.subject,
    state: mail.state,
    attempts: mail.attempts,
    lastError: mail.lastError,
    createdAt: mail.createdAt.toISOString(),
    sentAt: mail.sentAt?.toISOString() ?? null,
    nextAttemptAt: mail.state === 'waiting' ? mail.nextAttemptAt.toISOString() : null,
  };
}

export function mailboxRowView({ id, recipient, subject, createdAt }: OutgoingMail): MailboxRow {
  return { id, recipient, subject, createdAt: createdAt.toISOString() };
}

export function mailboxMailView(mail: OutgoingMail): MailboxMail {
  const { text, html, calendar, calendarMethod } = mail;
  const file = calendar === null ? null : { method: calendarMethod ?? '', content: calendar };
  return { ...mailboxRowView(mail), text, html, calendar: file };
}
