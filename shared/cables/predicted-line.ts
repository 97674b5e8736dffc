import type { Construction } from '#shared/contracts/construction.ts';
import { conductorResistance } from './dc-resistance.ts';
import type { Line } from './level-difference.ts';
import { predictedConductor, predictedSkinEffect } from './predicted-conductor.ts';
import { conductorsPerLegOf, lengtheningOf, predictedGeometry } from './predicted-geometry.ts';
import { known, lacking, type Prediction } from './prediction.ts';
import { resistivityFromIacs } from './resistivity.ts';
import { internalInductanceAtDc } from './round-wire.ts';

/** Ohm per metre of cable at direct current and 20 °C, there and back apart. */
export interface Legs {
  readonly go: number;
  readonly back: number;
}

/**
 * The resistance of the two legs. In a coaxial cable the way back is the shield, taken as copper of 100 % IACS.
 *
 * @example predictedLegs({ material: 'copper', areaMm2: 2.5 }) // 6.897 mohm/m each
 */
export function predictedLegs(construction: Construction): Prediction<Legs> {
  const conductor = predictedConductor(construction);
  if (!conductor.isKnown) return conductor;
  const leg = (conductor.value.resistance * lengtheningOf(construction)) / conductorsPerLegOf(construction);
  if (construction.geometry !== 'coaxial') return known({ go: leg, back: leg });
  if (construction.shieldAreaMm2 === undefined) return lacking('shieldAreaMm2');
  const shield = conductorResistance(resistivityFromIacs(100, 20, 0), construction.shieldAreaMm2 * 1e-6);
  return known({ go: leg, back: shield });
}

/**
 * Inductance in H per metre of cable at a frequency, inside and outside the conductors; a shield's inside is left out.
 *
 * @param frequency hertz, 0 ... 1e9
 * @throws RangeError outside the domain
 * @example predictedInductance({ material: 'copper', areaMm2: 0.7854, geometry: 'parallel', spacingMm: 5 }, 0) // 1.017e-6
 */
export function predictedInductance(construction: Construction, frequency: number): Prediction<number> {
  const outside = predictedGeometry(construction, 1);
  if (!outside.isKnown) return outside;
  const inside = predictedSkinEffect(construction, frequency);
  if (!inside.isKnown) return inside;
  const legs = construction.geometry === 'coaxial' ? 1 : 2;
  const within = internalInductanceAtDc * inside.value.internalInductanceRatio;
  return known(
    outside.value.externalInductance + (legs * within * lengtheningOf(construction)) / conductorsPerLegOf(construction),
  );
}

/**
 * Capacitance in F per metre of cable: an upper limit where air surrounds the insulation.
 *
 * @example predictedCapacitance({ areaMm2: 0.7854, geometry: 'parallel', spacingMm: 5, permittivity: 2.3 }) // 27.9e-12 ; mpmath
 */
export function predictedCapacitance(construction: Construction): Prediction<number> {
  if (construction.permittivity === undefined) return lacking('permittivity');
  const outside = predictedGeometry(construction, construction.permittivity);
  return outside.isKnown ? known(outside.value.capacitance) : outside;
}

/**
 * A cable as a line, from its construction; the insulation carries no current.
 *
 * @param lengthMm millimetres, 1 ... 1,000,000
 * @returns what it is at every frequency, or what stands in the way
 */
export function predictedLine(construction: Construction, lengthMm: number): Prediction<Line> {
  const legs = predictedLegs(construction);
  const capacitance = predictedCapacitance(construction);
  const inductance = predictedInductance(construction, 0);
  for (const part of [legs, inductance, capacitance]) if (!part.isKnown) return part;
  if (!legs.isKnown || !capacitance.isKnown) throw new Error('what is lacking has been returned');
  const { go, back } = legs.value;
  const backIsShield = construction.geometry === 'coaxial';
  const at = (frequency: number) => {
    const skin = predictedSkinEffect(construction, frequency);
    const loop = predictedInductance(construction, frequency);
    if (!skin.isKnown || !loop.isKnown) throw new Error('known at one frequency and not at another');
    const ratio = skin.value.resistanceRatio;
    return {
      resistance: go * ratio + back * (backIsShield ? 1 : ratio),
      inductance: loop.value,
      conductance: 0,
      capacitance: capacitance.value,
    };
  };
  return known({ constantsAt: at, length: lengthMm / 1000 });
}
