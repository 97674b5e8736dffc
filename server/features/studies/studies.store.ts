import { closedStates, type StudyDraft, type StudyListQuery } from '#shared/contracts/studies.ts';
import { likePattern, pageOfRows, sortRows } from '../../db/paging.ts';
import type { Tx } from '../../db/transaction.ts';
import { ProtocolVersion } from './protocol-version.entity.ts';
import { Study } from './study.entity.ts';

export function listStudies(
  tx: Tx,
  organisationId: string,
  query: Omit<StudyListQuery, 'state'> & { state: StudyListQuery['state'] | 'any-closed' },
) {
  const rows = tx
    .createQueryBuilder(Study, 'study')
    .where('study.organisationId = :organisationId', { organisationId });
  const states = query.state === 'any-closed' ? closedStates : [query.state];
  if (query.state !== 'any') rows.andWhere('study.state in (:...states)', { states });
  if (query.q !== '') rows.andWhere('study.title like :q', { q: likePattern(query.q) });
  const columns = { title: 'study.title', state: 'study.state', updatedAt: 'study.updatedAt' };
  return pageOfRows(sortRows(rows, query.sort, columns, 'study.id'), query.page);
}

export function findStudy(tx: Tx, organisationId: string, id: string): Promise<Study | null> {
  return tx.findOneBy(Study, { organisationId, id });
}

/** The study with its row locked, so that state changes come one after the other. */
export function lockStudy(tx: Tx, organisationId: string, id: string): Promise<Study | null> {
  return tx.findOne(Study, { where: { organisationId, id }, lock: { mode: 'pessimistic_write' } });
}

/** Locks a study's row, so that numbers and labels are given out one after the other. */
export async function lockStudyRow(tx: Tx, id: string): Promise<void> {
  await tx.findOneOrFail(Study, { where: { id }, lock: { mode: 'pessimistic_write' } });
}

export function studyById(tx: Tx, id: string): Promise<Study> {
  return tx.findOneByOrFail(Study, { id });
}

export function studiesOf(tx: Tx, organisationId: string): Promise<Study[]> {
  return tx.find(Study, { where: { organisationId }, order: { updatedAt: 'DESC' } });
}

const columnsOf = (draft: StudyDraft) => ({ title: draft.title, codeHolderId: draft.codeHolderId, draft });

export async function insertStudy(
  tx: Tx,
  study: { id: string; organisationId: string; managerId: string; draft: StudyDraft; now: Date },
) {
  const { id, organisationId, managerId, draft, now } = study;
  await tx.insert(Study, {
    id,
    organisationId,
    managerId,
    ...columnsOf(draft),
    state: 'draft',
    protocol: null,
    headSequence: 0,
    headDigest: null,
    codesState: 'none',
    updatedAt: now,
  });
}

export async function updateDraft(tx: Tx, id: string, draft: StudyDraft, now: Date) {
  await tx.update(Study, { id }, { ...columnsOf(draft), updatedAt: now });
}

export async function updateStudy(
  tx: Tx,
  id: string,
  change: Partial<Pick<Study, 'state' | 'protocol' | 'codesState'>>,
  now: Date,
) {
  await tx.update(Study, { id }, { ...change, updatedAt: now });
}

export async function insertVersion(tx: Tx, version: ProtocolVersion) {
  await tx.insert(ProtocolVersion, version);
}

export function versionsOfStudy(tx: Tx, studyId: string): Promise<ProtocolVersion[]> {
  return tx.find(ProtocolVersion, { where: { studyId }, order: { version: 'ASC' } });
}

export async function deleteDraft(tx: Tx, id: string) {
  await tx.delete(Study, { id, state: 'draft' });
}
