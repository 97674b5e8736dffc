import { LessThan, MoreThan } from 'typeorm';
import type { Tx } from '../../db/transaction.ts';
import { Organisation } from '../organisations/organisation.entity.ts';
import { Study } from '../studies/study.entity.ts';
import { Audit } from './audit.entity.ts';

export async function organisationIds(tx: Tx): Promise<string[]> {
  return (await tx.find(Organisation, { select: { id: true }, order: { createdAt: 'ASC' } })).map(({ id }) => id);
}

/** The studies that have a record; only their ids, since protocols are long. */
export async function recordedStudies(tx: Tx, organisationId: string): Promise<string[]> {
  const where = { organisationId, headSequence: MoreThan(0) };
  return (await tx.find(Study, { select: { id: true }, where, order: { id: 'ASC' } })).map(({ id }) => id);
}

/** The names of the triggers that are in place. */
export async function triggersInPlace(tx: Tx): Promise<string[]> {
  const rows: { name: string }[] = await tx.query(
    'select trigger_name as name from information_schema.triggers where trigger_schema = database()',
  );
  return rows.map(({ name }) => name);
}

export async function insertAudit(tx: Tx, audit: Audit): Promise<void> {
  await tx.insert(Audit, audit);
}

export async function deleteAuditsBefore(tx: Tx, at: Date): Promise<void> {
  await tx.delete(Audit, { at: LessThan(at) });
}

export function latestAudit(tx: Tx, organisationId: string): Promise<Audit | null> {
  return tx.findOne(Audit, { where: { organisationId }, order: { at: 'DESC' } });
}

/** When any organisation's records were last audited. */
export async function lastAuditAt(tx: Tx): Promise<Date | null> {
  const [latest] = await tx.find(Audit, { select: { at: true, organisationId: true }, order: { at: 'DESC' }, take: 1 });
  return latest?.at ?? null;
}
