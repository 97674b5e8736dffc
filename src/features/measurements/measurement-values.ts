import { z } from 'zod';
import { type MeasurementDraft, measurementDraft } from '#shared/contracts/measurements.ts';
import { type ColumnChoice, chooseColumns, readMeasurement } from '#shared/measurements/read-measurement.ts';
import { readTable } from '#shared/measurements/read-table.ts';

/** What the form holds while it is typed. */
export type MeasurementValues = Omit<MeasurementDraft, 'quantity' | 'columns' | 'temperatureC' | 'circuit'> & {
  specimenId: string;
  quantity: MeasurementDraft['quantity'];
  /** What was chosen otherwise than the heading says. */
  chosen: Partial<ColumnChoice>;
  temperatureC: string;
  circuit: { sourceOhms: string; loadOhms: string };
};

/** The columns that count: as chosen, else as the text's heading says. */
export function columnsOf({ text, quantity, chosen }: Pick<MeasurementValues, 'text' | 'quantity' | 'chosen'>) {
  return { ...chooseColumns(readTable(text), quantity), ...chosen };
}

const numberOf = (typed: string) => (typed.trim() === '' ? undefined : Number(typed.replace(',', '.')));

function draftOf(values: MeasurementValues): Record<keyof MeasurementDraft, unknown> {
  const { sourceOhms, loadOhms } = values.circuit;
  const isCircuit = values.quantity === 'level' && (sourceOhms.trim() !== '' || loadOhms.trim() !== '');
  return {
    quantity: values.quantity,
    text: values.text,
    columns: columnsOf(values),
    instrument: values.instrument,
    person: values.person,
    takenOn: values.takenOn,
    temperatureC: numberOf(values.temperatureC),
    moment: values.moment,
    circuit: isCircuit ? { sourceOhms: numberOf(sourceOhms), loadOhms: numberOf(loadOhms) } : undefined,
    note: values.note,
  };
}

/** The draft as it is typed, with the piece it belongs to; broken lines count as a fault of the text. */
export const typedMeasurement = z
  .custom<MeasurementValues>((values) => typeof values === 'object')
  .check((check) => {
    if (check.value.specimenId === '')
      check.issues.push({ code: 'custom', input: '', path: ['specimenId'], message: 'Choose the piece' });
    const { text, quantity } = check.value;
    if (text.trim() === '') return;
    const { faults } = readMeasurement(text, quantity, columnsOf(check.value));
    const message = faults.length === 1 ? '1 line cannot be read' : `${faults.length} lines cannot be read`;
    if (faults.length > 0) check.issues.push({ code: 'custom', input: text, path: ['text'], message });
  })
  .transform((values) => ({ specimenId: values.specimenId, draft: draftOf(values) }))
  .transform(({ specimenId, draft }, context) => {
    const read = measurementDraft.safeParse(draft);
    if (read.success) return { specimenId, draft: read.data };
    for (const issue of read.error.issues)
      context.addIssue({ code: 'custom', path: issue.path, message: issue.message });
    return z.NEVER;
  });
export type TypedMeasurement = z.output<typeof typedMeasurement>;
