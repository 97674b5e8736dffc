import { In, QueryFailedError } from 'typeorm';
import { Problem } from '#shared/problem.ts';
import type { Tx } from '../../db/transaction.ts';
import { Membership } from '../organisations/membership.entity.ts';
import { User } from './user.entity.ts';

export function findByEmail(tx: Tx, email: string): Promise<User | null> {
  return tx.findOneBy(User, { email: email.toLowerCase() });
}

export function findById(tx: Tx, id: string): Promise<User | null> {
  return tx.findOneBy(User, { id });
}

export function membershipsOf(tx: Tx, userId: string): Promise<Membership[]> {
  return tx.find(Membership, { where: { userId }, relations: { organisation: true } });
}

export function membersOf(tx: Tx, organisationId: string): Promise<Membership[]> {
  return tx.find(Membership, {
    where: { organisationId },
    relations: { user: true },
    order: { user: { name: 'ASC' } },
  });
}

/** @throws Problem `already-taken` when the address has an account */
export async function insertUser(tx: Tx, user: User): Promise<void> {
  try {
    await tx.insert(User, user);
  } catch (error) {
    if (!isDuplicate(error)) throw error;
    throw new Problem('already-taken', 'There is an account for this address already. Sign in with it.');
  }
}

const isDuplicate = (error: unknown) =>
  error instanceof QueryFailedError && (error.driverError as { code?: unknown }).code === 'ER_DUP_ENTRY';

export async function setPassword(tx: Tx, id: string, passwordHash: string): Promise<void> {
  await tx.update(User, { id }, { passwordHash });
}

/** Names by id, for replies that mention people. */
export async function namesOf(tx: Tx, ids: readonly string[]): Promise<Map<string, string>> {
  if (ids.length === 0) return new Map();
  const users = await tx.findBy(User, { id: In([...new Set(ids)]) });
  return new Map(users.map((user) => [user.id, user.name]));
}
