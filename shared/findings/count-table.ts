import type { Interval } from '../statistics/clopper-pearson.ts';

/** What a study's count will be read against, told before there is one; each answer has a draw of its own. */
export interface CountTable {
  /** What is counted: "Right". */
  readonly counted: string;
  /** What the effect is a share of, and which limits stand beside it: "Above guessing (one-sided limits)". */
  readonly effect: string;
  rows(plan: CountPlan): CountRow[];
}

export interface CountPlan {
  /** Over all sessions, whole, at least 1. */
  readonly trials: number;
  readonly alpha: number;
  /** The registered margin as a share, or null. */
  readonly margin: number | null;
}

/** Consecutive counts that come to the same. */
export interface CountRow {
  readonly from: number;
  readonly to: number;
  /** The exact p of the first and of the last of them. */
  readonly p: readonly [number, number];
  /** The finding in a word or two. */
  readonly finding: string;
  /** The effect at the first and at the last, 0 ... 1. */
  readonly share: readonly [number, number];
  /** The lower limit of the first and the upper limit of the last: the duals of the tests, so that both agree. */
  readonly limits: Interval;
  readonly maySay: string;
}
