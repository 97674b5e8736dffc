import { z } from 'zod';
import { rigPreset } from '../protocol/rig-preset.ts';
import { endpoint, managers } from './endpoint.ts';
import { organisationParams, thingParams } from './organisation-params.ts';
import { listQuery, pageOf, sortBy } from './paging.ts';

/** A rig preset as an organisation keeps it. Studies that were sealed with it keep it as it was. */
export const keptPreset = z.strictObject({
  id: z.uuid(),
  preset: rigPreset,
  /** Whether the organisation began with it, changed since or not. */
  isShipped: z.boolean(),
  archived: z.boolean(),
  updatedAt: z.iso.datetime(),
});
export type KeptPreset = z.output<typeof keptPreset>;

const base = '/organisations/:organisationId/rig-presets';

const presetListQuery = listQuery.extend({
  archived: z.enum(['no', 'yes']).default('no'),
  sort: sortBy(['name', 'kind', 'updatedAt'], 'name'),
});
export type PresetListQuery = z.output<typeof presetListQuery>;

export const rigPresetsApi = {
  list: endpoint({
    method: 'GET',
    path: base,
    summary: 'Rig presets by name; archived ones on request',
    access: managers,
    params: organisationParams,
    query: presetListQuery,
    reply: pageOf(keptPreset),
  }),
  choices: endpoint({
    method: 'GET',
    path: `${base}/choices`,
    summary: 'Rig presets that a study can use',
    access: managers,
    params: organisationParams,
    reply: z.strictObject({ presets: z.array(keptPreset) }),
  }),
  get: endpoint({
    method: 'GET',
    path: `${base}/:id`,
    summary: 'One rig preset',
    access: managers,
    params: thingParams,
    reply: keptPreset,
  }),
  create: endpoint({
    method: 'POST',
    path: base,
    summary: 'Add a rig preset, such as an altered copy of another',
    access: managers,
    params: organisationParams,
    body: rigPreset,
    reply: keptPreset,
  }),
  update: endpoint({
    method: 'PUT',
    path: `${base}/:id`,
    summary: 'Change a rig preset; what is sealed already keeps it as it was',
    access: managers,
    params: thingParams,
    body: rigPreset,
    reply: keptPreset,
  }),
  archive: endpoint({
    method: 'PUT',
    path: `${base}/:id/archived`,
    summary: 'Archive a rig preset, or bring it back',
    access: managers,
    params: thingParams,
    body: z.strictObject({ archived: z.boolean() }),
    reply: keptPreset,
  }),
};
