import { requireBetween, requireWhole } from '#shared/statistics/domain.ts';
import { complex, magnitude } from './complex.ts';
import { admittanceOf, type Load } from './load.ts';
import { type LineConstants, transferOf, twoPortOf } from './two-port.ts';

/** A cable as a line: what its constants are at a frequency, and its length in metres. */
export interface Line {
  readonly constantsAt: (frequency: number) => LineConstants;
  readonly length: number;
}

/** Between what a cable stands: the source's resistance in ohms, and the load. */
export interface Circuit {
  readonly sourceOhms: number;
  readonly load: Load;
}

export interface LevelAt {
  readonly frequency: number;
  /** Level of the first over the second in dB. */
  readonly decibels: number;
}

export interface LevelDifference {
  readonly curve: readonly LevelAt[];
  /** Where the two differ most, 1 Hz ... 100 kHz. */
  readonly largest: LevelAt;
  /** The same within 20 Hz ... 20 kHz. */
  readonly largestAudible: LevelAt;
}

export const audibleBand = { low: 20, high: 20_000 };
const lowest = 1;
const decades = 5;

/**
 * Level at the load in dB, against the source's e.m.f.
 *
 * @param frequency hertz, 0 ... 1e9
 * @throws RangeError outside the domain
 * @example levelAt of 5 m at 0.1684 ohm/m loop, from 0.05 into 8 ohm, at 20 Hz: -0.91819 dB ; mpmath
 */
export function levelAt({ constantsAt, length }: Line, { sourceOhms, load }: Circuit, frequency: number): number {
  requireBetween('sourceOhms', sourceOhms, 0, 1e9, 'closed');
  const port = twoPortOf(constantsAt(frequency), length, frequency);
  return 20 * Math.log10(magnitude(transferOf(port, complex(sourceOhms), admittanceOf(load, frequency))));
}

/**
 * How the levels of two cables in one circuit differ over 1 Hz ... 100 kHz, evenly in the logarithm of frequency.
 *
 * @param perDecade frequencies in each decade, whole, 1 ... 1000; 20 Hz and 20 kHz are always among them
 * @returns the curve, and where its distance from 0 is largest, in all and within the audible band
 * @throws RangeError outside the domain
 * @example 10 m at 1.2 against 0.6 uH/m into 4 ohm: 0.402 dB at 20 kHz, 0.001 dB at 1 kHz ; mpmath
 */
export function levelDifference(first: Line, second: Line, circuit: Circuit, perDecade = 40): LevelDifference {
  requireWhole('perDecade', perDecade, 1, 1000);
  const curve = frequencies(perDecade).map((frequency) => ({
    frequency,
    decibels: levelAt(first, circuit, frequency) - levelAt(second, circuit, frequency),
  }));
  const audible = curve.filter(({ frequency }) => frequency >= audibleBand.low && frequency <= audibleBand.high);
  return { curve, largest: furthest(curve), largestAudible: furthest(audible) };
}

function frequencies(perDecade: number): number[] {
  const grid = Array.from({ length: decades * perDecade + 1 }, (_, step) => lowest * 10 ** (step / perDecade));
  return [...new Set([...grid, audibleBand.low, audibleBand.high])].sort((one, other) => one - other);
}

const furthest = (curve: readonly LevelAt[]): LevelAt =>
  curve.reduce((most, at) => (Math.abs(at.decibels) > Math.abs(most.decibels) ? at : most));
