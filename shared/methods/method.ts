import type { CountTable } from '../findings/count-table.ts';
import type { Finding, FindingContext } from '../findings/finding.ts';
import type { DecidingRule } from '../findings/forced-choice.ts';
import type { DueAnswer } from '../findings/rate-limits.ts';
import type { ResultFrame } from '../findings/result-frame.ts';
import type { RegisteredAnalysis } from '../protocol/registered-analysis.ts';
import type { PlannedTest } from '../statistics/planned-test.ts';
import type { RegisteredResult } from './methods.ts';
import type { Portrait } from './portrait.ts';

/** One answered or missing question as a registered test reads it. `choice` is null for a missing answer. */
export type ScoredAnswer = { readonly listener: string; readonly choice: string | null };
export type ScoredTrial = {
  readonly session: number;
  readonly trial: number;
  readonly truth: string;
  readonly answers: readonly ScoredAnswer[];
};

/** One of the protocol's two cables, in its order. */
export type CablePlace = 0 | 1;
export type CableNames = readonly [string, string];

/** What a study chooses about its method, as it stands in the draft, in the protocol and in a session's plan. */
export type MethodChoices = {
  /** The settings that are on. */
  readonly methodSettings?: readonly string[] | undefined;
  /** Of what one cable is asked to have more, where the method asks for an attribute. */
  readonly attribute?: string | undefined;
  /** What a result that finds nothing must be able to exclude, in whole per cent. */
  readonly marginPercent?: number | undefined;
};

/** What a study may register so that finding nothing can say something: how large an effect it then excludes. */
export type MarginOffer = {
  /** Of the field: "Above guessing, less than". */
  readonly label: string;
  readonly mostPercent: number;
  /** What such a study can show: "that less than 20 % of answers are above guessing". */
  shows(percent: number): string;
  /** What is counted towards it. */
  readonly counts: 'trials' | 'listeners';
  /** What a count at most so large shows it by: "at most 9 right". */
  most(count: number, of: number): string;
};

/** Something about the method that a study fixes with a yes or a no; the protocol lists those that are on. */
export type MethodSetting = { readonly id: string; readonly label: string; readonly hint: string };

export type AnswerOption = {
  /** What stands in the record. */
  readonly value: string;
  /** A large sign before the sentence, where the listener knows one. */
  readonly letter?: string;
  readonly sentence: string;
  /** How the answer is named on a button and in a sentence: "A", "the first". */
  readonly short: string;
};

/** What the planner says in the method's words; figures are put in by the planner. */
export type PlanWords = {
  /** What the planner is asked to find, before a rate: "Find listeners who are right"; and what the rate is of: "Right". */
  readonly aim: { readonly label: string; readonly rate: string };
  /** What a test could have found: "a listener who is right 70 % of the time". */
  couldFind(rate: number): string;
  /** What is left open by a study, every answer with a draw of its own, that comes out as if there were nothing. */
  leftOpen(trials: number, alpha: number): string;
  /** What each count would mean where a count alone decides, or null. */
  readonly counts: CountTable | null;
  /** "12 right" */
  needed(count: number): string;
  /** What follows the number needed and its verb: "are needed. If nobody hears a difference," */
  readonly underNull: string;
  /** Why no number can be fixed beforehand even for one listener, or null where one can. */
  readonly unfixed: string | null;
  /** What such a test finds: "a difference". */
  readonly found: string;
  /** A rate at which the test is asked for its power: "60 % right". */
  atRate(rate: number): string;
  /** The counted answers: "right answers". */
  readonly counted: string;
  /** Of one trial, under guessing, before the percentage; null where nothing of the kind is counted. */
  readonly guessing: string | null;
  /** Even the most extreme count is out of reach: "even with every answer right". */
  readonly extreme: string;
  /** Before the percentage of a small effect that is easily missed. */
  readonly smallEffect: string;
  /** What a result that found nothing does not show. */
  readonly notShown: string;
  /** What the study's choices do to the plan. */
  caution(choices: MethodChoices): { readonly title: string; readonly words: string } | null;
};

/** A rate of answers that a method can be counted by: "Right", "Hits". */
export type AnswerRate = {
  readonly label: string;
  /** The answers of a trial that belong in the rate, and which of them count; none where the trial does not bear on it. */
  due(trial: ScoredTrial): DueAnswer[];
};

/** How the trials of a session stand in a report. */
export type TrialWords = {
  /** Said once above every session. */
  readonly legend: string;
  /** The draw of a session in words, once it is open: "A was ..., B was ...". */
  session(firstSide: CablePlace, cables: CableNames): string;
  readonly drawnHeader: string;
  drawn(truth: string, cables: CableNames): string;
  answeredHeader(option: AnswerOption): string;
  /** Whether an answer is right; null for a method without right answers. */
  readonly isRight: ((choice: string, truth: string) => boolean) | null;
  /** The answer that goes with a truth: the right one, or the place of the first cable where none is right. */
  answerFor(truth: string): string;
  /** What a truth came to, after "when": "X was A". */
  when(answer: string, cables: CableNames): string;
  /** What the presentation is that such an answer names: "the odd one". Null where answers name none. */
  named(cables: CableNames): string | null;
  countHeader(cables: CableNames): string;
  count(answers: readonly ScoredAnswer[], truth: string): string;
  /** By which rates any part of the trials is counted, such as those of one excerpt. */
  rates(cables: CableNames): readonly AnswerRate[];
};

