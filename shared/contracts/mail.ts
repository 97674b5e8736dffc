import { z } from 'zod';
import { endpoint } from './endpoint.ts';
import { done, organisationParams, thingParams } from './organisation-params.ts';
import { listQuery, pageOf } from './paging.ts';

/**
 * Where a mail stands: waiting for its next attempt, sent, given up after the last attempt, or kept because no mail
 * server is set.
 */
export const mailStates = ['waiting', 'sent', 'failed', 'kept'] as const;
export type MailState = (typeof mailStates)[number];

/** A mail as its organisation's owner sees it: never its text, which may hold somebody's link. */
export const mailRow = z.strictObject({
  id: z.uuid(),
  recipient: z.string(),
  subject: z.string(),
  state: z.enum(mailStates),
  attempts: z.int(),
  lastError: z.string().nullable(),
  createdAt: z.iso.datetime(),
  sentAt: z.iso.datetime().nullable(),
  /** Of a waiting mail. */
  nextAttemptAt: z.iso.datetime().nullable(),
});
export type MailRow = z.output<typeof mailRow>;

const mailListQuery = listQuery.extend({ state: z.enum(['any', ...mailStates]).default('any') });
const base = '/organisations/:organisationId/mail';

export const mailApi = {
  list: endpoint({
    method: 'GET',
    path: base,
    summary: 'Mail of an organisation, newest first, and how it goes out',
    access: ['owner'],
    params: organisationParams,
    query: mailListQuery,
    reply: pageOf(mailRow).extend({
      /** Host and port of the mail server; null when mail is kept for the mailbox. */
      server: z.string().nullable(),
    }),
  }),
  sendAgain: endpoint({
    method: 'POST',
    path: `${base}/:id/again`,
    summary: 'Try a mail again that was given up',
    access: ['owner'],
    params: thingParams,
    reply: done,
  }),
};

/** A mail with its text, for the server's own machine. */
export const mailboxRow = z.strictObject({
  id: z.uuid(),
  recipient: z.string(),
  subject: z.string(),
  createdAt: z.iso.datetime(),
});
export type MailboxRow = z.output<typeof mailboxRow>;
export const mailboxMail = mailboxRow.extend({
  text: z.string(),
  html: z.string(),
  /** The calendar file that goes with it, and its method (RFC 5546). */
  calendar: z.strictObject({ method: z.string(), content: z.string() }).nullable(),
});
export type MailboxMail = z.output<typeof mailboxMail>;

/** What stands in for a mail server. Answers only on the server's own machine, and only while no mail server is set. */
export const mailboxApi = {
  list: endpoint({
    method: 'GET',
    path: '/mailbox',
    summary: 'Every mail that no server was there to send, newest first; on this machine only',
    access: 'anyone',
    query: listQuery,
    reply: pageOf(mailboxRow),
  }),
  get: endpoint({
    method: 'GET',
    path: '/mailbox/:id',
    summary: 'One of these mails; on this machine only',
    access: 'anyone',
    params: z.strictObject({ id: z.uuid() }),
    reply: mailboxMail,
  }),
};
