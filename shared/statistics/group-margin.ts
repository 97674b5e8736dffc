import { clusterVariance, residual } from './cluster-variance.ts';
import { requireBetween, requireWhole } from './domain.ts';
import { studentTQuantile } from './student-t-quantile.ts';

export interface GroupMarginPlan {
  /** Who answer each trial, whole, 1 ... 1000. */
  readonly listeners: number;
  /** Counted trials of all sessions, whole, 2 ... 100000. */
  readonly trials: number;
  /** Chance of a right answer by guessing, strictly between 0 and 1: each answer falls so, on its own. */
  readonly guessing: number;
}

/** What lies below a margin is shown with this confidence on one side: the upper end of an interval of .90. */
const upperTail = 0.05;

/**
 * The one-sided upper limits of .95 for the rate of right answers that simulated groups of guessing listeners come to.
 *
 * A group has no fixed number of right answers that shows a margin: its limit is taken over trials, because answers to a
 * shared presentation are not independent. Each simulated study draws every answer on its own; listeners who share a habit
 * spread more, and leave more open. A study in which nothing varies has no limit and leaves everything open.
 *
 * @param plan    what is simulated
 * @param studies how many, whole, at least 1
 * @param uniform numbers from 0 up to 1, evenly spread; the same source from the same seed gives the same answer
 * @returns one limit for each study, 0 ... 1
 * @throws RangeError when a value is outside the domain stated beside it
 * @see trialClusterInterval at confidence .90, of which this is the upper end where every listener answers every trial
 */
export function groupUpperLimits(plan: GroupMarginPlan, studies: number, uniform: () => number): number[] {
  const { listeners, trials, guessing } = plan;
  requireWhole('listeners', listeners, 1, 1000);
  requireWhole('trials', trials, 2, 100_000);
  requireWhole('studies', studies, 1, Number.MAX_SAFE_INTEGER);
  requireBetween('guessing', guessing, 0, 1, 'open');
  const rightIn = () => {
    let right = 0;
    for (let listener = 0; listener < listeners; listener += 1) if (uniform() < guessing) right += 1;
    return right;
  };
  return Array.from({ length: studies }, () =>
    upperLimitOverTrials(Array.from({ length: trials }, rightIn), listeners),
  );
}

/**
 * The upper limit that a group's right answers come to, trial by trial.
 *
 * @param right     right answers of each trial, at least two trials
 * @param listeners who answered each of them
 * @returns the limit, at most 1; 1 where nothing varies
 * @example upperLimitOverTrials([3, 1, 2, 2], 3) // 2/3 + 2.3534 * 0.1361 = 0.9870 ; R: qt(.95, 3)
 */
export function upperLimitOverTrials(right: readonly number[], listeners: number): number {
  const answers = right.length * listeners;
  const allRight = right.reduce((sum, count) => sum + count, 0);
  const rate = allRight / answers;
  const variance = clusterVariance(
    right.map((count) => residual(count, listeners, allRight, answers)),
    answers,
  );
  if (variance === 0) return 1;
  return Math.min(1, rate + studentTQuantile(upperTail, right.length - 1) * Math.sqrt(variance));
}
