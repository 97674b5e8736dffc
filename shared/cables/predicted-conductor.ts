import type { Construction } from '#shared/contracts/construction.ts';
import { conductorMetal } from './conductor-metal.ts';
import { statedTemperature } from './constants.ts';
import { conductorAreaMm2 } from './contradictions.ts';
import { conductorResistance } from './dc-resistance.ts';
import { known, lacking, type Prediction, unknownBecause } from './prediction.ts';
import { resistivityFromIacs } from './resistivity.ts';
import { roundWireSkinEffect, type SkinEffect } from './round-wire.ts';
import { diameterOfArea } from './wire-gauge.ts';

/** One conductor of a cable at 20 °C. */
export interface Conductor {
  /** Ohm metres. */
  readonly resistivity: number;
  /** Metres, of a solid wire of its cross-section. */
  readonly diameter: number;
  /** Ohm per metre of conductor, at direct current. */
  readonly resistance: number;
  /** Where its conductivity comes from. */
  readonly source: string;
}

/**
 * A conductor at 20 °C from its material and cross-section.
 *
 * @example predictedConductor({ material: 'copper', areaMm2: 2.5 }) // 6.897 mohm/m = 1 / (58e6 × 2.5e-6)
 */
export function predictedConductor(construction: Construction): Prediction<Conductor> {
  const metal = conductorMetal(construction);
  const areaMm2 = conductorAreaMm2(construction);
  const { material } = construction;
  if (metal === undefined || areaMm2 === undefined) {
    const metalField = material === undefined ? 'material' : 'percentIacs';
    return lacking(...(metal ? [] : ([metalField] as const)), ...(areaMm2 === undefined ? (['areaMm2'] as const) : []));
  }
  const area = areaMm2 * 1e-6;
  // The temperature coefficient plays no part at the temperature at which conductivity is stated.
  const resistivity = resistivityFromIacs(metal.percentIacs, statedTemperature, 0);
  return known({
    resistivity,
    diameter: diameterOfArea(area),
    resistance: conductorResistance(resistivity, area),
    source: metal.source,
  });
}

/**
 * What a frequency makes of a conductor: solid by the exact solution; stranded as the solid wire of its cross-section, as bare
 * strands touch; litz strand by strand, each with an equal share of the current. Neighbours' fields are left out.
 *
 * @param frequency hertz, 0 ... 1e12
 * @throws RangeError outside the domain
 * @example predictedSkinEffect({ material: 'copper', areaMm2: 3.3088 }, 20_000) // resistance × 1.3530, as AWG 12 ; mpmath
 */
export function predictedSkinEffect(construction: Construction, frequency: number): Prediction<SkinEffect> {
  const conductor = predictedConductor(construction);
  if (!conductor.isKnown) return conductor;
  if (conductorMetal(construction)?.isUniform === false)
    return unknownBecause('Two metals in one wire: the solution for a round wire of one metal does not hold.');
  const { resistivity, diameter } = conductor.value;
  if (construction.build !== 'litz') return known(roundWireSkinEffect(diameter, resistivity, frequency));
  if (construction.strandDiameterMm === undefined) return lacking('strandDiameterMm');
  const strand = roundWireSkinEffect(construction.strandDiameterMm * 1e-3, resistivity, frequency);
  // The current stays spread over the bundle, and with it the field inside.
  return known({ resistanceRatio: strand.resistanceRatio, internalInductanceRatio: 1 });
}
