import { levelMilliDb } from './level-units.ts';
import type { LevelChannel, MeasuredLevels } from './measured-levels.ts';
import { driftMilliDb, gainHz, gradeOf, type LevelGrade, type RegisteredLevels } from './registered-levels.ts';

/** The level of one code in one channel at one frequency, in thousandths of a decibel. */
export type Level = {
  readonly code: string;
  readonly channel: LevelChannel;
  readonly frequencyHz: number;
  readonly milliDb: number;
};

/** The difference between two codes, the louder first; at least 0. */
export type LevelDifference = {
  readonly milliDb: number;
  readonly channel: LevelChannel;
  readonly frequencyHz: number;
  readonly codes: readonly [string, string];
};

export function levelsOf({ rows, unit }: MeasuredLevels): Level[] {
  return rows.map(({ code, channel, frequencyHz, readings }) => ({
    code,
    channel,
    frequencyHz,
    milliDb: levelMilliDb(readings, unit),
  }));
}

/** The first level minus the second. */
export const differenceOf = (first: Level, second: Level): number => first.milliDb - second.milliDb;

const isGain = ({ frequencyHz }: Level) => frequencyHz === gainHz;

/**
 * The largest difference between two codes in one channel at one frequency.
 *
 * @param mayCompare which two codes; all of them if left out
 * @returns null where there is nothing to compare
 */
export function greatestDifference(
  levels: readonly Level[],
  mayCompare: (first: string, second: string) => boolean = () => true,
): LevelDifference | null {
  let greatest: LevelDifference | null = null;
  for (const [index, first] of levels.entries())
    for (const second of levels.slice(index + 1)) {
      const isOnePlace = first.channel === second.channel && first.frequencyHz === second.frequencyHz;
      if (!isOnePlace || first.code === second.code || !mayCompare(first.code, second.code)) continue;
      const milliDb = Math.abs(differenceOf(first, second));
      if (greatest !== null && milliDb <= greatest.milliDb) continue;
      const codes: [string, string] =
        first.milliDb >= second.milliDb ? [first.code, second.code] : [second.code, first.code];
      greatest = { milliDb, channel: first.channel, frequencyHz: first.frequencyHz, codes };
    }
  return greatest;
}

/** The largest difference in level between two codes: at 1 kHz, in any channel. */
export function gainDifference(
  levels: readonly Level[],
  mayCompare?: (first: string, second: string) => boolean,
): LevelDifference | null {
  return greatestDifference(levels.filter(isGain), mayCompare);
}

const gainOf = (levels: readonly Level[], { code, channel }: Level) =>
  levels.find((level) => isGain(level) && level.code === code && level.channel === channel);

/** Levels relative to the same code's level at 1 kHz, at every other frequency. */
export function responsesOf(levels: readonly Level[]): Level[] {
  return levels.flatMap((level) => {
    const gain = gainOf(levels, level);
    return isGain(level) || gain === undefined ? [] : [{ ...level, milliDb: differenceOf(level, gain) }];
  });
}

/** Left minus right at 1 kHz, by code; codes with one channel are left out. */
export function balancesOf(levels: readonly Level[]): { readonly code: string; readonly milliDb: number }[] {
  const gains = levels.filter(isGain);
  return gains.flatMap((left) => {
    const right = gains.find(({ code, channel }) => code === left.code && channel === 'right');
    return left.channel !== 'left' || right === undefined
      ? []
      : [{ code: left.code, milliDb: differenceOf(left, right) }];
  });
}

/** By how much a code's level at 1 kHz has moved the most since an earlier measurement; null where none was measured twice. */
export function driftOf(earlier: readonly Level[], now: readonly Level[]): number | null {
  const moves = now.filter(isGain).flatMap((level) => {
    const before = gainOf(earlier, level);
    return before === undefined ? [] : [Math.abs(differenceOf(level, before))];
  });
  return moves.length === 0 ? null : Math.max(...moves);
}

export type LevelJudgement = {
  readonly grade: LevelGrade;
  /** Null where there is no earlier measurement. */
  readonly isDrifted: boolean | null;
};

/**
 * What a measurement comes to: how well the codes match, and whether they have stayed where they were before the session.
 *
 * @param first the measurement before the session that this one is held against; null for that one itself
 * @throws RangeError where two codes are not measured at 1 kHz in one channel
 */
export function judgeLevels(
  measured: MeasuredLevels,
  first: MeasuredLevels | null,
  registered: RegisteredLevels,
): LevelJudgement {
  const levels = levelsOf(measured);
  const difference = gainDifference(levels);
  if (difference === null) throw new RangeError('two codes must be measured at 1 kHz to be compared');
  const drift = first === null ? null : driftOf(levelsOf(first), levels);
  return { grade: gradeOf(difference.milliDb, registered), isDrifted: drift === null ? null : drift > driftMilliDb };
}
