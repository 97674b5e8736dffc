import { chanceAsNumbers } from './chance.ts';
import type { CriticalCount } from './critical-count.ts';
import { parseDecimal } from './decimal.ts';
import { requireBetween, requireWhole } from './domain.ts';
import { compareFractions, fractionToNumber } from './fraction.ts';
import type { PlannedTest } from './planned-test.ts';

export interface StudyPlan {
  /** Sittings, whole, 1 ... 100; the registered test pools their trials. */
  readonly sessions: number;
  /** Counted trials of one session, whole, 1 ... 1000. */
  readonly trials: number;
  /** Check trials of one session, 0 ... 1000: they take time and stand in no test of the question. */
  readonly checkTrials?: number;
  /** Level as a decimal, strictly between 0 and 1: "0.05". */
  readonly alpha: string;
  /** The registered test with one answer per trial. */
  readonly test: PlannedTest;
  /** Listeners who answer each trial of a session, whole, 1 ... 1000. */
  readonly listeners: number;
  /** Cables fitted and heard per trial, 1 ... 10: three in ABX (A, B and X), two in a pair. */
  readonly presentationsPerTrial: number;
  /** Registered length of every change of cable, real or sham, in milliseconds. */
  readonly changeMs: number;
  /** Length of each presentation. */
  readonly listenMs: number;
  /** Answer window at the end of each trial. */
  readonly answerMs: number;
  /** Rest between a trial's answer window and the next trial; 0 where the next change follows at once. */
  readonly resetMs: number;
  /** A break after every so many trials, or null for none. None is taken after the last trial. */
  readonly breaks: { readonly everyTrials: number; readonly lengthMs: number } | null;
}

export interface PlanFigures {
  /** Chance of an answer on the counted side by guessing; null where nothing of the kind is counted. */
  readonly chance: number | null;
  /** Trials of all sessions: one draw each. */
  readonly trialsInAll: number;
  /** What one answer per trial must reach over all sessions; null when out of reach. */
  readonly critical: CriticalCount | null;
  /** False when several listeners share the presentations: then no fixed number of right answers can be promised. */
  readonly isCriticalCountBinding: boolean;
  /** No test of this many trials gives a smaller p, however many listen: one in `leastPDenominator`. */
  readonly leastAttainableP: number;
  readonly leastPDenominator: bigint;
  readonly canReachAlpha: boolean;
  readonly session: SessionFigures;
}

/** What one session takes. */
export interface SessionFigures {
  /** Cables to be fitted: those of every trial, and both once for familiarisation. */
  readonly fittings: number;
  readonly familiarisationMs: number;
  readonly trialMs: number;
  readonly breaksMs: number;
  readonly durationMs: number;
  /** The whole sitting, rounded up to the minute. */
  readonly durationMinutes: number;
}

/** Familiarisation fits both cables once each; it does not count. */
const familiarisationPresentations = 2;

/**
 * What a plan can show and what it takes, before it is sealed.
 *
 * @param plan sessions, trials, level, listeners and the lengths of a trial's parts, in milliseconds
 * @returns the figures the planner shows; lengths in milliseconds unless the name says minutes
 * @throws RangeError when a value is outside the domain stated beside it
 * @example planFigures({ sessions: 1, trials: 16, alpha: '0.05', test: oneSidedPlan(evenChance), listeners: 1,
 *   presentationsPerTrial: 3, changeMs: 30_000, listenMs: 20_000, answerMs: 15_000, resetMs: 0, breaks: null })
 *   // critical 12 (size 0.0384), 50 fittings, 165 s a trial,
 *   // 16 * 165 s = 44 min and 100 s for familiarisation: 46 min ; R: pbinom(11, 16, .5, lower.tail = FALSE)
 * @see criticalCount for the test and its sources; fittings and minutes are plain sums
 */
export function planFigures(plan: StudyPlan): PlanFigures {
  requirePlan(plan);
  const trialsInAll = plan.sessions * plan.trials;
  const exactAlpha = parseDecimal(plan.alpha);
  const alpha = fractionToNumber(exactAlpha);
  const { test } = plan;
  const leastPDenominator = test.leastPDenominator(trialsInAll);
  const leastP = { numerator: 1n, denominator: leastPDenominator };
  return {
    chance: test.chance === null ? null : chanceAsNumbers(test.chance).right,
    trialsInAll,
    critical: test.critical(trialsInAll, alpha),
    isCriticalCountBinding: plan.listeners === 1,
    leastAttainableP: fractionToNumber(leastP),
    leastPDenominator,
    canReachAlpha: compareFractions(leastP, exactAlpha) <= 0,
    session: sessionFigures(plan),
  };
}

function sessionFigures({ checkTrials = 0, ...planned }: StudyPlan): SessionFigures {
  const plan = { ...planned, trials: planned.trials + checkTrials };
  const presentationMs = plan.changeMs + plan.listenMs;
  const familiarisationMs = familiarisationPresentations * presentationMs;
  const trialMs = plan.presentationsPerTrial * presentationMs + plan.answerMs;
  const resetsMs = (plan.trials - 1) * plan.resetMs;
  const breaksMs =
    plan.breaks === null ? 0 : Math.floor((plan.trials - 1) / plan.breaks.everyTrials) * plan.breaks.lengthMs;
  const durationMs = familiarisationMs + plan.trials * trialMs + resetsMs + breaksMs;
  return {
    fittings: plan.trials * plan.presentationsPerTrial + familiarisationPresentations,
    familiarisationMs,
    trialMs,
    breaksMs,
    durationMs,
    durationMinutes: Math.ceil(durationMs / 60_000),
  };
}

function requirePlan(plan: StudyPlan): void {
  requireWhole('sessions', plan.sessions, 1, 100);
  requireWhole('trials', plan.trials, 1, 1000);
  requireWhole('checkTrials', plan.checkTrials ?? 0, 0, 1000);
  requireWhole('listeners', plan.listeners, 1, 1000);
  requireWhole('presentationsPerTrial', plan.presentationsPerTrial, 1, 10);
  requireBetween('alpha', fractionToNumber(parseDecimal(plan.alpha)), 0, 1, 'open');
  for (const name of ['changeMs', 'listenMs', 'answerMs', 'resetMs'] as const)
    requireWhole(name, plan[name], 0, 3_600_000);
  if (plan.breaks === null) return;
  requireWhole('everyTrials', plan.breaks.everyTrials, 1, 1000);
  requireWhole('lengthMs', plan.breaks.lengthMs, 0, 86_400_000);
}
