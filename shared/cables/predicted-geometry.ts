import type { Construction } from '#shared/contracts/construction.ts';
import { conductorDiameterMm, contradictionsOf } from './contradictions.ts';
import { coaxialLine, type PerMetre, parallelWires, starQuad, twistedPair, twistLengthening } from './line-geometry.ts';
import { known, lacking, type Prediction, unknownBecause } from './prediction.ts';

const millimetre = 1e-3;

/** Conductors joined in each leg: as stated, else two in a star quad and one elsewhere. */
export function conductorsPerLegOf({ conductorsPerLeg, geometry }: Construction): number {
  return conductorsPerLeg ?? (geometry === 'star-quad' ? 2 : 1);
}

/** How much longer the conductors are than the cable; 1 where no turn is stated. */
export function lengtheningOf({ geometry, spacingMm, pitchMm }: Construction): number {
  const isTwisted = geometry === 'twisted-pair' || geometry === 'star-quad';
  if (!isTwisted || spacingMm === undefined || pitchMm === undefined) return 1;
  return twistLengthening(spacingMm * millimetre, pitchMm * millimetre);
}

/**
 * Inductance outside the conductors and capacitance, per metre of cable, from a construction.
 *
 * @param permittivity what to take for the insulation; inductance does not depend on it
 * @example predictedGeometry({ areaMm2: 0.7854, geometry: 'parallel', spacingMm: 5 }, 2.3) // 0.917 uH/m, 27.9 pF/m ; mpmath
 */
export function predictedGeometry(construction: Construction, permittivity: number): Prediction<PerMetre> {
  const { geometry, spacingMm, pitchMm, shieldDiameterMm } = construction;
  const diameterMm = conductorDiameterMm(construction);
  if (geometry === undefined) return lacking('geometry');
  if (geometry === 'braided') return unknownBecause('There is no formula for a braid: it has to be measured.');
  if (diameterMm === undefined) return lacking('areaMm2');
  if (conductorsPerLegOf(construction) !== (geometry === 'star-quad' ? 2 : 1))
    return unknownBecause('The formula holds for one conductor in each leg, and for two in a star quad.');
  const isTouching = contradictionsOf(construction).some(
    ({ field }) => field === 'spacingMm' || field === 'shieldDiameterMm',
  );
  if (isTouching) return unknownBecause('Conductors of this size would touch.');
  const diameter = diameterMm * millimetre;
  if (geometry === 'coaxial')
    return shieldDiameterMm === undefined
      ? lacking('shieldDiameterMm')
      : known(coaxialLine(shieldDiameterMm * millimetre, diameter, permittivity));
  if (spacingMm === undefined) return lacking('spacingMm');
  const spacing = spacingMm * millimetre;
  if (geometry === 'parallel') return known(parallelWires(spacing, diameter, permittivity));
  if (geometry === 'twisted-pair')
    return pitchMm === undefined
      ? lacking('pitchMm')
      : known(twistedPair(spacing, diameter, permittivity, pitchMm * millimetre));
  const straight = starQuad(spacing, diameter, permittivity);
  const longer = lengtheningOf(construction);
  return known({
    externalInductance: straight.externalInductance * longer,
    capacitance: straight.capacitance * longer,
  });
}
