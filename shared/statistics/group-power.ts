import { requireBetween, requireWhole } from './domain.ts';
import type { SharedAlternative } from './shared-presentation-test.ts';

export interface GroupPlan {
  /** Who answer each trial, whole, 1 ... 1000. */
  readonly listeners: number;
  /** Counted trials of all sessions, whole, 1 ... 1000. */
  readonly trials: number;
  /** Labels that a trial's truth is drawn from, whole, 2 ... 10. */
  readonly labels: number;
  /** Chance that a listener's answer matches the truth, strictly between 0 and 1; the same and independent for each answer. */
  readonly rate: number;
  /** Level, strictly between 0 and 1. */
  readonly alpha: number;
  readonly alternative: SharedAlternative;
}

/**
 * How many of so many simulated group sessions reach the level in the registered test for shared presentations.
 *
 * A group's power has no formula: what counts as many depends on how alike the listeners answer. Each simulated study
 * draws every answer on its own and runs the test, its null distribution convolved in floating point. Listeners who
 * share a habit find less than this.
 *
 * @param plan    what is simulated
 * @param studies how many, whole, at least 1
 * @param uniform numbers from 0 up to 1, evenly spread; the same source from the same seed gives the same answer
 * @returns how many reached the level
 * @throws RangeError when a value is outside the domain stated beside it
 * @example with 6 listeners, 7 trials, 2 labels, rate 0.7 and level 0.05 about 61 of 100; 42 answers with draws of their
 *   own would find 84
 * @see sharedPresentationTest
 */
export function groupFindings(plan: GroupPlan, studies: number, uniform: () => number): number {
  const { listeners, trials, labels, rate, alpha } = plan;
  requireWhole('listeners', listeners, 1, 1000);
  requireWhole('trials', trials, 1, 1000);
  requireWhole('labels', labels, 2, 10);
  requireWhole('studies', studies, 1, Number.MAX_SAFE_INTEGER);
  requireBetween('rate', rate, 0, 1, 'open');
  requireBetween('alpha', alpha, 0, 1, 'open');
  let found = 0;
  for (let study = 0; study < studies; study += 1) {
    const counts = Array.from({ length: trials }, () => answersOf(plan, uniform));
    if (pOfShared(counts, plan.alternative) <= alpha) found += 1;
  }
  return found;
}

/** One trial's answers under each label. The truth is the first label: which one it is makes no difference to the test. */
function answersOf({ listeners, labels, rate }: GroupPlan, uniform: () => number): number[] {
  const counts = new Array<number>(labels).fill(0);
  for (let listener = 0; listener < listeners; listener += 1) {
    const isRight = uniform() < rate;
    const label = isRight ? 0 : 1 + Math.min(labels - 2, Math.floor(uniform() * (labels - 1)));
    counts[label] = (counts[label] ?? 0) + 1;
  }
  return counts;
}

/** Floating point adds chances in another order than whole numbers do: what is that close counts as equal. */
const tie = 1e-9;

/**
 * The p of the shared-presentation test in floating point, the truth of every trial being its first label.
 *
 * @param answers for each trial the answers under each label
 */
export function pOfShared(answers: readonly (readonly number[])[], alternative: SharedAlternative): number {
  // What every draw of a trial gives anyway moves all sums alike: without it there are fewer of them.
  const counts = answers.map((trial) => {
    const fewest = Math.min(...trial);
    return trial.map((count) => count - fewest);
  });
  const most = counts.reduce((sum, trial) => sum + Math.max(...trial), 0);
  let chances = new Float64Array(most + 1);
  chances[0] = 1;
  let reach = 0;
  let observed = 0;
  let mean = 0;
  for (const trial of counts) {
    const next = new Float64Array(most + 1);
    for (const count of trial)
      for (let sum = 0; sum <= reach; sum += 1)
        next[sum + count] = (next[sum + count] ?? 0) + (chances[sum] ?? 0) / trial.length;
    chances = next;
    reach += Math.max(...trial);
    observed += trial[0] ?? 0;
    mean += trial.reduce((sum, count) => sum + count, 0) / trial.length;
  }
  const isExtreme =
    alternative === 'greater'
      ? (sum: number) => sum >= observed
      : (sum: number) => Math.abs(sum - mean) >= Math.abs(observed - mean) - tie;
  let p = 0;
  for (let sum = 0; sum <= reach; sum += 1) if (isExtreme(sum)) p += chances[sum] ?? 0;
  return Math.min(1, p);
}
