import { In } from 'typeorm';
import type { RegistryListQuery, RegistryState } from '#shared/contracts/registry.ts';
import { closedStates } from '#shared/contracts/studies.ts';
import { likePattern, pageOfRows } from '../../db/paging.ts';
import type { Tx } from '../../db/transaction.ts';
import { RegistryLeafRow } from '../../ledger/registry-leaf.entity.ts';
import { Publication } from '../publications/publication.entity.ts';
import { Session } from '../sessions/session.entity.ts';
import { Study } from '../studies/study.entity.ts';

const isLatest =
  'leaf.version = (select max(other.version) from registry_leaves other where other.study_id = leaf.study_id)';
const isWithdrawn = 'publication.withdrawnAt is not null';

const conditionOf: Record<RegistryState, string> = {
  sealed: `${isLatest} and study.state = 'sealed'`,
  amended: `not (${isLatest})`,
  collecting: `${isLatest} and study.state = 'collecting'`,
  closed: `${isLatest} and study.state = 'closed'`,
  shelved: `${isLatest} and study.state = 'shelved'`,
  published: `${isLatest} and study.state = 'published' and not (${isWithdrawn})`,
  withdrawn: `${isLatest} and study.state = 'published' and ${isWithdrawn}`,
};

/** Entries, newest first. Titles are searched only where they are public: once the study is closed. */
export function listLeaves(tx: Tx, organisationId: string, { q, state, page }: RegistryListQuery) {
  const rows = tx
    .createQueryBuilder(RegistryLeafRow, 'leaf')
    .innerJoin(Study, 'study', 'study.id = leaf.studyId')
    .leftJoin(Publication, 'publication', 'publication.studyId = leaf.studyId')
    .where('leaf.organisationId = :organisationId', { organisationId })
    .orderBy('leaf.index', 'DESC');
  if (state !== 'any') rows.andWhere(conditionOf[state]);
  if (q !== '')
    rows.andWhere('(leaf.digest like :q or (study.state in (:...closed) and study.title like :q))', {
      q: likePattern(q),
      closed: closedStates,
    });
  return pageOfRows(rows, page);
}

export function findLeaf(tx: Tx, organisationId: string, index: number): Promise<RegistryLeafRow | null> {
  return tx.findOneBy(RegistryLeafRow, { organisationId, index });
}

/** The place of the last sealed version of a study's protocol. */
export async function lastLeafOf(tx: Tx, organisationId: string, studyId: string): Promise<number | null> {
  const row = await tx.findOne(RegistryLeafRow, { where: { organisationId, studyId }, order: { version: 'DESC' } });
  return row?.index ?? null;
}

/** What stands beside some entries: their studies, publications, newest versions and numbers of sessions. */
export async function besideLeaves(tx: Tx, studyIds: readonly string[]) {
  if (studyIds.length === 0) return { studies: [], publications: [], versions: [], sessions: [] };
  const studyId = In([...studyIds]);
  return {
    studies: await tx.findBy(Study, { id: studyId }),
    publications: await tx.findBy(Publication, { studyId }),
    versions: await tx.find(RegistryLeafRow, { select: { studyId: true, version: true }, where: { studyId } }),
    sessions: await tx.find(Session, { select: { studyId: true }, where: { studyId } }),
  };
}

/** Organisations that have published something: their registries are for search engines too. */
export async function publishingOrganisations(tx: Tx): Promise<string[]> {
  const rows = await tx
    .createQueryBuilder(Publication, 'publication')
    .select('distinct publication.organisationId', 'id')
    .getRawMany<{ id: string }>();
  return rows.map(({ id }) => id);
}
