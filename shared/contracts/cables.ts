import { z } from 'zod';
import { conductorMaterials, construction, geometries } from './construction.ts';
import { endpoint, managers, savedFile } from './endpoint.ts';
import { organisationParams, thingParams } from './organisation-params.ts';
import { listQuery, pageOf, sortBy } from './paging.ts';

export const cableKinds = ['loudspeaker', 'interconnect', 'headphone', 'check', 'other'] as const;

/** What may be typed about a cable (a design); lengths in millimetres, 1 mm to 1 km. */
export const cableDraft = z.strictObject({
  name: z.string().trim().min(2, 'At least 2 characters').max(120, 'At most 120 characters'),
  kind: z.enum(cableKinds, 'Choose a kind'),
  lengthMm: z.int('Enter a length').min(1, 'At least 1 mm').max(1_000_000, 'At most 1,000 m'),
  description: z.string().trim().max(2000, 'At most 2,000 characters'),
  /** Left out: nothing is known of it, or what is known stays. */
  construction: construction.optional(),
});
export type CableDraft = z.output<typeof cableDraft>;

/** What may be typed about a specimen (one physical piece). */
export const specimenDraft = z.strictObject({
  serial: z.string().trim().min(1, 'Enter the mark on this piece').max(60, 'At most 60 characters'),
  note: z.string().trim().max(500, 'At most 500 characters'),
});
export type SpecimenDraft = z.output<typeof specimenDraft>;

export const specimen = z.strictObject({
  id: z.uuid(),
  serial: z.string(),
  note: z.string(),
  archived: z.boolean(),
});
export type Specimen = z.output<typeof specimen>;

const cableShape = {
  id: z.uuid(),
  name: z.string(),
  kind: z.enum(cableKinds),
  lengthMm: z.int(),
  description: z.string(),
  archived: z.boolean(),
  updatedAt: z.iso.datetime(),
};
export const cableRow = z.strictObject({ ...cableShape, specimenCount: z.int() });
export const cable = z.strictObject({ ...cableShape, construction, specimens: z.array(specimen) });
export type CableRow = z.output<typeof cableRow>;
export type Cable = z.output<typeof cable>;

/** What a table of cables adds, or would add; faults by line and column. */
export const cableImport = z.strictObject({
  cables: z.int(),
  isAdded: z.boolean(),
  first: z.array(z.string()),
  /** How many of the names are there already. */
  known: z.int(),
  faults: z.array(z.strictObject({ line: z.int(), column: z.string(), detail: z.string() })),
  faultCount: z.int(),
});
export type CableImport = z.output<typeof cableImport>;

const base = '/organisations/:organisationId/cables';
const specimenParams = z.strictObject({ organisationId: z.uuid(), id: z.uuid(), specimenId: z.uuid() });
const archiving = z.strictObject({ archived: z.boolean() });

const cableListQuery = listQuery.extend({
  archived: z.enum(['no', 'yes']).default('no'),
  kind: z.enum(['any', ...cableKinds]).default('any'),
  material: z.enum(['any', ...conductorMaterials]).default('any'),
  geometry: z.enum(['any', ...geometries]).default('any'),
  sort: sortBy(['name', 'kind', 'length', 'updatedAt'], '-updatedAt'),
});
export type CableListQuery = z.output<typeof cableListQuery>;

export const cablesApi = {
  list: endpoint({
    method: 'GET',
    path: base,
    summary: 'Cables, newest change first; archived ones on request',
    access: managers,
    params: organisationParams,
    query: cableListQuery,
    reply: pageOf(cableRow),
  }),
  /** Every cable that is not archived with its specimens: what a study can choose from. */
  choices: endpoint({
    method: 'GET',
    path: `${base}/choices`,
    summary: 'Cables and specimens that a study can use',
    access: managers,
    params: organisationParams,
    reply: z.strictObject({ cables: z.array(cable) }),
  }),
  /** As a table that a spreadsheet reads; a cell that it would take for a formula is marked as text. */
  exportAll: endpoint({
    method: 'GET',
    path: `${base}/export`,
    summary: 'Every cable in use as CSV',
    access: managers,
    params: organisationParams,
    isDownload: true,
    reply: savedFile,
  }),
  template: endpoint({
    method: 'GET',
    path: `${base}/template`,
    summary: 'An empty table of cables as CSV, with one example',
    access: managers,
    params: organisationParams,
    isDownload: true,
    reply: savedFile,
  }),
  importAll: endpoint({
    method: 'POST',
    path: `${base}/import`,
    summary: 'Add the cables of a table, all or none; as a trial it says what would be added',
    access: managers,
    params: organisationParams,
    body: z.strictObject({ isTrial: z.boolean() }),
    upload: { limitBytes: 2_000_000, isRequired: true },
    reply: cableImport,
  }),
  get: endpoint({
    method: 'GET',
    path: `${base}/:id`,
    summary: 'One cable with its specimens',
    access: managers,
    params: thingParams,
    reply: cable,
  }),
  create: endpoint({
    method: 'POST',
    path: base,
    summary: 'Add a cable',
    access: managers,
    params: organisationParams,
    body: cableDraft,
    reply: cable,
  }),
  update: endpoint({
    method: 'PUT',
    path: `${base}/:id`,
    summary: 'Change a cable',
    access: managers,
    params: thingParams,
    body: cableDraft,
    reply: cable,
  }),
  archive: endpoint({
    method: 'PUT',
    path: `${base}/:id/archived`,
    summary: 'Archive a cable, or bring it back',
    access: managers,
    params: thingParams,
    body: archiving,
    reply: cable,
  }),
  addSpecimen: endpoint({
    method: 'POST',
    path: `${base}/:id/specimens`,
    summary: 'Add a specimen of a cable',
    access: managers,
    params: thingParams,
    body: specimenDraft,
    reply: cable,
  }),
  updateSpecimen: endpoint({
    method: 'PUT',
    path: `${base}/:id/specimens/:specimenId`,
    summary: 'Change a specimen',
    access: managers,
    params: specimenParams,
    body: specimenDraft,
    reply: cable,
  }),
  archiveSpecimen: endpoint({
    method: 'PUT',
    path: `${base}/:id/specimens/:specimenId/archived`,
    summary: 'Archive a specimen, or bring it back',
    access: managers,
    params: specimenParams,
    body: archiving,
    reply: cable,
  }),
};
