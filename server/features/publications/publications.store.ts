import { likePattern, pageOfRows } from '../../db/paging.ts';
import type { Tx } from '../../db/transaction.ts';
import { TimestampToken } from '../../timestamps/timestamp-token.entity.ts';
import { Publication } from './publication.entity.ts';

export function listPublications(tx: Tx, query: { q: string; page: number; organisationId?: string }) {
  const rows = tx
    .createQueryBuilder(Publication, 'publication')
    .orderBy('publication.publishedAt', 'DESC')
    .addOrderBy('publication.id');
  const { organisationId } = query;
  if (organisationId !== undefined) rows.andWhere('publication.organisationId = :organisationId', { organisationId });
  if (query.q !== '')
    rows.andWhere('(publication.headline like :q or publication.title like :q or publication.publisher like :q)', {
      q: likePattern(query.q),
    });
  return pageOfRows(rows, query.page);
}

/** Every address and when it last changed, for search engines; at most as many as a sitemap may hold. */
export function publicationAddresses(tx: Tx): Promise<Publication[]> {
  return tx.find(Publication, { order: { publishedAt: 'DESC' }, take: 50_000 });
}

export function findPublication(tx: Tx, id: string): Promise<Publication | null> {
  return tx.findOneBy(Publication, { id });
}

export function publicationOfStudy(tx: Tx, studyId: string): Promise<Publication | null> {
  return tx.findOneBy(Publication, { studyId });
}

/** The document's text, or null when no such document is published at the id. */
export async function documentOf(tx: Tx, id: string, digest: string): Promise<string | null> {
  const row = await tx
    .createQueryBuilder(Publication, 'publication')
    .addSelect('publication.document')
    .where('publication.id = :id and publication.digest = :digest', { id, digest })
    .getOne();
  return row?.document ?? null;
}

/** How many tokens of a study's heads have come. */
export function countTokens(tx: Tx, studyId: string): Promise<number> {
  return tx.countBy(TimestampToken, { studyId });
}

export async function insertPublication(tx: Tx, publication: Publication) {
  await tx.insert(Publication, publication);
}

export async function withdrawPublication(tx: Tx, id: string, at: Date, reason: string) {
  await tx.update(Publication, { id }, { withdrawnAt: at, withdrawnReason: reason });
}
