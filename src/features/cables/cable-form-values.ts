import { z } from 'zod';
import { type CableDraft, cableDraft } from '#shared/contracts/cables.ts';

const millimetresPerMetre = 1000;

/** Metres as typed, in whole millimetres; nothing typed is no number. */
function millimetresOf(metres: string): number {
  return metres.trim() === '' ? Number.NaN : Math.round(Number(metres) * millimetresPerMetre);
}

/** The contract's draft as it is typed: the length in metres, everything else as it is. */
export const typedCable = cableDraft.extend({
  lengthMm: z.string().transform(millimetresOf).pipe(cableDraft.shape.lengthMm),
});
export type CableFormValues = Omit<CableDraft, 'lengthMm' | 'kind'> & {
  lengthMm: string;
  kind: CableDraft['kind'] | '';
};

export const emptyCable: CableFormValues = { name: '', kind: '', lengthMm: '', description: '' };

export function valuesOf({ name, kind, lengthMm, description }: CableDraft): CableFormValues {
  return { name, kind, lengthMm: String(lengthMm / millimetresPerMetre), description };
}