/** How a trial is fitted from two specimens of each cable, so that no code comes twice in it. */
export type SeparateSpecimens = {
  /** What has specimens of its own, for the study form: "X". */
  readonly what: string;
  /** What whoever fits could still infer from the codes of the whole study: sentences for the blinding rung. */
  readonly stillSeen: string;
  /** In how many equally likely ways the specimens of a trial are dealt, beside its truth. */
  readonly deals: number;
  /** Which of its cable's two specimens is fitted for a presentation; `deal` counts from 0. */
  specimen(presentation: string, truth: string | null, deal: number): 0 | 1;
};

/** How a single listener may ask for what is presented, in the method's words. */
export type OnRequestWords = {
  /** What the listener is told the test is. */
  readonly explanation: string;
  /** Said while they listen. */
  readonly announcement: string;
  /** What whoever fits could still learn when specimens are not separate, and when they are: for the blinding rung. */
  readonly fitterCouldSee: string;
  readonly stillSeen: string;
};

/**
 * A method of comparison: one module each, all of this shape. The live session, the phone, the planner and the
 * report ask the module and know no method by name.
 */
export type Method<R extends ResultFrame = RegisteredResult> = {
  readonly id: string;
  readonly name: string;
  /** What a listener is told the test is, in one or two sentences. */
  readonly explanation: string;
  readonly settings: readonly MethodSetting[];
  /** How a study is asked for an attribute, or null where the method needs none. */
  readonly attribute: {
    readonly label: string;
    readonly hint: string;
    /** What the protocol's first cable is called where it is chosen and shown: the order is the direction. */
    readonly firstCable: string;
  } | null;
  /** The margin that a study may register, or null where the method has no scale for one. */
  readonly margin: MarginOffer | null;

  // How a trial is drawn and presented.

  /** What a trial's truth can be; drawn fairly and independently for every trial. */
  readonly truths: readonly string[];
  /** What each presentation is called, in order. */
  readonly presentations: readonly string[];
  /** What the familiarisation trial presents. */
  readonly familiarisation: readonly string[];
  /**
   * Which of the protocol's cables is fitted for a presentation. `truth` is the trial's, null in the familiarisation
   * trial; `firstSide` is drawn once per session, 0 or 1 with equal chance.
   */
  fitted(presentation: string, truth: string | null, firstSide: CablePlace): CablePlace;
  /** What whoever fits the cables could still learn from their codes: a sentence for the blinding rung. */
  readonly fitterCouldSee: string;
  /** Null where no code comes twice in a trial anyway: then there is nothing of the kind to hide. */
  readonly separate: SeparateSpecimens | null;
  /** Null where presentations come in a fixed order always. */
  readonly onRequest: OnRequestWords | null;

  // What the listener is asked.

  /** A presentation in a sentence: "You are hearing ...". */
  spoken(presentation: string): string;
  question(choices: MethodChoices): string;
  /** Said during the last presentation. */
  readonly announcement: string;
  options(choices: MethodChoices): readonly AnswerOption[];

  // How answers are scored.

  /** Why a known difference cannot be scored by this method and these choices, in a sentence; null where it can. */
  takesNoSteps(choices: MethodChoices): string | null;

  /** The part of the registered analysis that the method fixes. */
  registered(
    choices: MethodChoices,
  ): Pick<RegisteredAnalysis, 'name' | 'alternative' | 'missing' | 'undecided' | 'direction' | 'margin'>;
  /** The same test as the planner asks it, with one answer per trial. */
  readonly planned: PlannedTest;
  /** By which rules a rate is read as d′, the first one stated first; none where nothing is to be heard. */
  readonly sensitivity: readonly DecidingRule[];
  /** The registered analysis: a pure function of the sealed value and the counted trials. */
  analyse(
    plan: {
      readonly analysis: RegisteredAnalysis;
      readonly listenersPerSession: number;
      readonly attribute?: string | undefined;
      readonly samplingFrame?: string | undefined;
    },
    trials: readonly ScoredTrial[],
  ): R;
  /** Where the registered count falls when nothing is heard: the test's own distribution. */
  nullDistribution(trials: readonly ScoredTrial[]): { count: number; chance: number }[];
  finding(result: R, context: FindingContext): Finding;

  // How it is told.

  readonly plan: PlanWords;
  readonly trials: TrialWords;
  portray(result: R, cables: CableNames): Portrait;
  readonly source: string;
};
