import type { SharedTrial } from '../statistics/shared-presentation-test.ts';

/** One answer that was due: `choice` is one of the question's labels, or null when it did not come. */
export interface ForcedChoiceAnswer {
  readonly listener: string;
  readonly choice: string | null;
}

/** One locked trial with the answers of every seat that was present. */
export interface ForcedChoiceTrial {
  readonly session: number;
  readonly trial: number;
  /** The label that the draw made right. */
  readonly right: string;
  readonly answers: readonly ForcedChoiceAnswer[];
}

/**
 * Trials of a forced choice as the shared-presentation test reads them.
 *
 * A missing answer is wrong whichever label is drawn: it goes into the number of answers and into no label's count.
 *
 * @param trials all locked trials
 * @param labels the answers among which one is right
 * @returns counts per label, the draw, and the answers missing
 * @throws RangeError for an answer or a draw that is none of the labels
 * @example sharedTrialsOf([{ session: 1, trial: 1, right: 'B', answers: [{ listener: 'L01', choice: null }] }], ['A', 'B'])
 *   // [{ counts: [0, 0], truth: 1, missing: 1 }]
 */
export function sharedTrialsOf(trials: readonly ForcedChoiceTrial[], labels: readonly string[]): SharedTrial[] {
  const placeOf = (label: string) => {
    const place = labels.indexOf(label);
    if (place < 0) throw new RangeError(`${label} is none of ${labels.join(', ')}`);
    return place;
  };
  return trials.map(({ right, answers }) => {
    const counts = labels.map(() => 0);
    for (const { choice } of answers) {
      if (choice === null) continue;
      const place = placeOf(choice);
      counts[place] = (counts[place] ?? 0) + 1;
    }
    return { counts, truth: placeOf(right), missing: answers.filter(({ choice }) => choice === null).length };
  });
}
