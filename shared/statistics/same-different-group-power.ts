import { assignmentTest } from './assignment-test.ts';
import { requireBetween, requireWhole } from './domain.ts';
import { fractionToNumber } from './fraction.ts';

export interface SameDifferentGroup {
  /** Who answer each trial, whole, 1 ... 1000. */
  readonly listeners: number;
  /** Counted trials of all sessions, whole, 1 ... 1000. */
  readonly trials: number;
  /** Rate of hits, strictly between 0 and 1; false alarms at 1 - rate, each answer on its own. */
  readonly rate: number;
  /** One-sided level, strictly between 0 and 1. */
  readonly alpha: number;
}

/**
 * How many of so many simulated group studies of same-different reach the level in the registered test over assignments.
 *
 * @param plan    what is simulated
 * @param studies how many, whole, at least 1
 * @param uniform numbers from 0 up to 1, evenly spread; the same source from the same seed gives the same answer
 * @returns how many reached the level
 * @throws RangeError when a value is outside the domain stated beside it
 * @example with 1 listener, 16 trials, rate 0.8 and level 0.05 about 60 of 100, which is the exact power of one listener
 * @see assignmentTest, and groupFindings for methods with one right answer
 */
export function sameDifferentGroupFindings(plan: SameDifferentGroup, studies: number, uniform: () => number): number {
  const { listeners, trials, rate, alpha } = plan;
  requireWhole('listeners', listeners, 1, 1000);
  requireWhole('trials', trials, 1, 1000);
  requireWhole('studies', studies, 1, Number.MAX_SAFE_INTEGER);
  requireBetween('rate', rate, 0, 1, 'open');
  requireBetween('alpha', alpha, 0, 1, 'open');
  let found = 0;
  for (let study = 0; study < studies; study += 1) {
    const simulated = Array.from({ length: trials }, () => {
      const isDifferent = uniform() < 0.5;
      let different = 0;
      for (let listener = 0; listener < listeners; listener += 1)
        if (uniform() < (isDifferent ? rate : 1 - rate)) different += 1;
      return { different, isDifferent };
    });
    if (fractionToNumber(assignmentTest(simulated).upperTail) <= alpha) found += 1;
  }
  return found;
}
