import { requireBetween } from '#shared/statistics/domain.ts';
import { type Complex, complex, magnitude, over, plus, scaled, squareRoot, times } from './complex.ts';

/** A line at one frequency, per metre of loop (go and return together). */
export interface LineConstants {
  /** Ohm per metre. */
  readonly resistance: number;
  /** Henry per metre. */
  readonly inductance: number;
  /** Siemens per metre. */
  readonly conductance: number;
  /** Farad per metre. */
  readonly capacitance: number;
}

/** V1 = a V2 + b I2, I1 = c V2 + d I2; d = a, as a line is the same from both ends. */
export interface TwoPort {
  readonly a: Complex;
  readonly b: Complex;
  readonly c: Complex;
  readonly d: Complex;
}

/**
 * The two-port of a line, its length counted exactly: a = d = cosh t, b = Z sinh t / t, c = Y sinh t / t, t² = Z Y.
 *
 * Z and Y are those of the whole length. Written with sinh t / t, which is 1 at t = 0, it stands without conductance and capacitance,
 * where a characteristic impedance does not exist.
 *
 * @param line      all four at least 0
 * @param length    metres, 0 ... 100,000
 * @param frequency hertz, 0 ... 1e9
 * @throws RangeError outside the domain
 * @example twoPortOf({ resistance: 1, inductance: 0, conductance: 0, capacitance: 0 }, 2, 50) // a = 1, b = 2, c = 0
 * @see Pozar, Microwave Engineering, 4th ed. (2012), section 4.4
 */
export function twoPortOf(line: LineConstants, length: number, frequency: number): TwoPort {
  for (const [name, value] of Object.entries(line)) requireBetween(name, value, 0, 1e9, 'closed');
  requireBetween('length', length, 0, 100_000, 'closed');
  requireBetween('frequency', frequency, 0, 1e9, 'closed');
  const omega = 2 * Math.PI * frequency;
  const series = complex(line.resistance * length, omega * line.inductance * length);
  const shunt = complex(line.conductance * length, omega * line.capacitance * length);
  const { cosh, sinhOverT } = hyperbolic(times(series, shunt));
  return { a: cosh, b: times(series, sinhOverT), c: times(shunt, sinhOverT), d: cosh };
}

/** cosh t and sinh t / t of t², by their series where t is small and subtraction would lose digits. */
function hyperbolic(tSquared: Complex): { cosh: Complex; sinhOverT: Complex } {
  if (magnitude(tSquared) < 1) {
    let even = complex(1);
    let cosh = even;
    let sinhOverT = even;
    for (let k = 1; k <= 12; k++) {
      even = scaled(times(even, tSquared), 1 / (2 * k * (2 * k - 1)));
      cosh = plus(cosh, even);
      sinhOverT = plus(sinhOverT, scaled(even, 1 / (2 * k + 1)));
    }
    return { cosh, sinhOverT };
  }
  const t = squareRoot(tSquared);
  const cosh = complex(Math.cosh(t.re) * Math.cos(t.im), Math.sinh(t.re) * Math.sin(t.im));
  const sinh = complex(Math.sinh(t.re) * Math.cos(t.im), Math.cosh(t.re) * Math.sin(t.im));
  return { cosh, sinhOverT: over(sinh, t) };
}

/**
 * Voltage at the load for one volt of the source's e.m.f.: 1 / (a + b Yl + Zs (c + d Yl)).
 *
 * @param source impedance of the source in ohms
 * @param load   admittance of the load in siemens; 0 is a load that takes no current
 * @returns the transfer function, complex
 * @example 8 ohm through 0.05 ohm and no cable: 8 / 8.05 = 0.99379
 */
export function transferOf({ a, b, c, d }: TwoPort, source: Complex, load: Complex): Complex {
  const below = plus(plus(a, times(b, load)), times(source, plus(c, times(d, load))));
  return over(complex(1), below);
}
