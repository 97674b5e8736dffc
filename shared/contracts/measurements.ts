import { z } from 'zod';
import { quantities } from '../measurements/quantities.ts';
import { mostPoints } from '../measurements/read-measurement.ts';
import { endpoint, managers, savedFile } from './endpoint.ts';
import { thingParams } from './organisation-params.ts';
import { listQuery, pageOf, sortBy } from './paging.ts';

const line = (most: number) => z.string().trim().max(most, `At most ${most} characters`);
const ohms = (least: number) =>
  z.number('Enter a number').min(least, `At least ${least} Ω`).max(1e9, 'At most 1,000,000,000 Ω');

/** The largest file of a measurement, and the longest text of one. */
export const measurementFileBytes = 1_000_000;
const mostCharacters = 200_000;

/** When a piece was measured, where something is done to it. */
export const moments = ['as-is', 'before', 'after'] as const;

/** Columns from 0; units as `shared/measurements/quantities.ts` names them. */
const columnChoice = z.strictObject({
  frequency: z.int().min(0).max(50).nullable(),
  value: z.int('Choose the column of the values').min(0).max(50),
  frequencyUnit: z.string().max(10),
  valueUnit: z.string().max(10),
});

/** A measurement of one piece, as it is typed or read from a file and corrected. */
export const measurementDraft = z.strictObject({
  quantity: z.enum(quantities, 'Choose what was measured'),
  /** The table as text, in any of the manners of `readTable`. */
  text: z
    .string()
    .max(mostCharacters, `At most ${mostCharacters.toLocaleString('en')} characters: leave some lines out`)
    .refine((text) => text.trim() !== '', 'Choose a file, or type the values'),
  columns: columnChoice,
  instrument: line(200).min(2, 'Name the instrument'),
  person: line(120).min(2, 'Name who measured'),
  takenOn: z.iso.date('Enter the date'),
  /** Of the cable, in degrees Celsius; left out where it was not noted. */
  temperatureC: z.number('Enter a number').min(-50, 'At least −50 °C').max(150, 'At most 150 °C').optional(),
  moment: z.enum(moments),
  /** For a level at the load: between what the cable stood. Left out, nothing is predicted beside it. */
  circuit: z.strictObject({ sourceOhms: ohms(0), loadOhms: ohms(0.1) }).optional(),
  note: line(500),
});
export type MeasurementDraft = z.output<typeof measurementDraft>;

const point = z.strictObject({ frequency: z.number().nullable(), value: z.number() });

const measurementShape = {
  id: z.uuid(),
  specimen: z.strictObject({ id: z.uuid(), serial: z.string() }),
  quantity: z.enum(quantities),
  instrument: z.string(),
  person: z.string(),
  takenOn: z.iso.date(),
  temperatureC: z.number().nullable(),
  moment: z.enum(moments),
  note: z.string(),
  addedAt: z.iso.datetime(),
  /** The file it came from: what it was called, the SHA-256 of its bytes, and whether the text was corrected since. */
  file: z.strictObject({ name: z.string(), digest: z.string(), isCorrected: z.boolean() }).nullable(),
  struck: z.strictObject({ at: z.iso.datetime(), reason: z.string() }).nullable(),
  pointCount: z.int(),
};
export const measurementRow = z.strictObject(measurementShape);
export type MeasurementRow = z.output<typeof measurementRow>;

const circuit = z.strictObject({ sourceOhms: z.number(), loadOhms: z.number() });
export const measurement = z.strictObject({
  ...measurementShape,
  cable: z.strictObject({ id: z.uuid(), name: z.string() }),
  text: z.string(),
  columns: columnChoice,
  circuit: circuit.nullable(),
  points: z.array(point).max(mostPoints),
});
export type Measurement = z.output<typeof measurement>;

/** The newest measurement of a quantity on each piece of a cable that is not struck out. */
export const measuredCurve = z.strictObject({
  id: z.uuid(),
  specimen: z.strictObject({ id: z.uuid(), serial: z.string() }),
  quantity: z.enum(quantities),
  takenOn: z.iso.date(),
  moment: z.enum(moments),
  circuit: circuit.nullable(),
  points: z.array(point),
});
export type MeasuredCurve = z.output<typeof measuredCurve>;

const ofCable = '/organisations/:organisationId/cables/:id';
const measurementParams = z.strictObject({ organisationId: z.uuid(), id: z.uuid(), measurementId: z.uuid() });
const ofMeasurement = `${ofCable}/measurements/:measurementId`;

const measurementListQuery = listQuery.extend({
  quantity: z.enum(['any', ...quantities]).default('any'),
  sort: sortBy(['takenOn', 'specimen', 'quantity'], '-takenOn'),
});
export type MeasurementListQuery = z.output<typeof measurementListQuery>;

export const measurementsApi = {
  list: endpoint({
    method: 'GET',
    path: `${ofCable}/measurements`,
    summary: 'Measurements of the pieces of a cable, newest first; struck ones too',
    access: managers,
    params: thingParams,
    query: measurementListQuery,
    reply: pageOf(measurementRow),
  }),
  curves: endpoint({
    method: 'GET',
    path: `${ofCable}/curves`,
    summary: 'What was measured last on each piece of a cable, quantity by quantity',
    access: managers,
    params: thingParams,
    reply: z.strictObject({ curves: z.array(measuredCurve) }),
  }),
  get: endpoint({
    method: 'GET',
    path: ofMeasurement,
    summary: 'One measurement with its values and its text',
    access: managers,
    params: measurementParams,
    reply: measurement,
  }),
  add: endpoint({
    method: 'POST',
    path: `${ofCable}/specimens/:specimenId/measurements`,
    summary: 'Add a measurement of a piece, with or without its file',
    access: managers,
    params: z.strictObject({ organisationId: z.uuid(), id: z.uuid(), specimenId: z.uuid() }),
    body: measurementDraft,
    upload: { limitBytes: measurementFileBytes, isRequired: false },
    reply: measurement,
  }),
  strike: endpoint({
    method: 'POST',
    path: `${ofMeasurement}/strike`,
    summary: 'Strike out a mistaken measurement; it stays, with the reason',
    access: managers,
    params: measurementParams,
    body: z.strictObject({ reason: line(500).min(3, 'Say what is wrong with it') }),
    reply: measurement,
  }),
  file: endpoint({
    method: 'GET',
    path: `${ofMeasurement}/file`,
    summary: 'The file of a measurement, as it came',
    access: managers,
    params: measurementParams,
    isDownload: true,
    reply: savedFile,
  }),
};
