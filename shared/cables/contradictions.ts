import type { Construction } from '#shared/contracts/construction.ts';
import { areaOfDiameter, diameterOfArea } from './wire-gauge.ts';

/** Two statements about a cable that cannot both hold; it informs, and blocks nothing. */
export interface Contradiction {
  /** The field beside which it is said. */
  readonly field: keyof Construction;
  readonly detail: string;
}

/** How far strands and cross-section may differ: rounding to a standard size. Common practice, no source. */
const tolerance = 0.1;
const millimetre = 1e-3;
const largestAreaMm2 = 1000;

/** Cross-section of the strands together in mm², where both their number and diameter are known. */
export function strandedAreaMm2({ strands, strandDiameterMm }: Construction): number | undefined {
  if (strands === undefined || strandDiameterMm === undefined) return undefined;
  return strands * areaOfDiameter(strandDiameterMm * millimetre) * 1e6;
}

/** The cross-section of a conductor's metal in mm²: as stated, else from its strands. */
export function conductorAreaMm2(construction: Construction): number | undefined {
  const together = strandedAreaMm2(construction);
  return construction.areaMm2 ?? (together !== undefined && together <= largestAreaMm2 ? together : undefined);
}

/** Diameter in mm of a solid wire of the conductor's cross-section. */
export function conductorDiameterMm(construction: Construction): number | undefined {
  const area = conductorAreaMm2(construction);
  return area === undefined ? undefined : diameterOfArea(area * 1e-6) / millimetre;
}

const figure = (value: number) => value.toLocaleString('en', { maximumSignificantDigits: 3 });

/**
 * What contradicts what in a construction.
 *
 * @example contradictionsOf({ build: 'stranded', strands: 7, strandDiameterMm: 0.2, areaMm2: 2.5 })[0]?.field // 'areaMm2'
 */
export function contradictionsOf(construction: Construction): Contradiction[] {
  return [...ofStrands(construction), ...ofGeometry(construction), ...ofWords(construction)];
}

function ofStrands(construction: Construction): Contradiction[] {
  const { build, strands, areaMm2 } = construction;
  const found: Contradiction[] = [];
  const together = strandedAreaMm2(construction);
  if (together !== undefined && areaMm2 !== undefined && Math.abs(together / areaMm2 - 1) > tolerance)
    found.push({
      field: 'areaMm2',
      detail: `${strands} ${strands === 1 ? 'strand' : 'strands'} of this diameter make ${figure(together)} mm², not ${figure(areaMm2)} mm²`,
    });
  else if (together !== undefined && together > largestAreaMm2)
    found.push({ field: 'strands', detail: 'Strands of this diameter make more than 1,000 mm²' });
  if (build === 'solid' && strands !== undefined && strands > 1)
    found.push({ field: 'strands', detail: 'A solid conductor has one strand' });
  if ((build === 'stranded' || build === 'litz') && strands === 1)
    found.push({ field: 'strands', detail: 'A stranded conductor has more than one strand' });
  return found;
}

function ofGeometry(construction: Construction): Contradiction[] {
  const { geometry, spacingMm, shieldDiameterMm, outsideMm, conductorsPerLeg } = construction;
  const diameter = conductorDiameterMm(construction);
  const found: Contradiction[] = [];
  const nearest = geometry === 'star-quad' ? Math.SQRT2 : 1;
  if (geometry !== 'coaxial' && diameter !== undefined && spacingMm !== undefined && spacingMm <= nearest * diameter)
    found.push({
      field: 'spacingMm',
      detail: `Conductors of ${figure(diameter)} mm would touch: the spacing must be above ${figure(nearest * diameter)} mm`,
    });
  if (
    geometry === 'coaxial' &&
    diameter !== undefined &&
    shieldDiameterMm !== undefined &&
    shieldDiameterMm <= diameter
  )
    found.push({
      field: 'shieldDiameterMm',
      detail: `The core of ${figure(diameter)} mm does not fit into the shield`,
    });
  if (outsideMm !== undefined && shieldDiameterMm !== undefined && outsideMm < shieldDiameterMm)
    found.push({ field: 'outsideMm', detail: 'The cable would be thinner than its shield' });
  if (
    outsideMm !== undefined &&
    spacingMm !== undefined &&
    geometry !== 'coaxial' &&
    outsideMm < spacingMm + (diameter ?? 0)
  )
    found.push({ field: 'outsideMm', detail: 'The cable would be thinner than its conductors and their spacing' });
  if (geometry === 'star-quad' && conductorsPerLeg !== undefined && conductorsPerLeg !== 2)
    found.push({ field: 'conductorsPerLeg', detail: 'A star quad joins two conductors in each leg' });
  return found;
}

function ofWords({ geometry, shield, shieldAreaMm2, material, percentIacs }: Construction): Contradiction[] {
  const found: Contradiction[] = [];
  if (geometry === 'coaxial' && shield === 'none')
    found.push({ field: 'shield', detail: 'In a coaxial cable the shield is the return' });
  if (shield === 'none' && shieldAreaMm2 !== undefined)
    found.push({ field: 'shieldAreaMm2', detail: 'There is no shield to have a cross-section' });
  if (
    material?.startsWith('copper') &&
    material !== 'copper-clad-aluminium' &&
    percentIacs !== undefined &&
    percentIacs > 103
  )
    found.push({ field: 'percentIacs', detail: 'No copper reaches more than 103 % IACS' });
  return found;
}
