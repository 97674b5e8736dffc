import { crew, type Role } from '#shared/contracts/endpoint.ts';
import type { PersonRow } from '#shared/contracts/people.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import type { OpenConsoles } from '../../http/open-consoles.ts';
import { removedMail, roleChangedMail } from '../../mail/mails.ts';
import { postMail } from '../../mail/outbox.ts';
import { pageAddresses } from '../../mail/page-addresses.ts';
import type { Membership } from '../organisations/membership.entity.ts';
import * as store from './people.store.ts';

type Member = { organisationId: string; id: string };

async function rowsOf(tx: Tx, organisationId: string, members: readonly Membership[]): Promise<PersonRow[]> {
  const ids = members.map(({ userId }) => userId);
  const sessions = await store.sessionsToRun(tx, organisationId, ids);
  const studies = await store.studiesWithCodesHeld(tx, organisationId, ids);
  return members.map(({ userId, user, role, joinedAt }) => ({
    id: userId,
    name: user.name,
    email: user.email,
    role,
    joinedAt: joinedAt.toISOString(),
    sessionsToRun: sessions.filter(({ proctorId }) => proctorId === userId).length,
    codesHeld: studies.filter(({ codeHolderId }) => codeHolderId === userId).length,
  }));
}

export function listPeople({ db }: Deps, organisationId: string, query: store.PeopleQuery) {
  return withTransaction(db, async (tx) => {
    const found = await store.listPeople(tx, organisationId, query);
    return { ...found, rows: await rowsOf(tx, organisationId, found.rows) };
  });
}

async function memberOrProblem(tx: Tx, { organisationId, id }: Member): Promise<Membership> {
  const member = await store.findMember(tx, organisationId, id);
  if (member === null) throw new Problem('not-found', 'There is no such member.');
  return member;
}

/** An organisation without an owner could never again invite, change or remove anybody. */
async function requireAnotherOwner(tx: Tx, member: Membership): Promise<void> {
  if (member.role !== 'owner' || (await store.countOwners(tx, member.organisationId)) > 1) return;
  throw new Problem('wrong-phase', `${member.user.name} is the only owner. Make somebody else an owner first.`);
}

async function keepPastRole(
  tx: Tx,
  { random, clock }: Deps,
  { organisationId, userId, role }: Membership,
): Promise<void> {
  await store.insertPastRole(tx, { id: random.id(), organisationId, userId, role, endedAt: new Date(clock.now()) });
}

export async function changeRole(deps: Deps, consoles: OpenConsoles, where: Member, role: Role): Promise<PersonRow> {
  const { organisationId, id } = where;
  const row = await withTransaction(deps.db, async (tx) => {
    const organisation = await store.lockOrganisation(tx, organisationId);
    const member = await memberOrProblem(tx, where);
    if (member.role !== role) {
      await requireAnotherOwner(tx, member);
      await keepPastRole(tx, deps, member);
      await store.updateRole(tx, organisationId, id, role);
      const mail = roleChangedMail({ organisation: organisation.name, role, url: pageAddresses.start(deps.config) });
      await postMail(tx, deps, { organisationId, recipient: member.user.email }, mail);
    }
    const [changed] = await rowsOf(tx, organisationId, [await memberOrProblem(tx, where)]);
    if (changed === undefined) throw new Error('a member without a row');
    return changed;
  });
  const mayRun = (crew as readonly Role[]).includes(role);
  if (!mayRun) consoles.end((open) => open.userId === id && open.organisationId === organisationId);
  return row;
}

/** Ends a membership at once, with the consoles it had open. What the person did stays under their name. */
export async function removeMember(deps: Deps, consoles: OpenConsoles, where: Member) {
  const { organisationId, id } = where;
  await withTransaction(deps.db, async (tx) => {
    const organisation = await store.lockOrganisation(tx, organisationId);
    const member = await memberOrProblem(tx, where);
    await requireAnotherOwner(tx, member);
    await keepPastRole(tx, deps, member);
    await store.deleteMember(tx, organisationId, id);
    const mail = removedMail({ organisation: organisation.name });
    await postMail(tx, deps, { organisationId, recipient: member.user.email }, mail);
  });
  consoles.end((open) => open.userId === id && open.organisationId === organisationId);
  return { ok: true } as const;
}
