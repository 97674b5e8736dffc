import type { Method } from '../methods/method.ts';
import type { Contrast } from './contrasts.ts';
import type { CueTrial } from './cue-trials.ts';
import type { Cue } from './cues.ts';
import { labelsOf } from './labels.ts';

/** For each trial, what a contrast makes of a cue for each truth, and for each label where answers could follow it. */
export type ScoreTable = {
  readonly contrast: Contrast;
  readonly byTruth: readonly (readonly number[])[];
  readonly byLabel: readonly (readonly number[])[] | null;
};

/** Twice the middle rank less the middle, within a session and a place, so that neither of them can stand for a cue. */
function centredRanks(values: readonly (number | null)[]): number[] {
  const known = values.filter((value) => value !== null);
  return values.map((value) => {
    if (value === null) return 0;
    const below = known.filter((other) => other < value).length;
    const alike = known.filter((other) => other === value).length;
    return 2 * below + alike - known.length;
  });
}

/** The centred rank of a cue at each of its places, trial by trial. */
export function ranksOf(cue: Cue, trials: readonly CueTrial[]): ReadonlyMap<number, readonly number[]> {
  const sessions = [...new Set(trials.map(({ session }) => session))];
  return new Map(
    cue.places.map((place) => {
      const ranks = new Array<number>(trials.length).fill(0);
      for (const session of sessions) {
        const own = [...trials.keys()].filter((index) => trials[index]?.session === session);
        const values = own.map((index) => {
          const trial = trials[index];
          return trial === undefined ? null : cue.valueAt(trial, place);
        });
        for (const [at, rank] of centredRanks(values).entries()) ranks[own[at] ?? 0] = rank;
      }
      return [place, ranks];
    }),
  );
}

const isSame = (a: ScoreTable, b: ScoreTable, sign: 1 | -1) =>
  a.byTruth.every((row, trial) => row.every((score, truth) => score === sign * (b.byTruth[trial]?.[truth] ?? 0)));

/** The tables of a cue. One that says the same as one before, or just the opposite, is left out: it asks nothing new. */
export function scoreTables(method: Method, cue: Cue, trials: readonly CueTrial[]): ScoreTable[] {
  const ranks = ranksOf(cue, trials);
  const labels = labelsOf(method);
  const sum = (weigh: (place: number) => number, index: number) =>
    cue.places.reduce((total, place) => total + weigh(place) * (ranks.get(place)?.[index] ?? 0), 0);
  const all = cue.contrasts.map((contrast): ScoreTable => {
    const { byTruth, byLabel } = contrast;
    return {
      contrast,
      byTruth: trials.map((trial, index) =>
        method.truths.map((truth) => sum((place) => byTruth(place, truth, trial), index)),
      ),
      byLabel:
        byLabel === null
          ? null
          : trials.map((_trial, index) => labels.map((label) => sum((place) => byLabel(place, label), index))),
    };
  });
  const telling = all.filter(({ byTruth }) => byTruth.some((row) => row.some((score) => score !== row[0])));
  return telling.filter(
    (table, at) => !telling.slice(0, at).some((one) => isSame(table, one, 1) || isSame(table, one, -1)),
  );
}
