import { requireBetween } from '#shared/statistics/domain.ts';

const diameterOf36 = 0.127e-3;
const stepRatio = 92;
const stepsBetween = 39;

/**
 * Diameter of a solid wire of an American wire gauge: 0.127 mm × 92^((36 - n) / 39).
 *
 * @param gauge -3 (0000) ... 60; between whole gauges too
 * @returns metres
 * @throws RangeError outside the domain
 * @example diameterOfGauge(12) // 2.0525e-3 m ; ASTM B258: 80.81 mil
 * @see ASTM B258, Standard Nominal Diameters and Cross-Sectional Areas of AWG Sizes
 */
export function diameterOfGauge(gauge: number): number {
  requireBetween('gauge', gauge, -3, 60, 'closed');
  return diameterOf36 * stepRatio ** ((36 - gauge) / stepsBetween);
}

/**
 * The American wire gauge of a diameter, not rounded: the inverse of `diameterOfGauge`.
 *
 * @param diameter metres, above 0 ... 1
 * @returns the gauge; below 0 for what is called 00 (-1), 000 (-2), 0000 (-3), and further for thicker wires
 * @throws RangeError outside the domain
 * @example gaugeOfDiameter(0.127e-3) // 36
 */
export function gaugeOfDiameter(diameter: number): number {
  requireBetween('diameter', diameter, Number.MIN_VALUE, 1, 'closed');
  return 36 - (stepsBetween * Math.log(diameter / diameterOf36)) / Math.log(stepRatio);
}

/**
 * Area of a circle.
 *
 * @param diameter metres, 0 ... 1
 * @returns square metres
 * @throws RangeError outside the domain
 * @example areaOfDiameter(2.0525e-3) // 3.3087e-6, AWG 12
 */
export function areaOfDiameter(diameter: number): number {
  requireBetween('diameter', diameter, 0, 1, 'closed');
  return (Math.PI / 4) * diameter * diameter;
}

/**
 * Diameter of the circle of an area: the inverse of `areaOfDiameter`.
 *
 * @param area square metres, 0 ... 0.7
 * @returns metres
 * @throws RangeError outside the domain
 * @example diameterOfArea(2.5e-6) // 1.784e-3
 */
export function diameterOfArea(area: number): number {
  requireBetween('area', area, 0, 0.7, 'closed');
  return Math.sqrt((4 / Math.PI) * area);
}
