import type { SharedTrial } from '../statistics/shared-presentation-test.ts';

/** 'first' and 'second' are places in the trial; 'none' states no preference; null did not come. */
export type PreferenceChoice = 'first' | 'second' | 'none' | null;

export interface PreferenceAnswer {
  readonly listener: string;
  readonly choice: PreferenceChoice;
}

/** One locked trial of a pair with the answers of every seat that was present. */
export interface PreferenceTrial {
  readonly session: number;
  readonly trial: number;
  /** The draw: the place at which the protocol's first cable was heard. */
  readonly truth: 'first' | 'second';
  readonly answers: readonly PreferenceAnswer[];
}

/**
 * The cable that an answer preferred, 0 or 1 in the protocol's order.
 *
 * @param truth  the place at which the protocol's first cable was heard
 * @param choice the answer
 * @returns null for an answer that preferred none or did not come
 * @example preferredCable('second', 'second') // 0: what was heard second was the protocol's first cable
 */
export function preferredCable(truth: PreferenceTrial['truth'], choice: PreferenceChoice): 0 | 1 | null {
  if (choice === null || choice === 'none') return null;
  return choice === truth ? 0 : 1;
}

/**
 * Trials of a pair as the shared-presentation test reads them: the draw says which place the first cable had, and
 * the answers for that place are its matches. Answers without a preference and missing ones are in no count.
 *
 * @param trials all locked trials
 * @returns counts for the first and the second place, and the draw
 * @example preferenceSharedTrials([{ session: 1, trial: 1, truth: 'second', answers: [{ listener: 'L01', choice: 'second' }] }])
 *   // [{ counts: [0, 1], truth: 1, missing: 0 }]
 */
export function preferenceSharedTrials(trials: readonly PreferenceTrial[]): SharedTrial[] {
  return trials.map(({ truth, answers }) => {
    const of = (choice: PreferenceChoice) => answers.filter((answer) => answer.choice === choice).length;
    return { counts: [of('first'), of('second')], truth: truth === 'first' ? 0 : 1, missing: 0 };
  });
}
