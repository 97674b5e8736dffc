import type { InvitationAnswer, InvitationOffer } from '#shared/contracts/links.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { linkTokenDigest } from '../../http/link-token.ts';
import { Organisation } from '../organisations/organisation.entity.ts';
import { findMember, insertMember, lockOrganisation } from '../people/people.store.ts';
import { hashPassword } from '../users/passwords.ts';
import { findByEmail, findById, insertUser, namesOf } from '../users/users.store.ts';
import type { Invitation } from './invitation.entity.ts';
import * as store from './invitations.store.ts';

/** Used, withdrawn, expired and never given all look alike. */
function usable(invitation: Invitation | null, now: number): Invitation {
  if (invitation !== null && invitation.acceptedAt === null && invitation.expiresAt.getTime() > now) return invitation;
  throw new Problem(
    'too-late',
    'This invitation has been used or withdrawn, or its time is over. Ask an owner of the organisation for a new one.',
  );
}

export function lookAtInvitation({ db, clock }: Deps, token: string): Promise<InvitationOffer> {
  return withTransaction(db, async (tx) => {
    const invitation = usable(await store.findByToken(tx, linkTokenDigest(token)), clock.now());
    const organisation = await tx.findOneByOrFail(Organisation, { id: invitation.organisationId });
    const names = await namesOf(tx, [invitation.invitedBy]);
    return {
      organisation: organisation.name,
      role: invitation.role,
      email: invitation.email,
      invitedBy: names.get(invitation.invitedBy) ?? organisation.name,
      expiresAt: invitation.expiresAt.toISOString(),
      hasAccount: (await findByEmail(tx, invitation.email)) !== null,
    };
  });
}

async function join(tx: Tx, { organisationId, role, id }: Invitation, userId: string, now: Date): Promise<void> {
  await lockOrganisation(tx, organisationId);
  const member = await findMember(tx, organisationId, userId);
  if (member === null) await insertMember(tx, { organisationId, userId, role, joinedAt: now });
  await store.updateInvitation(tx, id, { acceptedAt: now });
}

/** Makes an account for the invited address, and a member of it. */
export async function acceptInvitation(deps: Deps, { token, name, password }: InvitationAnswer) {
  const { db, random, clock } = deps;
  await lookAtInvitation(deps, token);
  const passwordHash = await hashPassword(password);
  return withTransaction(db, async (tx) => {
    const now = new Date(clock.now());
    const invitation = usable(await store.lockByToken(tx, linkTokenDigest(token)), now.getTime());
    const { email, organisationId } = invitation;
    const userId = random.id();
    await insertUser(tx, { id: userId, email, name, passwordHash, createdAt: now });
    await join(tx, invitation, userId, now);
    return { userId, organisationId };
  });
}

/** Accepts with the account that is signed in, which must be that of the invited address. */
export function joinByInvitation({ db, clock }: Deps, userId: string, token: string) {
  return withTransaction(db, async (tx) => {
    const now = new Date(clock.now());
    const invitation = usable(await store.lockByToken(tx, linkTokenDigest(token)), now.getTime());
    const user = await findById(tx, userId);
    if (user?.email !== invitation.email)
      throw new Problem('not-allowed', `This invitation is for ${invitation.email}. Sign in with that address.`);
    await join(tx, invitation, userId, now);
    return { organisationId: invitation.organisationId };
  });
}
