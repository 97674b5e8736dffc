import { requireBetween } from '#shared/statistics/domain.ts';
import { electricConstant, magneticConstant } from './constants.ts';

/** What the geometry of go and return makes per metre of cable. */
export interface PerMetre {
  /** Henry per metre from the field outside the conductors; theirs inside comes on top. */
  readonly externalInductance: number;
  /** Farad per metre, all of the field taken to lie in the insulation. */
  readonly capacitance: number;
}

function requirePermittivity(relativePermittivity: number): void {
  requireBetween('relativePermittivity', relativePermittivity, 1, 100, 'closed');
}

const fromShape = (inductance: number, relativePermittivity: number): PerMetre => ({
  externalInductance: inductance,
  capacitance: (electricConstant * relativePermittivity * magneticConstant) / inductance,
});

/**
 * Two parallel round wires: L = (mu0 / pi) arcosh(s / d), C = pi eps / arcosh(s / d).
 *
 * Exact for perfect conductors in one dielectric. Where air surrounds the insulation, C is an upper limit.
 *
 * @param spacing              between the centres in metres, above `diameter` ... 1
 * @param diameter             of each wire's metal in metres, above 0
 * @param relativePermittivity 1 ... 100
 * @throws RangeError outside the domain, or when the wires would touch
 * @example parallelWires(5e-3, 1e-3, 2.3) // 0.91697 uH/m, 27.908 pF/m ; mpmath
 * @see Ramo, Whinnery & Van Duzer, Fields and Waves in Communication Electronics, 3rd ed. (1994), table 5.11b
 */
export function parallelWires(spacing: number, diameter: number, relativePermittivity: number): PerMetre {
  requirePermittivity(relativePermittivity);
  requireBetween('diameter', diameter, 0, 1, 'open');
  requireBetween('spacing', spacing, diameter, 1 + diameter, 'open');
  return fromShape((magneticConstant / Math.PI) * Math.acosh(spacing / diameter), relativePermittivity);
}

/**
 * A coaxial line: L = (mu0 / 2 pi) ln(D / d), C = 2 pi eps / ln(D / d). Exact for perfect conductors.
 *
 * @param shieldDiameter       inside the shield in metres, above `coreDiameter` ... 1
 * @param coreDiameter         of the core's metal in metres, above 0
 * @param relativePermittivity 1 ... 100
 * @throws RangeError outside the domain
 * @example coaxialLine(2.95e-3, 0.81e-3, 2.25) // 0.25851 uH/m, 96.844 pF/m ; mpmath
 * @see Ramo, Whinnery & Van Duzer, Fields and Waves in Communication Electronics, 3rd ed. (1994), table 5.11b
 */
export function coaxialLine(shieldDiameter: number, coreDiameter: number, relativePermittivity: number): PerMetre {
  requirePermittivity(relativePermittivity);
  requireBetween('coreDiameter', coreDiameter, 0, 1, 'open');
  requireBetween('shieldDiameter', shieldDiameter, coreDiameter, 1 + coreDiameter, 'open');
  const inductance = (magneticConstant / (2 * Math.PI)) * Math.log(shieldDiameter / coreDiameter);
  return fromShape(inductance, relativePermittivity);
}

/**
 * How much longer a conductor is than the cable in which it is twisted: a helix of diameter s and pitch p, sqrt(1 + (pi s / p)²).
 *
 * @param spacing metres between the centres of opposite conductors, 0 ... 1
 * @param pitch   metres of cable per turn, above 0 ... 10
 * @throws RangeError outside the domain
 * @example twistLengthening(2e-3, 30e-3) // 1.0217
 */
export function twistLengthening(spacing: number, pitch: number): number {
  requireBetween('spacing', spacing, 0, 1, 'closed');
  requireBetween('pitch', pitch, Number.MIN_VALUE, 10, 'closed');
  return Math.hypot(1, (Math.PI * spacing) / pitch);
}

/**
 * A twisted pair, taken as a parallel pair lengthened by its twist. An approximation: common practice, no source.
 *
 * @param spacing              between the centres in metres, above `diameter` ... 1
 * @param diameter             of each wire's metal in metres, above 0
 * @param relativePermittivity 1 ... 100
 * @param pitch                metres of cable per turn, above 0 ... 10
 * @returns per metre of cable
 * @throws RangeError outside the domain
 * @example twistedPair(5e-3, 1e-3, 2.3, 10) // as parallelWires(5e-3, 1e-3, 2.3) but for one part in a million
 */
export function twistedPair(spacing: number, diameter: number, relativePermittivity: number, pitch: number): PerMetre {
  const straight = parallelWires(spacing, diameter, relativePermittivity);
  const longer = twistLengthening(spacing, pitch);
  return {
    externalInductance: straight.externalInductance * longer,
    capacitance: straight.capacitance * longer,
  };
}

/**
 * A star quad with opposite conductors joined: L = (mu0 / 2 pi) ln(s / d), C = 2 pi eps / ln(s / d).
 *
 * An approximation: four thin wires at the corners of a square whose diagonal is s, their currents spread evenly round each
 * wire. It comes from the logarithms of the six distances; the closer the wires, the more it says too little C and too much L.
 *
 * @param spacing              between the centres of opposite conductors in metres, above sqrt(2) × `diameter` ... 1
 * @param diameter             of each wire's metal in metres, above 0
 * @param relativePermittivity 1 ... 100
 * @throws RangeError outside the domain, or when neighbours would touch
 * @example starQuad(6e-3, 1e-3, 2.3) // 0.35835 uH/m = 0.2 ln 6, to a part in 10^9
 * @see Grover, Inductance Calculations (1946), chapter 5, on the geometric mean distance
 */
export function starQuad(spacing: number, diameter: number, relativePermittivity: number): PerMetre {
  requirePermittivity(relativePermittivity);
  requireBetween('diameter', diameter, 0, 1, 'open');
  requireBetween('spacing', spacing, Math.SQRT2 * diameter, 1 + 2 * diameter, 'open');
  return fromShape((magneticConstant / (2 * Math.PI)) * Math.log(spacing / diameter), relativePermittivity);
}
