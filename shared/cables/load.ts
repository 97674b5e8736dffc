import { requireBetween } from '#shared/statistics/domain.ts';
import { type Complex, complex, over, plus } from './complex.ts';

/** What stands at the end of a cable; ohms, henries, farads. */
export type Load =
  | { readonly type: 'resistor'; readonly resistance: number }
  | { readonly type: 'series-rl'; readonly resistance: number; readonly inductance: number }
  | { readonly type: 'parallel-rc'; readonly resistance: number; readonly capacitance: number };

/**
 * Admittance of a load at a frequency.
 *
 * @param load      resistance above 0 ... 1e9 ohm; inductance and capacitance at least 0
 * @param frequency hertz, 0 ... 1e9
 * @returns siemens
 * @throws RangeError outside the domain
 * @example admittanceOf({ type: 'resistor', resistance: 8 }, 1000) // 0.125
 */
export function admittanceOf(load: Load, frequency: number): Complex {
  requireBetween('resistance', load.resistance, Number.MIN_VALUE, 1e9, 'closed');
  requireBetween('frequency', frequency, 0, 1e9, 'closed');
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
