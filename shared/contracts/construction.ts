import { z } from 'zod';

export const conductorMaterials = [
  'copper-ofe',
  'copper-of',
  'copper-etp',
  'copper-long-crystal',
  'copper',
  'silver',
  'silver-plated-copper',
  'copper-clad-aluminium',
  'aluminium',
  'other',
] as const;
export const conductorBuilds = ['solid', 'stranded', 'litz'] as const;
export const geometries = ['parallel', 'twisted-pair', 'star-quad', 'braided', 'coaxial'] as const;
export const shields = ['none', 'foil', 'braid', 'foil-and-braid', 'other'] as const;

const measure = (unit: string, least: number, most: number) => {
  const said = (value: number) => `${value.toLocaleString('en', { maximumFractionDigits: 6 })} ${unit}`.trim();
  return z
    .number('Enter a number')
    .min(least, `At least ${said(least)}`)
    .max(most, `At most ${said(most)}`)
    .optional();
};
const count = (what: string, most: number) =>
  z
    .int(`Enter a whole number of ${what}`)
    .min(1, 'At least 1')
    .max(most, `At most ${most.toLocaleString('en')}`)
    .optional();
const note = (most: number) =>
  z
    .string()
    .trim()
    .max(most, `At most ${most.toLocaleString('en')} characters`)
    .optional();

/**
 * What a cable is made of, as far as it is known: everything may be left out.
 *
 * Cross-section, strands and diameters are those of one conductor's metal; a leg may join several conductors.
 */
export const construction = z.strictObject({
  material: z.enum(conductorMaterials, 'Choose a conductor').optional(),
  /** As the trade writes it: 4N is 99.99 %, 4N5 is 99.995 %. */
  nines: z
    .string()
    .trim()
    .regex(/^[1-9]N[1-9]?$/, 'Write it as 4N for 99.99 %, or 4N5 for 99.995 %')
    .optional(),
  /** As stated; where it is not, that of the material is taken. */
  percentIacs: measure('% IACS', 1, 120),
  build: z.enum(conductorBuilds, 'Choose how it is built').optional(),
  strands: count('strands', 100_000),
  strandDiameterMm: measure('mm', 0.01, 20),
  areaMm2: measure('mm²', 0.0001, 1000),
  conductorsPerLeg: count('conductors', 100),
  insulation: note(120),
  permittivity: measure('', 1, 20),
  geometry: z.enum(geometries, 'Choose a geometry').optional(),
  /** Between the centres of go and return; of opposite conductors in a star quad. */
  spacingMm: measure('mm', 0.01, 500),
  /** Of cable for one turn. */
  pitchMm: measure('mm', 1, 5000),
  /** Inside the shield of a coaxial cable. */
  shieldDiameterMm: measure('mm', 0.05, 200),
  outsideMm: measure('mm', 0.05, 500),
  shield: z.enum(shields, 'Choose a shield').optional(),
  shieldAreaMm2: measure('mm²', 0.001, 1000),
  connectors: note(200),
  treatments: note(500),
});
export type Construction = z.output<typeof construction>;
