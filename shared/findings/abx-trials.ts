import type { SharedTrial } from '../statistics/shared-presentation-test.ts';

/** One answer that was due: `choice` is null when it did not come. */
export interface AbxAnswer {
  readonly listener: string;
  readonly choice: 'A' | 'B' | null;
}

/** One locked trial with the answers of every seat that was present. */
export interface AbxTrial {
  readonly session: number;
  readonly trial: number;
  readonly truth: 'A' | 'B';
  readonly answers: readonly AbxAnswer[];
}

/**
 * Whether every answer has a draw of its own: at most one seat in every trial of every session. Seats count, not
 * answers, so that the choice of the test does not depend on who happened to answer.
 *
 * @param trials all locked trials
 * @returns true for one listener at a time
 * @example hasOwnDraws([]) // true
 */
export function hasOwnDraws(trials: readonly AbxTrial[]): boolean {
  return trials.every(({ answers }) => answers.length <= 1);
}

/**
 * ABX trials as the shared-presentation test reads them.
 *
 * A missing answer is wrong whichever label is drawn: it goes into the number of answers and into neither label's count.
 *
 * @param trials all locked trials
 * @returns counts for A and B, the draw, and the answers missing
 * @example sharedTrialsOf([{ session: 1, trial: 1, truth: 'B', answers: [{ listener: 'L01', choice: null }] }])
 *   // [{ counts: [0, 0], truth: 1, missing: 1 }]
 */
export function sharedTrialsOf(trials: readonly AbxTrial[]): SharedTrial[] {
  return trials.map(({ truth, answers }) => {
    const of = (choice: 'A' | 'B' | null) => answers.filter((answer) => answer.choice === choice).length;
    return { counts: [of('A'), of('B')], truth: truth === 'A' ? 0 : 1, missing: of(null) };
  });
}

/**
 * Refuses trials that cannot be right: the same trial twice, or the same listener twice in one trial.
 *
 * @param trials all locked trials
 * @throws RangeError naming the first trial at fault
 * @example requireDistinct([]) // nothing to refuse
 */
export function requireDistinct(trials: readonly AbxTrial[]): void {
  const seen = new Set<string>();
  for (const { session, trial, answers } of trials) {
    const name = `session ${session}, trial ${trial}`;
    if (seen.has(name)) throw new RangeError(`${name} comes twice`);
    seen.add(name);
    if (new Set(answers.map(({ listener }) => listener)).size < answers.length) {
      throw new RangeError(`${name} has two answers of one listener`);
    }
  }
}
