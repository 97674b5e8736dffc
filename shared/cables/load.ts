import { requireBetween } from '#shared/statistics/domain.ts';
import { type Complex, complex, over, plus } from './complex.ts';
import { valueAt } from './interpolation.ts';

/** An impedance as it was measured or stated: magnitude in ohms above 0, phase in degrees, -90 ... 90 for a passive load. */
export interface ImpedanceAt {
  readonly frequency: number;
  readonly ohms: number;
  readonly degrees: number;
}

/** What stands at the end of a cable; ohms, henries, farads. */
export type Load =
  | { readonly type: 'resistor'; readonly resistance: number }
  | { readonly type: 'series-rl'; readonly resistance: number; readonly inductance: number }
  | { readonly type: 'parallel-rc'; readonly resistance: number; readonly capacitance: number }
  | { readonly type: 'curve'; readonly points: readonly ImpedanceAt[] };

/**
 * Admittance of a load at a frequency.
 *
 * A curve is interpolated over the logarithm of frequency; beyond its ends it goes on as at its ends.
 *
 * @param load      resistance above 0 ... 1e9 ohm; inductance and capacitance at least 0
 * @param frequency hertz, 0 ... 1e9
 * @returns siemens
 * @throws RangeError outside the domain
 * @example admittanceOf({ type: 'resistor', resistance: 8 }, 1000) // 0.125
 */
export function admittanceOf(load: Load, frequency: number): Complex {
  requireBetween('frequency', frequency, 0, 1e9, 'closed');
  if (load.type === 'curve') return admittanceOfCurve(load.points, frequency);
  requireBetween('resistance', load.resistance, Number.MIN_VALUE, 1e9, 'closed');
  const omega = 2 * Math.PI * frequency;
  if (load.type === 'series-rl') {
    requireBetween('inductance', load.inductance, 0, 1e3, 'closed');
    return over(complex(1), complex(load.resistance, omega * load.inductance));
  }
  if (load.type === 'parallel-rc') {
    requireBetween('capacitance', load.capacitance, 0, 1, 'closed');
    return plus(complex(1 / load.resistance), complex(0, omega * load.capacitance));
  }
  return complex(1 / load.resistance);
}

function admittanceOfCurve(points: readonly ImpedanceAt[], frequency: number): Complex {
  for (const { ohms } of points) requireBetween('ohms', ohms, Number.MIN_VALUE, 1e9, 'closed');
  const ohms = Math.exp(
    valueAt(
      points.map((point) => ({ frequency: point.frequency, value: Math.log(point.ohms) })),
      frequency,
    ),
  );
  const phase = valueAt(
    points.map(({ frequency: at, degrees }) => ({ frequency: at, value: degrees })),
    frequency,
  );
  const angle = (phase * Math.PI) / 180;
  return complex(Math.cos(angle) / ohms, -Math.sin(angle) / ohms);
}
