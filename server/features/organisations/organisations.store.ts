import type { Tx } from '../../db/transaction.ts';
import { Organisation } from './organisation.entity.ts';

export async function organisationName(tx: Tx, id: string): Promise<string> {
  return (await tx.findOneByOrFail(Organisation, { id })).name;
}
