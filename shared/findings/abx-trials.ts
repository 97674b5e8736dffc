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
