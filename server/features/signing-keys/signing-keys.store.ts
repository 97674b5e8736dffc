import { In, IsNull } from 'typeorm';
import { likePattern, pageOfRows } from '../../db/paging.ts';
import type { Tx } from '../../db/transaction.ts';
import { HeadSignatureRow } from '../../ledger/head-signature.entity.ts';
import { SigningKey } from '../../ledger/signing-key.entity.ts';

export function listRetired(tx: Tx, organisationId: string, { q, page }: { q: string; page: number }) {
  const rows = tx
    .createQueryBuilder(SigningKey, 'signing_key')
    .where('signing_key.organisationId = :organisationId and signing_key.retiredAt is not null', { organisationId })
    .orderBy('signing_key.retiredAt', 'DESC')
    .addOrderBy('signing_key.fingerprint');
  // Read out in groups, and typed as they were heard.
  const digits = q.replaceAll(' ', '').toLowerCase();
  if (digits !== '') rows.andWhere('signing_key.fingerprint like :q', { q: likePattern(digits) });
  return pageOfRows(rows, page);
}

export function findInUse(tx: Tx, organisationId: string): Promise<SigningKey | null> {
  return tx.findOneBy(SigningKey, { organisationId, retiredAt: IsNull() });
}

/** How many heads each key has signed. */
export async function countHeads(tx: Tx, fingerprints: readonly string[]): Promise<Map<string, number>> {
  if (fingerprints.length === 0) return new Map();
  const rows = await tx
    .createQueryBuilder(HeadSignatureRow, 'signed')
    .select('signed.key', 'fingerprint')
    .addSelect('count(*)', 'heads')
    .where({ key: In([...fingerprints]) })
    .groupBy('signed.key')
    .getRawMany<{ fingerprint: string; heads: string }>();
  return new Map(rows.map(({ fingerprint, heads }) => [fingerprint, Number(heads)]));
}
