import { requireBetween } from '#shared/statistics/domain.ts';
import { annealedCopperConductivity, statedTemperature } from './constants.ts';

/**
 * Resistivity of a conductor from its conductivity in % IACS, at a temperature.
 *
 * rho(T) = rho20 (1 + alpha20 (T - 20 °C)), linear, good near room temperature.
 *
 * @param percentIacs conductivity at 20 °C, above 0 ... 120 % IACS
 * @param temperature -50 ... 200 °C
 * @param alpha20     temperature coefficient at 20 °C per kelvin, 0 ... 0.01; 0.00393 for annealed copper
 * @returns resistivity in ohm metres
 * @throws RangeError outside the domain
 * @example resistivityFromIacs(100, 20, 0.00393) // 1.7241379e-8 = 1 / 58e6
 * @see IEC 60028 (1925); National Bureau of Standards, Handbook 100, Copper Wire Tables (1966)
 */
export function resistivityFromIacs(percentIacs: number, temperature: number, alpha20: number): number {
  requireBetween('percentIacs', percentIacs, Number.MIN_VALUE, 120, 'closed');
  requireBetween('temperature', temperature, -50, 200, 'closed');
  requireBetween('alpha20', alpha20, 0, 0.01, 'closed');
  const at20 = 100 / (percentIacs * annealedCopperConductivity);
  return at20 * (1 + alpha20 * (temperature - statedTemperature));
}
