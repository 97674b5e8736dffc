import { z } from 'zod';
import { type CableDraft, cableDraft } from '#shared/contracts/cables.ts';
import { type ConstructionValues, constructionValuesOf, typedConstruction } from './construction-values.ts';

const millimetresPerMetre = 1000;

/** Metres as typed, in whole millimetres; nothing typed is no number. */
function millimetresOf(metres: string): number {
  return metres.trim() === '' ? Number.NaN : Math.round(Number(metres) * millimetresPerMetre);
}

/** The contract's draft as it is typed: the length in metres, the construction as text, everything else as it is. */
export const typedCable = cableDraft.extend({
  lengthMm: z.string().transform(millimetresOf).pipe(cableDraft.shape.lengthMm),
  construction: typedConstruction,
});
export type CableFormValues = Omit<CableDraft, 'lengthMm' | 'kind' | 'construction'> & {
  lengthMm: string;
  kind: CableDraft['kind'] | '';
  construction: ConstructionValues;
};

export const emptyCable: CableFormValues = {
  name: '',
  kind: '',
  lengthMm: '',
  description: '',
  construction: constructionValuesOf({}),
};

export function valuesOf({ name, kind, lengthMm, description, construction }: CableDraft): CableFormValues {
  const metres = String(lengthMm / millimetresPerMetre);
  return { name, kind, lengthMm: metres, description, construction: constructionValuesOf(construction ?? {}) };
}
