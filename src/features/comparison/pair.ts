import { type Circuit, type LevelDifference, type Line, levelDifference } from '#shared/cables/level-difference.ts';
import { predictedLine } from '#shared/cables/predicted-line.ts';
import type { Cable } from '#shared/contracts/cables.ts';
import type { MeasuredCurve } from '#shared/contracts/measurements.ts';
import { measuredLine } from '#shared/measurements/measured-line.ts';

/** A cable with what was measured of its pieces. */
export type PairSide = { cable: Cable; curves: readonly MeasuredCurve[] };

/** How two cables differ in a circuit; null where too little is known of either. */
export type PairDifference = { predicted: LevelDifference | null; measured: LevelDifference | null };

/** The difference of the first over the second, from their constructions and from what was measured. */
export function pairDifference(first: PairSide, second: PairSide, circuit: Circuit): PairDifference {
  return {
    predicted: between(constructed(first), constructed(second), circuit),
    measured: between(measuredLine(first.curves), measuredLine(second.curves), circuit),
  };
}

function constructed({ cable }: PairSide): Line | null {
  const line = predictedLine(cable.construction, cable.lengthMm);
  return line.isKnown ? line.value : null;
}

function between(first: Line | null, second: Line | null, circuit: Circuit): LevelDifference | null {
  if (first === null || second === null) return null;
  const difference = levelDifference(first, second, circuit);
  // A line so lossy that nothing arrives has no level; no cable is one.
  return difference.curve.every(({ decibels }) => Number.isFinite(decibels)) ? difference : null;
}
