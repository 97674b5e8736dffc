import type { MeasurementListQuery } from '#shared/contracts/measurements.ts';
import { likePattern, pageOfRows, sortRows } from '../../db/paging.ts';
import type { Tx } from '../../db/transaction.ts';
import { Measurement } from './measurement.entity.ts';

const withSpecimen = (tx: Tx) =>
  tx.createQueryBuilder(Measurement, 'measurement').innerJoinAndSelect('measurement.specimen', 'specimen');

export function listMeasurements(tx: Tx, cableId: string, query: MeasurementListQuery) {
  const rows = withSpecimen(tx).where('specimen.cableId = :cableId', { cableId });
  if (query.quantity !== 'any') rows.andWhere('measurement.quantity = :quantity', { quantity: query.quantity });
  if (query.q !== '')
    rows.andWhere('(specimen.serial like :q or measurement.instrument like :q or measurement.person like :q)', {
      q: likePattern(query.q),
    });
  const columns = { takenOn: 'measurement.takenOn', specimen: 'specimen.serial', quantity: 'measurement.quantity' };
  return pageOfRows(sortRows(rows, query.sort, columns, 'measurement.addedAt'), query.page);
}

/** Of each piece and quantity the newest that is not struck out. */
export async function newestMeasurements(tx: Tx, cableIds: readonly string[]): Promise<Measurement[]> {
  if (cableIds.length === 0) return [];
  const rows = await withSpecimen(tx)
    .where('specimen.cableId in (:...cableIds)', { cableIds: [...cableIds] })
    .andWhere('measurement.struckAt is null')
    .orderBy('specimen.position')
    .addOrderBy('measurement.takenOn', 'DESC')
    .addOrderBy('measurement.addedAt', 'DESC')
    .getMany();
  const seen = new Set<string>();
  return rows.filter(({ specimenId, quantity }) => {
    const key = `${specimenId} ${quantity}`;
    const isNewest = !seen.has(key);
    seen.add(key);
    return isNewest;
  });
}

export function findMeasurement(tx: Tx, cableId: string, id: string): Promise<Measurement | null> {
  return withSpecimen(tx).where('measurement.id = :id and specimen.cableId = :cableId', { id, cableId }).getOne();
}

export async function insertMeasurement(tx: Tx, row: Omit<Measurement, 'specimen'>): Promise<void> {
  await tx.insert(Measurement, row);
}

/** @returns whether it was not struck out before */
export async function strikeMeasurement(tx: Tx, id: string, struck: { at: Date; reason: string }): Promise<boolean> {
  const { affected } = await tx
    .createQueryBuilder()
    .update(Measurement)
    .set({ struckAt: struck.at, struckReason: struck.reason })
    .where('id = :id and struck_at is null', { id })
    .execute();
  return affected === 1;
}
