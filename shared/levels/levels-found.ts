import type { Entry } from '../ledger/chain.ts';
import type { CodeKeyRow } from '../session/commitments.ts';
import { driftOf, gainDifference, greatestDifference, levelsOf, responsesOf } from './compare-levels.ts';
import { firstLevels, standingLevels } from './levels-in-record.ts';
import { driftMilliDb, type LevelHandling, type RegisteredLevels } from './registered-levels.ts';

/** What a closed study's measurements come to; differences in thousandths of a decibel. */
export type LevelsFound = {
  readonly handling: LevelHandling;
  readonly toleranceMilliDb: number;
  /** The largest difference between a specimen of one cable and one of the other at 1 kHz, in any session; null where none was measured. */
  readonly betweenCablesMilliDb: number | null;
  /** The largest between two specimens of one cable; null where there was one of each. */
  readonly withinCableMilliDb: number | null;
  /** The largest difference in response, relative to 1 kHz, and where; null where only 1 kHz was measured. */
  readonly response: { readonly milliDb: number; readonly frequencyHz: number } | null;
  /** Sessions with locked trials and without a measurement before them. */
  readonly unmeasured: readonly number[];
  /** Sessions over which a level moved by more than 0.1 dB, with the largest move. */
  readonly drifted: readonly { readonly session: number; readonly milliDb: number }[];
};

const largest = (values: readonly (number | undefined)[]): number | null => {
  const known = values.filter((value) => value !== undefined);
  return known.length === 0 ? null : Math.max(...known);
};

/**
 * The level match of a closed study, from its record and the revealed code key.
 *
 * @param sessions numbers of the sessions with locked trials; those of others do not count
 */
export function levelsFound(
  entries: readonly Entry[],
  rows: readonly CodeKeyRow[],
  registered: RegisteredLevels,
  sessions: readonly number[],
): LevelsFound {
  const recorded = standingLevels(entries).filter(({ session }) => sessions.includes(session));
  // What is compared in level are the two cables; a check cable differs in level on purpose.
  const cableOf = new Map(rows.filter(({ cable }) => cable < 2).map(({ code, cable }) => [code, cable]));
  const measured = recorded.map((one) => ({ ...one, levels: levelsOf(one), first: firstLevels(recorded, one) }));
  const areKnown = (first: string, second: string) => cableOf.has(first) && cableOf.has(second);
  const between = (first: string, second: string) =>
    areKnown(first, second) && cableOf.get(first) !== cableOf.get(second);
  const within = (first: string, second: string) =>
    areKnown(first, second) && cableOf.get(first) === cableOf.get(second);
  const responses = measured.flatMap(({ levels }) => greatestDifference(responsesOf(levels), between) ?? []);
  const response = responses.reduce<(typeof responses)[number] | null>(
    (most, one) => (most === null || one.milliDb > most.milliDb ? one : most),
    null,
  );
  const moves = measured.flatMap(({ session, levels, first }) => {
    const milliDb = first === null ? null : driftOf(levelsOf(first), levels);
    return milliDb === null ? [] : [{ session, milliDb }];
  });
  return {
    handling: registered.handling,
    toleranceMilliDb: registered.toleranceMilliDb,
    betweenCablesMilliDb: largest(measured.map(({ levels }) => gainDifference(levels, between)?.milliDb)),
    withinCableMilliDb: largest(measured.map(({ levels }) => gainDifference(levels, within)?.milliDb)),
    response: response === null ? null : { milliDb: response.milliDb, frequencyHz: response.frequencyHz },
    unmeasured: sessions.filter(
      (session) => !measured.some((one) => one.session === session && one.check === 'before'),
    ),
    drifted: sessions.flatMap((session) => {
      const milliDb = largest(moves.filter((move) => move.session === session).map((move) => move.milliDb));
      return milliDb !== null && milliDb > driftMilliDb ? [{ session, milliDb }] : [];
    }),
  };
}

/** As supplied, level is part of what is compared; from here on it may explain a result. */
const suppliedMilliDb = 100;

/** Whether level may explain what was found: out of tolerance, or as supplied and more than 0.1 dB apart. */
export function mayExplain({ handling, toleranceMilliDb, betweenCablesMilliDb }: LevelsFound): boolean {
  if (betweenCablesMilliDb === null) return true;
  return betweenCablesMilliDb > (handling === 'as-supplied' ? suppliedMilliDb : toleranceMilliDb);
}
