import { In } from 'typeorm';
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

/** Names by id, for replies that mention people. */
export async function namesOf(tx: Tx, ids: readonly string[]): Promise<Map<string, string>> {
  if (ids.length === 0) return new Map();
  const users = await tx.findBy(User, { id: In([...new Set(ids)]) });
  return new Map(users.map((user) => [user.id, user.name]));
}
