import type { Cable as CableReply, CableRow } from '#shared/contracts/cables.ts';
import type { Cable } from './cable.entity.ts';

const shape = ({ id, name, kind, lengthMm, description, archived, updatedAt }: Cable) => ({
  id,
  name,
  kind,
  lengthMm,
  description,
  archived,
  updatedAt: updatedAt.toISOString(),
});

export function cableRowView(cable: Cable): CableRow {
  return { ...shape(cable), specimenCount: cable.specimens.length };
}

export function cableView(cable: Cable): CableReply {
  const specimens = cable.specimens.map(({ id, serial, note, archived }) => ({ id, serial, note, archived }));
  return { ...shape(cable), construction: cable.construction ?? {}, specimens };
}
