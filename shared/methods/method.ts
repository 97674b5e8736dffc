import type { RegisteredResult } from '../findings/registered-result.ts';

/** One answered or missing question as a registered test reads it. `choice` is null for a missing answer. */
export type ScoredAnswer = { readonly listener: string; readonly choice: string | null };
export type ScoredTrial = {
  readonly session: number;
  readonly trial: number;
  readonly truth: string;
  readonly answers: readonly ScoredAnswer[];
};

/**
 * A method of comparison: one module each, all of this shape. The live session, the phone, the planner and the
 * report ask the module and know no method by name.
 */
export type Method = {
  readonly id: string;
  readonly name: string;
  /** What a listener is told the test is, in one or two sentences. */
  readonly explanation: string;
  /** The labels of the two sides; which cable bears the first is drawn per session. */
  readonly sides: readonly [string, string];
  /** What a trial's truth can be; drawn fairly and independently for every trial. */
  readonly truths: readonly string[];
  /** What each presentation is called, in order. */
  readonly presentations: readonly string[];
  /** What the familiarisation trial presents, labelled. */
  readonly familiarisation: readonly string[];
  /** Which side is fitted for a presentation of a trial with that truth. */
  fittedSide(presentation: string, truth: string): string;
  readonly question: string;
  readonly options: readonly { readonly value: string; readonly letter: string; readonly sentence: string }[];
  isRight(choice: string, truth: string): boolean;
  /** Chance of a right answer when nothing is heard, as a fraction. */
  readonly chance: { readonly numerator: number; readonly denominator: number };
  /** The registered analysis: a pure function of the counted trials. `alpha` is a decimal text such as '0.05'. */
  analyse(
    plan: { readonly alpha: string; readonly listenersPerSession: number },
    trials: readonly ScoredTrial[],
  ): RegisteredResult;
  /** Where the registered count falls when nothing is heard: the test's own distribution. */
  nullDistribution(trials: readonly ScoredTrial[]): { count: number; chance: number }[];
  readonly source: string;
};
