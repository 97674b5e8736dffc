import { LessThan } from 'typeorm';
import type { PasswordChoice } from '#shared/contracts/links.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { linkTokenDigest, newLinkToken } from '../../http/link-token.ts';
import type { OpenConsoles } from '../../http/open-consoles.ts';
import { endAllPlaces } from '../../http/sign-in.ts';
import { passwordChangedMail, passwordResetMail } from '../../mail/mails.ts';
import { postMail } from '../../mail/outbox.ts';
import { pageAddresses } from '../../mail/page-addresses.ts';
import { hashPassword } from '../users/passwords.ts';
import type { User } from '../users/user.entity.ts';
import { findByEmail, findById, setPassword } from '../users/users.store.ts';
import { PasswordReset } from './password-reset.entity.ts';

export const resetLastsMs = 60 * 60 * 1000;

/** Longer than either answer takes, so that the time tells nobody whether an address has an account. */
const answerAfterMs = 250;

async function sendReset(deps: Deps, email: string): Promise<void> {
  await withTransaction(deps.db, async (tx) => {
    const user = await findByEmail(tx, email);
    if (user === null) return;
    const { token, digest } = newLinkToken(deps.random);
    const expiresAt = new Date(deps.clock.now() + resetLastsMs);
    await tx.insert(PasswordReset, { tokenDigest: digest, userId: user.id, expiresAt });
    const mail = passwordResetMail({ url: pageAddresses.newPassword(deps.config, token) });
    await postMail(tx, deps, { organisationId: null, recipient: user.email }, mail);
  });
}

/** Sends a link to a person who forgot their password; any address is answered alike. */
export async function askForReset(deps: Deps, email: string) {
  const pause = new Promise((resolve) => setTimeout(resolve, answerAfterMs));
  await Promise.all([sendReset(deps, email), pause]);
  return { ok: true } as const;
}

async function personOf(tx: Tx, token: string, now: number, lock: boolean): Promise<User> {
  const where = { tokenDigest: linkTokenDigest(token) };
  const reset = await tx.findOne(PasswordReset, lock ? { where, lock: { mode: 'pessimistic_write' } } : { where });
  const user = reset === null || reset.expiresAt.getTime() <= now ? null : await findById(tx, reset.userId);
  if (user !== null) return user;
  throw new Problem('too-late', 'This link has been used, or its hour is over. Ask for a new one.');
}

export function lookAtReset({ db, clock }: Deps, token: string) {
  return withTransaction(db, async (tx) => ({ email: (await personOf(tx, token, clock.now(), false)).email }));
}

/** Sets a new password, and ends every link and every sign-in of the person. */
export async function resetPassword(deps: Deps, consoles: OpenConsoles, { token, password }: PasswordChoice) {
  const { db, clock } = deps;
  await lookAtReset(deps, token);
  const passwordHash = await hashPassword(password);
  const user = await withTransaction(db, async (tx) => {
    const person = await personOf(tx, token, clock.now(), true);
    await setPassword(tx, person.id, passwordHash);
    await tx.delete(PasswordReset, { userId: person.id });
    await endAllPlaces(tx, person.id);
    const mail = passwordChangedMail({ url: pageAddresses.forgottenPassword(deps.config) });
    await postMail(tx, deps, { organisationId: null, recipient: person.email }, mail);
    return person;
  });
  consoles.end(({ userId }) => userId === user.id);
  return { email: user.email };
}

export async function forgetExpiredResets({ db, clock }: Deps): Promise<void> {
  await db.manager.delete(PasswordReset, { expiresAt: LessThan(new Date(clock.now())) });
}
