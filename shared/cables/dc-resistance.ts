import { requireBetween, requireWhole } from '#shared/statistics/domain.ts';

/**
 * Resistance to direct current of one metre of a conductor: rho / A.
 *
 * @param resistivity ohm metres, 1e-9 ... 1e-3
 * @param area        cross-section of the metal in square metres, above 0 ... 0.01
 * @returns ohm per metre of conductor
 * @throws RangeError outside the domain
 * @example conductorResistance(1 / 58e6, 3.3088e-6) // 0.00521 ; wire tables: 5.21 ohm/km for AWG 12
 * @see National Bureau of Standards, Handbook 100, Copper Wire Tables (1966)
 */
export function conductorResistance(resistivity: number, area: number): number {
  requireBetween('resistivity', resistivity, 1e-9, 1e-3, 'closed');
  requireBetween('area', area, Number.MIN_VALUE, 0.01, 'closed');
  return resistivity / area;
}

/**
 * Resistance to direct current of a loop: there through one leg, back through the other.
 *
 * @param go          ohm per metre of one conductor of the going leg, at least 0
 * @param back        ohm per metre of one conductor of the returning leg, at least 0
 * @param wiresPerLeg conductors joined in parallel in each leg, whole, 1 ... 1000
 * @param length      metres of cable, 0 ... 100,000
 * @returns ohm
 * @throws RangeError outside the domain
 * @example loopResistance(0.00521, 0.00521, 1, 5) // 0.0521
 */
export function loopResistance(go: number, back: number, wiresPerLeg: number, length: number): number {
  requireBetween('go', go, 0, 1e9, 'closed');
  requireBetween('back', back, 0, 1e9, 'closed');
  requireWhole('wiresPerLeg', wiresPerLeg, 1, 1000);
  requireBetween('length', length, 0, 100_000, 'closed');
  return ((go + back) / wiresPerLeg) * length;
}
