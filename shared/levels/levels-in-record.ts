import type { Entry } from '../ledger/chain.ts';
import { levelEvents } from '../session/level-events.ts';
import { type Level, levelsOf } from './compare-levels.ts';
import type { MeasuredLevels } from './measured-levels.ts';
import type { LevelGrade } from './registered-levels.ts';

/** A measurement as it stands on the record. */
export type RecordedLevels = MeasuredLevels & {
  readonly session: number;
  readonly sequence: number;
  readonly at: string;
  readonly by: string;
  readonly grade: LevelGrade;
  readonly isDrifted: boolean | null;
};

/** Every measurement of levels, in the order of the record. */
export function levelsInRecord(entries: readonly Entry[]): RecordedLevels[] {
  return entries
    .filter(({ kind }) => kind === 'levels-measured')
    .map(({ sequence, at, payload }) => ({ sequence, at, ...levelEvents['levels-measured'].parse(payload) }));
}

/** The measurements that stand: the last of each check of each session, since the session was last planned anew. */
export function standingLevels(entries: readonly Entry[]): RecordedLevels[] {
  const standing = new Map<string, RecordedLevels>();
  for (const recorded of levelsInRecord(entries)) standing.set(`${recorded.session} ${recorded.check}`, recorded);
  const replanned = new Map<unknown, number>();
  for (const { kind, sequence, payload } of entries)
    if (kind === 'session-replanned') replanned.set(payload.session, sequence);
  return [...standing.values()].filter(({ session, sequence }) => sequence > (replanned.get(session) ?? 0));
}

/** The levels that a measurement after the start is held against: those of the last one before it. */
export function firstLevels(recorded: readonly RecordedLevels[], of: RecordedLevels): RecordedLevels | null {
  if (of.check === 'before') return null;
  return (
    recorded.findLast(
      ({ session, check, sequence }) => session === of.session && check === 'before' && sequence < of.sequence,
    ) ?? null
  );
}

export const levelsAt = (recorded: RecordedLevels | null): readonly Level[] | null =>
  recorded === null ? null : levelsOf(recorded);
