import type { MailState } from '#shared/contracts/mail.ts';
import { Problem } from '#shared/problem.ts';
import { withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import * as store from '../../mail/outbox.store.ts';
import { mailboxMailView, mailboxRowView, mailRowView } from './mail.views.ts';

export function listMail(
  { db, config }: Deps,
  organisationId: string,
  query: { q: string; page: number; state: MailState | 'any' },
) {
  return withTransaction(db, async (tx) => {
    const found = await store.listMail(tx, organisationId, query);
    const server = config.smtp === null ? null : new URL(config.smtp.url).host;
    return { ...found, rows: found.rows.map(mailRowView), server };
  });
}

/** Gives a mail that was given up all its attempts again. */
export function sendAgain({ db, clock }: Deps, { organisationId, id }: { organisationId: string; id: string }) {
  return withTransaction(db, async (tx) => {
    const mail = await store.lockMail(tx, organisationId, id);
    if (mail === null) throw new Problem('not-found', 'There is no such mail.');
    if (mail.state !== 'failed') throw new Problem('wrong-phase', 'Only a mail that was given up can be tried again.');
    if (mail.text === '')
      throw new Problem(
        'too-late',
        'This mail is more than a week old and its text is erased. Repeat what it told of.',
      );
    await store.updateMail(tx, id, { state: 'waiting', attempts: 0, nextAttemptAt: new Date(clock.now()) });
    return { ok: true } as const;
  });
}

export function listKept({ db, clock }: Deps, query: { q: string; page: number }) {
  return withTransaction(db, async (tx) => {
    const found = await store.listKept(tx, { ...query, now: new Date(clock.now()) });
    return { ...found, rows: found.rows.map(mailboxRowView) };
  });
}

export function getKept({ db, clock }: Deps, id: string) {
  return withTransaction(db, async (tx) => {
    const mail = await store.findKept(tx, id, new Date(clock.now()));
    if (mail === null) throw new Problem('not-found', 'There is no such mail.');
    return mailboxMailView(mail);
  });
}
