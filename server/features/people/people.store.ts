import { In, Not } from 'typeorm';
import type { Role } from '#shared/contracts/endpoint.ts';
import type { SortWord } from '#shared/contracts/paging.ts';
import { likePattern, pageOfRows, sortRows } from '../../db/paging.ts';
import type { Tx } from '../../db/transaction.ts';
import { Membership } from '../organisations/membership.entity.ts';
import { Organisation } from '../organisations/organisation.entity.ts';
import { PastRole } from '../organisations/past-role.entity.ts';
import { Session } from '../sessions/session.entity.ts';
import { Study } from '../studies/study.entity.ts';

export type PeopleQuery = {
  q: string;
  page: number;
  role: Role | 'any';
  sort: SortWord<keyof typeof sortColumns>;
};

const sortColumns = { name: 'user.name', role: 'membership.role', joined: 'membership.joinedAt' };

export function listPeople(tx: Tx, organisationId: string, { q, page, role, sort }: PeopleQuery) {
  const rows = tx
    .createQueryBuilder(Membership, 'membership')
    .innerJoinAndSelect('membership.user', 'user')
    .where('membership.organisationId = :organisationId', { organisationId });
  if (role !== 'any') rows.andWhere('membership.role = :role', { role });
  if (q !== '') rows.andWhere('(user.name like :q or user.email like :q)', { q: likePattern(q) });
  return pageOfRows(sortRows(rows, sort, sortColumns, 'membership.userId'), page);
}

/** Locks the organisation, so that changes of its people come one after the other. */
export function lockOrganisation(tx: Tx, id: string): Promise<Organisation> {
  return tx.findOneOrFail(Organisation, { where: { id }, lock: { mode: 'pessimistic_write' } });
}

export function findMember(tx: Tx, organisationId: string, userId: string): Promise<Membership | null> {
  return tx.findOne(Membership, { where: { organisationId, userId }, relations: { user: true } });
}

export function countOwners(tx: Tx, organisationId: string): Promise<number> {
  return tx.countBy(Membership, { organisationId, role: 'owner' });
}

export async function insertMember(
  tx: Tx,
  member: { organisationId: string; userId: string; role: Role; joinedAt: Date },
): Promise<void> {
  await tx.insert(Membership, member);
}

export async function updateRole(tx: Tx, organisationId: string, userId: string, role: Role): Promise<void> {
  await tx.update(Membership, { organisationId, userId }, { role });
}

export async function deleteMember(tx: Tx, organisationId: string, userId: string): Promise<void> {
  await tx.delete(Membership, { organisationId, userId });
}

export async function insertPastRole(tx: Tx, past: PastRole): Promise<void> {
  await tx.insert(PastRole, past);
}

/** Whoever was an owner or manager once and is so no more. */
export function pastManagersOf(tx: Tx, organisationId: string): Promise<PastRole[]> {
  return tx.findBy(PastRole, { organisationId, role: In(['owner', 'manager']) });
}

export function sessionsToRun(tx: Tx, organisationId: string, userIds: readonly string[]): Promise<Session[]> {
  const phase = Not(In(['finished', 'abandoned']));
  return tx.findBy(Session, { organisationId, proctorId: In([...userIds]), phase });
}

export function studiesWithCodesHeld(tx: Tx, organisationId: string, userIds: readonly string[]): Promise<Study[]> {
  const state = In(['draft', 'sealed', 'collecting']);
  return tx.find(Study, {
    where: { organisationId, codeHolderId: In([...userIds]), state },
    select: { id: true, codeHolderId: true },
  });
}
