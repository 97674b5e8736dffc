import type { KeptPreset, PresetListQuery } from '#shared/contracts/rig-presets.ts';
import { Problem } from '#shared/problem.ts';
import type { RigPreset as Preset } from '#shared/protocol/rig-preset.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import type { RigPreset } from './rig-preset.entity.ts';
import * as store from './rig-presets.store.ts';

type Where = { organisationId: string; id: string };

const presetView = ({ id, preset, shipped, archived, updatedAt }: RigPreset): KeptPreset => ({
  id,
  preset,
  isShipped: shipped !== null,
  archived,
  updatedAt: updatedAt.toISOString(),
});

async function presetOrProblem(tx: Tx, { organisationId, id }: Where): Promise<RigPreset> {
  const preset = await store.findPreset(tx, organisationId, id);
  if (preset === null) throw new Problem('not-found', 'There is no such rig preset.');
  return preset;
}

/** One action on an organisation's presets, which begin with those that ship. */
function withPresets<T>({ db, random, clock }: Deps, organisationId: string, work: (tx: Tx, now: Date) => Promise<T>) {
  return withTransaction(db, async (tx) => {
    const now = new Date(clock.now());
    await store.insertShipped(tx, organisationId, { newId: () => random.id(), now });
    return work(tx, now);
  });
}

export function listPresets(deps: Deps, organisationId: string, query: PresetListQuery) {
  return withPresets(deps, organisationId, async (tx) => {
    const found = await store.listPresets(tx, organisationId, query);
    return { ...found, rows: found.rows.map(presetView) };
  });
}

export function presetChoices(deps: Deps, organisationId: string) {
  return withPresets(deps, organisationId, async (tx) => ({
    presets: (await store.presetsInUse(tx, organisationId)).map(presetView),
  }));
}

export function getPreset(deps: Deps, where: Where): Promise<KeptPreset> {
  return withPresets(deps, where.organisationId, async (tx) => presetView(await presetOrProblem(tx, where)));
}

export function createPreset(deps: Deps, organisationId: string, preset: Preset): Promise<KeptPreset> {
  return withPresets(deps, organisationId, async (tx, now) => {
    const id = deps.random.id();
    await store.insertPreset(tx, { id, organisationId, preset, now });
    return presetView(await presetOrProblem(tx, { organisationId, id }));
  });
}

function change(deps: Deps, where: Where, what: { preset: Preset } | { archived: boolean }): Promise<KeptPreset> {
  return withPresets(deps, where.organisationId, async (tx, now) => {
    await presetOrProblem(tx, where);
    await store.updatePreset(tx, where.id, what, now);
    return presetView(await presetOrProblem(tx, where));
  });
}

export const updatePreset = (deps: Deps, where: Where, preset: Preset) => change(deps, where, { preset });
export const archivePreset = (deps: Deps, where: Where, archived: boolean) => change(deps, where, { archived });
