import type { Tx } from '../../db/transaction.ts';
import { Organisation } from './organisation.entity.ts';

export function findOrganisation(tx: Tx, id: string): Promise<Organisation | null> {
  return tx.findOneBy(Organisation, { id });
}

export async function organisationName(tx: Tx, id: string): Promise<string> {
  return (await tx.findOneByOrFail(Organisation, { id })).name;
}
