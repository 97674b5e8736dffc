import type { PresetListQuery } from '#shared/contracts/rig-presets.ts';
import { type RigPreset as Preset, rigs } from '#shared/protocol/rig-preset.ts';
import { shippedPresets } from '#shared/protocol/shipped-presets.ts';
import { likePattern, pageOfRows, sortRows } from '../../db/paging.ts';
import type { Tx } from '../../db/transaction.ts';
import { RigPreset } from './rig-preset.entity.ts';

/** Gives an organisation what every one begins with, once; whoever asks first. What it changed or archived stays so. */
export async function insertShipped(
  tx: Tx,
  organisationId: string,
  { newId, now }: { newId: () => string; now: Date },
): Promise<void> {
  if (await tx.existsBy(RigPreset, { organisationId })) return;
  const rows = rigs.map((rig) => {
    const preset = shippedPresets[rig];
    const { name, kind } = preset;
    return { id: newId(), organisationId, name, kind, preset, shipped: rig, archived: false, updatedAt: now };
  });
  // Two who ask at once both find none; the second leaves what the first put there.
  await tx.createQueryBuilder().insert().into(RigPreset).values(rows).orIgnore().execute();
}

export function listPresets(tx: Tx, organisationId: string, query: PresetListQuery) {
  const rows = tx
    .createQueryBuilder(RigPreset, 'preset')
    .where('preset.organisationId = :organisationId', { organisationId });
  if (query.archived === 'no') rows.andWhere('preset.archived = false');
  if (query.q !== '') rows.andWhere('(preset.name like :q or preset.kind like :q)', { q: likePattern(query.q) });
  const columns = { name: 'preset.name', kind: 'preset.kind', updatedAt: 'preset.updatedAt' };
  return pageOfRows(sortRows(rows, query.sort, columns, 'preset.id'), query.page);
}

export function presetsInUse(tx: Tx, organisationId: string): Promise<RigPreset[]> {
  return tx.find(RigPreset, { where: { organisationId, archived: false }, order: { name: 'ASC', id: 'ASC' } });
}

export function findPreset(tx: Tx, organisationId: string, id: string): Promise<RigPreset | null> {
  return tx.findOneBy(RigPreset, { organisationId, id });
}

export async function insertPreset(
  tx: Tx,
  { id, organisationId, preset, now }: { id: string; organisationId: string; preset: Preset; now: Date },
): Promise<void> {
  const { name, kind } = preset;
  await tx.insert(RigPreset, {
    id,
    organisationId,
    name,
    kind,
    preset,
    shipped: null,
    archived: false,
    updatedAt: now,
  });
}

export async function updatePreset(
  tx: Tx,
  id: string,
  change: { preset: Preset } | { archived: boolean },
  now: Date,
): Promise<void> {
  const named = 'preset' in change ? { name: change.preset.name, kind: change.preset.kind } : {};
  await tx.update(RigPreset, { id }, { ...change, ...named, updatedAt: now });
}
