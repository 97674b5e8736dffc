import type { AssignedTrial } from '../statistics/assignment-test.ts';

/** One answer that was due: null when it did not come. */
export interface SameDifferentAnswer {
  readonly listener: string;
  readonly choice: 'same' | 'different' | null;
}

/** One locked trial with the answers of every seat that was present. */
export interface SameDifferentTrial {
  readonly session: number;
  readonly trial: number;
  /** The draw: whether the pair was of two different cables. */
  readonly isDifferent: boolean;
  readonly answers: readonly SameDifferentAnswer[];
}

export type AnswersOn = { answers: number; different: number; same: number; missing: number };

/** Answers due on trials of one kind, counted. */
export function answersOn(trials: readonly SameDifferentTrial[], isDifferent: boolean): AnswersOn {
  const given = trials.filter((trial) => trial.isDifferent === isDifferent).flatMap(({ answers }) => answers);
  const of = (choice: SameDifferentAnswer['choice']) => given.filter((answer) => answer.choice === choice).length;
  return { answers: given.length, different: of('different'), same: of('same'), missing: of(null) };
}

/**
 * Trials as the test over assignments reads them, a missing answer counted as wrong: as "same" on a different trial, as
 * "different" on a same one. No answer in its place could give a larger p, so silence never helps a claim; and since p
 * with any fixed reading of silence holds its level, this one does too.
 *
 * @param trials  all locked trials
 * @param missing 'counted as wrong', or 'left out' to look the other way
 * @example assignedTrials([{ session: 1, trial: 1, isDifferent: false, answers: [{ listener: 'L01', choice: null }] }],
 *   'counted as wrong') // [{ different: 1, isDifferent: false }]
 */
export function assignedTrials(
  trials: readonly SameDifferentTrial[],
  missing: 'counted as wrong' | 'left out',
): AssignedTrial[] {
  return trials.map(({ isDifferent, answers }) => ({
    isDifferent,
    different: answers.filter(
      ({ choice }) => choice === 'different' || (choice === null && !isDifferent && missing === 'counted as wrong'),
    ).length,
  }));
}
