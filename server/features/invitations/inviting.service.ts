import type { InvitationDraft, InvitationRow } from '#shared/contracts/people.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { newLinkToken } from '../../http/link-token.ts';
import { invitationMail } from '../../mail/mails.ts';
import { postMail } from '../../mail/outbox.ts';
import { pageAddresses } from '../../mail/page-addresses.ts';
import { findMember, lockOrganisation } from '../people/people.store.ts';
import { findByEmail, namesOf } from '../users/users.store.ts';
import type { Invitation } from './invitation.entity.ts';
import * as store from './invitations.store.ts';

export const invitationLastsMs = 7 * 24 * 60 * 60 * 1000;

async function rowsOf(tx: Tx, invitations: readonly Invitation[], now: number): Promise<InvitationRow[]> {
  const names = await namesOf(
    tx,
    invitations.map(({ invitedBy }) => invitedBy),
  );
  return invitations.map(({ id, email, role, invitedBy, invitedAt, expiresAt }) => ({
    id,
    email,
    role,
    invitedBy: names.get(invitedBy) ?? 'unknown',
    invitedAt: invitedAt.toISOString(),
    expiresAt: expiresAt.toISOString(),
    expired: expiresAt.getTime() <= now,
  }));
}

async function rowOf(tx: Tx, invitation: Invitation, now: number): Promise<InvitationRow> {
  const [row] = await rowsOf(tx, [invitation], now);
  if (row === undefined) throw new Error('an invitation without a row');
  return row;
}

export function listInvitations({ db, clock }: Deps, organisationId: string, query: { q: string; page: number }) {
  return withTransaction(db, async (tx) => {
    const found = await store.listInvitations(tx, organisationId, query);
    return { ...found, rows: await rowsOf(tx, found.rows, clock.now()) };
  });
}

async function sendLink(tx: Tx, deps: Deps, invitation: Invitation, organisation: string, token: string) {
  const names = await namesOf(tx, [invitation.invitedBy]);
  const { organisationId, role, expiresAt, email, invitedBy } = invitation;
  const mail = invitationMail({
    organisation,
    invitedBy: names.get(invitedBy) ?? organisation,
    role,
    expiresAt,
    url: pageAddresses.invitation(deps.config, token),
  });
  await postMail(tx, deps, { organisationId, recipient: email }, mail);
}

/** Invites an address; a link sent to it before and not used ends. */
export function invite(
  deps: Deps,
  { organisationId, userId }: { organisationId: string; userId: string },
  draft: InvitationDraft,
): Promise<InvitationRow> {
  const { db, random, clock } = deps;
  return withTransaction(db, async (tx) => {
    const organisation = await lockOrganisation(tx, organisationId);
    const email = draft.email.toLowerCase();
    const user = await findByEmail(tx, email);
    if (user !== null && (await findMember(tx, organisationId, user.id)) !== null)
      throw new Problem('invalid-input', 'Nobody was invited.', [
        { pointer: '/email', detail: `${user.name} is a member already; change the role in the list` },
      ]);
    await store.deleteOpenTo(tx, organisationId, email);
    const { token, digest } = newLinkToken(random);
    const now = clock.now();
    const invitation: Invitation = {
      id: random.id(),
      organisationId,
      email,
      role: draft.role,
      tokenDigest: digest,
      invitedBy: userId,
      invitedAt: new Date(now),
      expiresAt: new Date(now + invitationLastsMs),
      acceptedAt: null,
    };
    await store.insertInvitation(tx, invitation);
    await sendLink(tx, deps, invitation, organisation.name, token);
    return rowOf(tx, invitation, now);
  });
}

type Which = { organisationId: string; id: string };

async function openOrProblem(tx: Tx, { organisationId, id }: Which): Promise<Invitation> {
  const invitation = await store.lockOpen(tx, organisationId, id);
  if (invitation === null) throw new Problem('not-found', 'There is no such invitation; it may be accepted by now.');
  return invitation;
}

/** A new link for an invitation; the one before ends. */
export function inviteAgain(deps: Deps, which: Which, userId: string): Promise<InvitationRow> {
  const { db, random, clock } = deps;
  return withTransaction(db, async (tx) => {
    const organisation = await lockOrganisation(tx, which.organisationId);
    const { token, digest } = newLinkToken(random);
    const now = clock.now();
    const renewed: Invitation = {
      ...(await openOrProblem(tx, which)),
      tokenDigest: digest,
      invitedBy: userId,
      invitedAt: new Date(now),
      expiresAt: new Date(now + invitationLastsMs),
    };
    await store.updateInvitation(tx, which.id, renewed);
    await sendLink(tx, deps, renewed, organisation.name, token);
    return rowOf(tx, renewed, now);
  });
}

export function withdraw({ db }: Deps, which: Which) {
  return withTransaction(db, async (tx) => {
    const { organisationId, email } = await openOrProblem(tx, which);
    await store.deleteOpenTo(tx, organisationId, email);
    return { ok: true } as const;
  });
}
