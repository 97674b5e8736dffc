import { requireBetween } from '#shared/statistics/domain.ts';
import { magneticConstant } from './constants.ts';

/**
 * Depth at which the current density in a thick conductor has fallen to 1/e: sqrt(rho / (pi f mu)).
 *
 * @param resistivity          ohm metres, 1e-9 ... 1e-3
 * @param frequency            hertz, above 0 ... 1e12
 * @param relativePermeability 1 for copper, silver and aluminium; 1 ... 1e6
 * @returns metres
 * @throws RangeError outside the domain
 * @example skinDepth(1 / 58e6, 20_000) // 0.4673e-3 m ; mpmath: 0.0004672950029691726
 * @see Ramo, Whinnery & Van Duzer, Fields and Waves in Communication Electronics, 3rd ed. (1994), section 3.16
 */
export function skinDepth(resistivity: number, frequency: number, relativePermeability = 1): number {
  requireBetween('resistivity', resistivity, 1e-9, 1e-3, 'closed');
  requireBetween('frequency', frequency, Number.MIN_VALUE, 1e12, 'closed');
  requireBetween('relativePermeability', relativePermeability, 1, 1e6, 'closed');
  return Math.sqrt(resistivity / (Math.PI * frequency * magneticConstant * relativePermeability));
}
