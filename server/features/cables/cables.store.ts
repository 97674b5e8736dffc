import { In } from 'typeorm';
import type { CableDraft, CableListQuery, SpecimenDraft } from '#shared/contracts/cables.ts';
import { likePattern, pageOfRows, sortRows } from '../../db/paging.ts';
import type { Tx } from '../../db/transaction.ts';
import { Cable } from './cable.entity.ts';
import { Specimen } from './specimen.entity.ts';

export function listCables(tx: Tx, organisationId: string, query: CableListQuery & { without: readonly string[] }) {
  const rows = tx
    .createQueryBuilder(Cable, 'cable')
    .leftJoinAndSelect('cable.specimens', 'specimen', 'specimen.archived = false')
    .where('cable.organisationId = :organisationId', { organisationId });
  if (query.without.length > 0) rows.andWhere('cable.id not in (:...without)', { without: [...query.without] });
  if (query.archived === 'no') rows.andWhere('cable.archived = false');
  if (query.kind !== 'any') rows.andWhere('cable.kind = :kind', { kind: query.kind });
  for (const field of ['material', 'geometry'] as const)
    if (query[field] !== 'any')
      rows.andWhere(`json_value(cable.construction, '$.${field}') = :${field}`, { [field]: query[field] });
  if (query.q !== '')
    rows.andWhere(
      '(cable.name like :q or cable.description like :q or cable.kind like :q or cable.construction like :q)',
      {
        q: likePattern(query.q),
      },
    );
  const columns = { name: 'cable.name', kind: 'cable.kind', length: 'cable.lengthMm', updatedAt: 'cable.updatedAt' };
  return pageOfRows(sortRows(rows, query.sort, columns, 'cable.id'), query.page);
}

const inOrder = { specimens: { position: 'ASC' } } as const;

export function cablesInUse(tx: Tx, organisationId: string): Promise<Cable[]> {
  return tx.find(Cable, {
    where: { organisationId, archived: false },
    relations: { specimens: true },
    order: { name: 'ASC', ...inOrder },
  });
}

export function cablesById(tx: Tx, organisationId: string, ids: readonly string[]): Promise<Cable[]> {
  return tx.find(Cable, {
    where: { organisationId, id: In([...ids]) },
    relations: { specimens: true },
    order: inOrder,
  });
}

export function findCable(tx: Tx, organisationId: string, id: string): Promise<Cable | null> {
  return tx.findOne(Cable, { where: { organisationId, id }, relations: { specimens: true }, order: inOrder });
}

export function cablesToExport(tx: Tx, organisationId: string): Promise<Cable[]> {
  return tx.find(Cable, { where: { organisationId, archived: false }, order: { name: 'ASC', id: 'ASC' } });
}

/** Which of some names cables of the organisation bear already. */
export async function knownNames(tx: Tx, organisationId: string, names: readonly string[]): Promise<string[]> {
  if (names.length === 0) return [];
  const rows = await tx.find(Cable, { select: { name: true }, where: { organisationId, name: In([...names]) } });
  return [...new Set(rows.map(({ name }) => name))];
}

type NewCable = { id: string; organisationId: string; draft: CableDraft; now: Date };
const mostAtOnce = 500;

export async function insertCables(tx: Tx, cables: readonly NewCable[]): Promise<void> {
  const rows = cables.map(({ id, organisationId, draft, now }) => {
    const construction = draft.construction ?? null;
    return { id, organisationId, ...draft, construction, archived: false, updatedAt: now };
  });
  for (let from = 0; from < rows.length; from += mostAtOnce)
    await tx.insert(Cable, rows.slice(from, from + mostAtOnce));
}

export async function insertCable(tx: Tx, cable: { id: string; organisationId: string; draft: CableDraft; now: Date }) {
  const { id, organisationId, draft, now } = cable;
  const construction = draft.construction ?? null;
  await tx.insert(Cable, { id, organisationId, ...draft, construction, archived: false, updatedAt: now });
}

export async function updateCable(tx: Tx, id: string, change: Partial<CableDraft & { archived: boolean }>, now: Date) {
  await tx.update(Cable, { id }, { ...change, updatedAt: now });
}

export async function insertSpecimen(
  tx: Tx,
  specimen: { id: string; cableId: string; draft: SpecimenDraft; position: number },
) {
  const { id, cableId, draft, position } = specimen;
  await tx.insert(Specimen, { id, cableId, ...draft, archived: false, position });
}

export async function updateSpecimen(tx: Tx, id: string, change: Partial<SpecimenDraft & { archived: boolean }>) {
  await tx.update(Specimen, { id }, change);
}
