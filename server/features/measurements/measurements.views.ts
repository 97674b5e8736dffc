import type { MeasuredCurve, Measurement as MeasurementReply, MeasurementRow } from '#shared/contracts/measurements.ts';
import type { Measurement } from './measurement.entity.ts';

const specimenOf = ({ specimen: { id, serial } }: Measurement) => ({ id, serial });

const shape = (row: Measurement): MeasurementRow => ({
  id: row.id,
  specimen: specimenOf(row),
  quantity: row.quantity,
  instrument: row.instrument,
  person: row.person,
  takenOn: row.takenOn,
  temperatureC: row.temperatureC,
  moment: row.moment,
  note: row.note,
  addedAt: row.addedAt.toISOString(),
  file:
    row.fileDigest === null
      ? null
      : { name: row.fileName ?? '', digest: row.fileDigest, isCorrected: Boolean(row.isCorrected) },
  struck: row.struckAt === null ? null : { at: row.struckAt.toISOString(), reason: row.struckReason ?? '' },
  pointCount: row.pointCount,
});

export const measurementRowView = shape;

export function measurementView(row: Measurement, cable: { id: string; name: string }): MeasurementReply {
  const { text, columns, points } = row;
  return {
    ...shape(row),
    cable: { id: cable.id, name: cable.name },
    text,
    columns,
    circuit: row.circuit ?? null,
    points,
  };
}

export function curveView(row: Measurement): MeasuredCurve {
  const { id, quantity, takenOn, moment, points } = row;
  return { id, specimen: specimenOf(row), quantity, takenOn, moment, circuit: row.circuit ?? null, points };
}
