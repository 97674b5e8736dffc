import type { MeasurementDraft, MeasurementListQuery } from '#shared/contracts/measurements.ts';
import type { Point } from '#shared/measurements/read-measurement.ts';
import { readMeasurement } from '#shared/measurements/read-measurement.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { kindOfBytes, textOfBytes } from '../../files/kind-of-bytes.ts';
import type { Upload } from '../../files/receive-upload.ts';
import type { Caller } from '../../http/access.ts';
import { openCable } from '../cables/open-cable.service.ts';
import type { Measurement } from './measurement.entity.ts';
import * as store from './measurements.store.ts';
import { curveView, measurementRowView, measurementView } from './measurements.views.ts';

type Where = { id: string; measurementId: string };

async function measurementOrProblem(tx: Tx, { id, measurementId }: Where): Promise<Measurement> {
  const found = await store.findMeasurement(tx, id, measurementId);
  if (found === null) throw new Problem('not-found', 'There is no such measurement.');
  return found;
}

export function listMeasurements({ db }: Deps, who: Caller, cableId: string, query: MeasurementListQuery) {
  return withTransaction(db, async (tx) => {
    await openCable(tx, who, cableId);
    const found = await store.listMeasurements(tx, cableId, query);
    return { ...found, rows: found.rows.map(measurementRowView) };
  });
}

export function measuredCurves({ db }: Deps, who: Caller, cableId: string) {
  return withTransaction(db, async (tx) => {
    await openCable(tx, who, cableId);
    return { curves: (await store.newestMeasurements(tx, [cableId])).map(curveView) };
  });
}

export function getMeasurement({ db }: Deps, who: Caller, where: Where) {
  return withTransaction(db, async (tx) => {
    const cable = await openCable(tx, who, where.id);
    return measurementView(await measurementOrProblem(tx, where), cable);
  });
}

/** How many broken lines are named at once; a file of another kind has them all broken. */
const mostNamed = 20;

/** @throws Problem that names the broken lines */
function pointsOf({ text, quantity, columns }: MeasurementDraft): readonly Point[] {
  const { points, faults } = readMeasurement(text, quantity, columns);
  if (faults.length === 0) return points;
  throw new Problem(
    'invalid-input',
    'Some lines cannot be read; nothing was saved.',
    faults.slice(0, mostNamed).map(({ line, detail }) => ({ pointer: '/text', detail: `Line ${line}: ${detail}` })),
  );
}

/** The text of a table's file. @throws Problem when it holds none */
function textOf(upload: Upload): string {
  const text = kindOfBytes(upload.bytes) === 'text' ? textOfBytes(upload.bytes) : null;
  if (text !== null) return text;
  throw new Problem('invalid-input', 'This file is no table; nothing was kept.', [
    { pointer: '/file', detail: 'This is no text. Save the table as CSV and choose that file' },
  ]);
}

export async function addMeasurement(
  deps: Deps,
  who: Caller,
  where: { id: string; specimenId: string },
  { draft, upload }: { draft: MeasurementDraft; upload: Upload | null },
) {
  return withTransaction(deps.db, async (tx) => {
    const cable = await openCable(tx, who, where.id);
    if (!cable.specimens.some(({ id }) => id === where.specimenId))
      throw new Problem('not-found', 'There is no such specimen.');
    const original = upload === null ? null : textOf(upload);
    const points = pointsOf(draft);
    const id = deps.random.id();
    await store.insertMeasurement(tx, {
      id,
      specimenId: where.specimenId,
      quantity: draft.quantity,
      instrument: draft.instrument,
      person: draft.person,
      takenOn: draft.takenOn,
      temperatureC: draft.temperatureC ?? null,
      moment: draft.moment,
      note: draft.note,
      circuit: draft.circuit ?? null,
      text: draft.text,
      columns: draft.columns,
      points: [...points],
      pointCount: points.length,
      fileDigest: upload === null ? null : await deps.files.put(upload.bytes),
      fileName: upload?.name ?? null,
      isCorrected: original !== null && plainLines(original) !== plainLines(draft.text),
      addedBy: who.userId,
      addedAt: new Date(deps.clock.now()),
      struckAt: null,
      struckReason: null,
    });
    return measurementView(await measurementOrProblem(tx, { id: where.id, measurementId: id }), cable);
  });
}

/** Browsers write the ends of lines in a text field in their own way. */
const plainLines = (text: string) =>
  text
    .replace(/^\ufeff/, '')
    .replace(/\r\n?/g, '\n')
    .trimEnd();

export function strikeMeasurement(deps: Deps, who: Caller, where: Where, reason: string) {
  return withTransaction(deps.db, async (tx) => {
    const cable = await openCable(tx, who, where.id);
    await measurementOrProblem(tx, where);
    const at = new Date(deps.clock.now());
    if (!(await store.strikeMeasurement(tx, where.measurementId, { at, reason })))
      throw new Problem('wrong-phase', 'This measurement is struck out already.');
    return measurementView(await measurementOrProblem(tx, where), cable);
  });
}

export async function measurementFile(deps: Deps, who: Caller, where: Where) {
  const { fileDigest, fileName } = await withTransaction(deps.db, async (tx) => {
    await openCable(tx, who, where.id);
    return measurementOrProblem(tx, where);
  });
  const bytes = fileDigest === null ? null : await deps.files.get(fileDigest);
  if (bytes === null) throw new Problem('not-found', 'This measurement has no file: its values were typed.');
  return { name: fileName ?? 'measurement.csv', bytes };
}
