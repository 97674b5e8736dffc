import { z } from 'zod';
import type { Entry } from '../ledger/chain.ts';
import type { CodeKeyRow } from '../session/commitments.ts';
import { driftOf, gainDifference, levelsOf } from './compare-levels.ts';
import { firstLevels, levelsInRecord, standingLevels } from './levels-in-record.ts';
import { levelChannels, levelChecks, levelInstrument } from './measured-levels.ts';
import { isWithin, levelHandlings, type RegisteredLevels } from './registered-levels.ts';

/** The level match as a report shows it; levels and differences in thousandths of a decibel. */
export const levelReport = z.strictObject({
  handling: z.enum(levelHandlings),
  toleranceMilliDb: z.int(),
  checks: z.array(
    z.strictObject({
      session: z.int(),
      check: z.enum(levelChecks),
      at: z.string(),
      instrument: levelInstrument,
      /** Whether a later measurement of the same check took its place. */
      isReplaced: z.boolean(),
      isIn: z.boolean(),
      /** The largest between two codes at 1 kHz. */
      differenceMilliDb: z.int(),
      /** The largest move since the check before the session; null for that one. */
      driftMilliDb: z.int().nullable(),
      levels: z.array(
        z.strictObject({
          code: z.string(),
          /** The cable that the code stands for. */
          cable: z.string(),
          channel: z.enum(levelChannels),
          frequencyHz: z.int(),
          milliDb: z.int(),
        }),
      ),
    }),
  ),
});
export type LevelReport = z.output<typeof levelReport>;

/** Every measurement with what it came to, from the record and the revealed code key. */
export function levelReportOf(
  entries: readonly Entry[],
  rows: readonly CodeKeyRow[],
  registered: RegisteredLevels,
  cables: readonly [string, string],
): LevelReport {
  const recorded = levelsInRecord(entries);
  const standing = new Set(standingLevels(entries).map(({ sequence }) => sequence));
  const cableOf = (code: string) => cables[rows.find((row) => row.code === code)?.cable === 0 ? 0 : 1];
  return {
    handling: registered.handling,
    toleranceMilliDb: registered.toleranceMilliDb,
    checks: recorded.map((one) => {
      const levels = levelsOf(one);
      const first = firstLevels(recorded, one);
      const { session, check, at, instrument, grade, isDrifted, sequence } = one;
      return {
        session,
        check,
        at,
        instrument,
        isReplaced: !standing.has(sequence),
        isIn: isWithin(grade) && isDrifted !== true,
        differenceMilliDb: gainDifference(levels)?.milliDb ?? 0,
        driftMilliDb: first === null ? null : driftOf(levelsOf(first), levels),
        levels: levels.map((level) => ({ ...level, cable: cableOf(level.code) })),
      };
    }),
  };
}
