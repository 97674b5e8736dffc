import { type ValueAt, valueAt } from '#shared/cables/interpolation.ts';
import type { Line } from '#shared/cables/level-difference.ts';
import type { MeasuredCurve } from '#shared/contracts/measurements.ts';
import type { Quantity } from './quantities.ts';

type Measured = Pick<MeasuredCurve, 'quantity' | 'points'>;

/** Values against frequency; a value alone holds at every frequency. */
function curveOf({ points }: Measured): ValueAt[] {
  return points.map(({ frequency, value }) => ({ frequency: frequency ?? 1000, value }));
}

/** The mean over the pieces at a frequency, or null where none was measured. */
export function meanAt(curves: readonly Measured[], quantity: Quantity, frequency: number): number | null {
  const own = curves.filter((curve) => curve.quantity === quantity && curve.points.length > 0);
  if (own.length === 0) return null;
  return own.reduce((sum, curve) => sum + valueAt(curveOf(curve), frequency), 0) / own.length;
}

/**
 * A cable as a line from what was measured of its pieces, their mean; beyond the frequencies measured as at their ends.
 *
 * @returns null without a resistance; inductance and capacitance that were not measured count as none
 */
export function measuredLine(curves: readonly Measured[]): Line | null {
  if (meanAt(curves, 'resistance', 1000) === null) return null;
  const constantsAt = (frequency: number) => {
    const at = (quantity: Quantity) => Math.max(0, meanAt(curves, quantity, frequency) ?? 0);
    return {
      resistance: at('resistance'),
      inductance: at('inductance'),
      conductance: 0,
      capacitance: at('capacitance'),
    };
  };
  return { constantsAt, length: 1 };
}
