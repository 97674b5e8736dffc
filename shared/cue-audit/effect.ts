import type { Contrast } from './contrasts.ts';
import type { CueTrial } from './cue-trials.ts';
import type { Cue } from './cues.ts';

/** A value of a cue on one side of a contrast. */
export type SidedValue = { readonly side: 1 | -1; readonly value: number };

/** The values of a cue, each on the side on which what was drawn, or an answer, puts it. Values on neither are left out. */
export function sidedValues(
  cue: Cue,
  { byTruth, byLabel }: Contrast,
  question: 'truth' | 'answers',
  trials: readonly CueTrial[],
): SidedValue[] {
  return trials.flatMap((trial) =>
    cue.places.flatMap((place): SidedValue[] => {
      const value = cue.valueAt(trial, place);
      if (value === null) return [];
      const of = (weight: number): SidedValue[] => (weight === 0 ? [] : [{ side: weight > 0 ? 1 : -1, value }]);
      if (question === 'truth') return of(byTruth(place, trial.truth, trial));
      if (byLabel === null) return [];
      return trial.answers.flatMap(({ choice }) => (choice === null ? [] : of(byLabel(place, choice))));
    }),
  );
}

/** The mean of one side less the mean of the other: seconds for a time, else as it is. Null where a side is empty. */
export function effectOf(
  cue: Cue,
  contrast: Contrast,
  question: 'truth' | 'answers',
  trials: readonly CueTrial[],
): number | null {
  const values = sidedValues(cue, contrast, question, trials);
  const meanOf = (side: 1 | -1) => {
    const own = values.filter((one) => one.side === side);
    return own.length === 0 ? null : own.reduce((sum, { value }) => sum + value, 0) / own.length;
  };
  const [above, below] = [meanOf(1), meanOf(-1)];
  if (above === null || below === null) return null;
  return (above - below) / (cue.isTime ? 1000 : 1);
}
