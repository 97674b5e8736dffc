import { requireBetween } from '#shared/statistics/domain.ts';
import { type Complex, complex, minus, over, plus, scaled, times } from './complex.ts';
import { magneticConstant } from './constants.ts';
import { skinDepth } from './skin-depth.ts';

/** What alternating current makes of a round wire, as multiples of its values at direct current. */
export interface SkinEffect {
  readonly resistanceRatio: number;
  /** Of the inductance inside the wire, mu / 8 pi per metre at direct current. */
  readonly internalInductanceRatio: number;
}

/** Beyond it exp(-2 Re w) < 1e-30 and the asymptotic series is exact to the last digit. */
const asymptoticFrom = 50;

/**
 * Resistance and internal inductance of a solid round wire alone in space, by the exact solution.
 *
 * Z / Rdc = (z / 2) J0(z) / J1(z) with z² = -j x². The ratio is the continued fraction
 * 1 - (z²/2) / (4 - z² / (6 - z² / (8 - ...))), evaluated from its end; from x = 50 the ratio of Hankel's asymptotic series. J0 and
 * J1 themselves, which overflow, are never formed.
 *
 * @param x a sqrt(omega mu / rho) = sqrt(2) × radius / skin depth, 0 ... 1e9
 * @returns ratios to direct current: resistance at least 1, inductance at most 1
 * @throws RangeError outside the domain
 * @example skinEffect(2).resistanceRatio // 1.0781587 ; mpmath: 1.0781587461306228 ; Rosa & Grover: 1.07816
 * @see Rosa & Grover, Bulletin of the Bureau of Standards 8 (1912), section 8; Abramowitz & Stegun (1964), 9.1.73 and 9.7.1
 */
export function skinEffect(x: number): SkinEffect {
  requireBetween('x', x, 0, 1e9, 'closed');
  return x < asymptoticFrom ? byContinuedFraction(x) : byAsymptoticSeries(x);
}

function byContinuedFraction(x: number): SkinEffect {
  const zSquared = complex(0, -x * x);
  const terms = Math.ceil(x) + 30;
  let denominator = complex(2 * terms);
  for (let term = terms - 1; term >= 2; term--) denominator = minus(complex(2 * term), over(zSquared, denominator));
  const inverse = over(complex(1), denominator);
  // 1 - (z²/2) × inverse = 1 + (j x²/2) × inverse
  return { resistanceRatio: 1 - (x * x * inverse.im) / 2, internalInductanceRatio: 4 * inverse.re };
}

function byAsymptoticSeries(x: number): SkinEffect {
  const w = complex(x * Math.SQRT1_2, x * Math.SQRT1_2);
  const { re, im } = scaled(times(w, over(hankelSeries(0, w), hankelSeries(1, w))), 0.5);
  return { resistanceRatio: re, internalInductanceRatio: (8 * im) / (x * x) };
}

/** The series that exp(w) / sqrt(2 pi w) multiplies in the modified Bessel function of an order. */
function hankelSeries(order: number, w: Complex): Complex {
  let term = complex(1);
  let sum = term;
  for (let k = 1; k <= 14; k++) {
    const factor = -(4 * order * order - (2 * k - 1) ** 2) / (8 * k);
    term = scaled(over(term, w), factor);
    sum = plus(sum, term);
  }
  return sum;
}

/**
 * The same for a wire of a diameter and resistivity at a frequency.
 *
 * @param diameter    metres, above 0 ... 1
 * @param resistivity ohm metres, 1e-9 ... 1e-3
 * @param frequency   hertz, 0 ... 1e12; 0 is direct current
 * @returns ratios to direct current
 * @throws RangeError outside the domain
 * @example roundWireSkinEffect(diameterOfGauge(12), 1 / 58e6, 20_000).resistanceRatio // 1.3529840 ; mpmath: 1.3529839632573184
 */
export function roundWireSkinEffect(diameter: number, resistivity: number, frequency: number): SkinEffect {
  requireBetween('diameter', diameter, Number.MIN_VALUE, 1, 'closed');
  if (frequency === 0) return skinEffect(0);
  return skinEffect((Math.SQRT1_2 * diameter) / skinDepth(resistivity, frequency));
}

/** Inductance inside a round wire at direct current, in H/m: mu0 / 8 pi, whatever its diameter. */
export const internalInductanceAtDc = magneticConstant / (8 * Math.PI);
