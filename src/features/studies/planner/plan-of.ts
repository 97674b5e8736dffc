import { z } from 'zod';
import { checkStepDraft } from '#shared/contracts/check-draft.ts';
import { studyDraft } from '#shared/contracts/studies.ts';
import type { Method, MethodChoices } from '#shared/methods/method.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { alphaText } from '#shared/protocol/protocol.ts';
import { checkTrialsIn } from '#shared/session/trial-kinds.ts';
import { correctRateOf } from '#shared/statistics/above-guessing.ts';
import { type PlanFigures, planFigures } from '#shared/statistics/plan-figures.ts';
import type { StudyFormValues } from '../form/study-form-values.ts';

const {
  method,
  methodSettings,
  attribute,
  marginPercent,
  sessions,
  trials,
  listenersPerSession,
  alphaPerMille,
  changeS,
  answerS,
  programme,
  breaks: registered,
  onRequest,
} = studyDraft.shape;

/** How many check trials there are; which cables they need does not bear on the time. */
const checkCounts = z.object({
  steps: z.array(z.object({ trials: checkStepDraft.shape.trials })),
  same: z.int().min(0),
});

/** The part of a draft that decides how much listening there is; it is planned as soon as this part is sound. */
const listening = z.object({
  method,
  methodSettings,
  attribute,
  marginPercent: marginPercent.catch(undefined),
  sessions,
  trials,
  listenersPerSession,
  alphaPerMille,
  changeS,
  answerS,
  onRequest: onRequest.catch(undefined),
  programme: z.array(z.object({ lengthS: programme.element.shape.lengthS })).min(1),
  breaks: registered.catch(undefined),
  checks: checkCounts.optional().catch(undefined),
});

export type Plan = {
  method: Method;
  choices: MethodChoices;
  /** Whether the level stands for one side or for both together. */
  alternative: 'greater' | 'two-sided';
  sessions: number;
  /** Check trials included. */
  trialsPerSession: number;
  /** Of each session. */
  checkTrials: number;
  /** Over all sessions: what the registered test pools. */
  trials: number;
  listeners: number;
  alpha: number;
  figures: PlanFigures;
  /** Over all sessions. */
  fittings: number;
  /** Whether fittings and time are the most that they can be: on request listeners may ask for less. */
  isAtMost: boolean;
  minutesPerSession: number;
  minutes: number;
};

/** As good practice has it: no more than twenty trials in a row, then ten minutes of rest. */
export const breaks = { everyTrials: 20, lengthMs: 600_000 };

/** The rate at which a share of answers lies above guessing. */
export function rateOf({ planned }: Method, share: number): number {
  return correctRateOf(share, planned.guessing);
}

/** The margin that is spoken of while none is registered. */
export const exampleMargin = 20;

/** The registered margin, or the example. */
export const spokenMargin = ({ marginPercent }: MethodChoices) => marginPercent ?? exampleMargin;

/** What a draft comes to, or null while a figure that it takes is missing or out of range. */
export function planOf(values: Partial<StudyFormValues>): Plan | null {
  const parsed = listening.safeParse(values);
  if (!parsed.success) return null;
  const draft = parsed.data;
  const alpha = alphaText(draft.alphaPerMille);
  const chosen = methodOf(draft.method);
  const choices = { ...draft, marginPercent: soundMargin(chosen, draft.marginPercent) };
  const { alternative } = chosen.registered(choices);
  const checkTrials = checkTrialsIn(
    draft.checks && { steps: draft.checks.steps.map(({ trials: own }) => own), same: draft.checks.same },
  );
  const asked = chosen.onRequest === null ? undefined : draft.onRequest;
  const figures = planFigures({
    sessions: draft.sessions,
    trials: draft.trials,
    checkTrials,
    alpha,
    test: chosen.planned,
    listeners: draft.listenersPerSession,
    presentationsPerTrial: asked?.most ?? chosen.presentations.length,
    changeMs: draft.changeS * 1000,
    listenMs: meanExcerptMs(draft.programme, draft.trials + checkTrials),
    answerMs: draft.answerS * 1000,
    resetMs: 0,
    breaks:
      draft.breaks === undefined
        ? breaks
        : { everyTrials: draft.breaks.trials, lengthMs: draft.breaks.leastMinutes * 60_000 },
  });
  return {
    method: chosen,
    choices,
    alternative,
    sessions: draft.sessions,
    trialsPerSession: draft.trials + checkTrials,
    checkTrials,
    trials: figures.trialsInAll,
    listeners: draft.listenersPerSession,
    alpha: Number(alpha),
    figures,
    isAtMost: asked !== undefined,
    fittings: draft.sessions * figures.session.fittings,
    minutesPerSession: figures.session.durationMinutes,
    minutes: draft.sessions * figures.session.durationMinutes,
  };
}

/** With fewer trials of a step over all sessions, no answers could show that it was heard. */
export function fewestForStep({ method: { planned }, alpha }: Plan): number {
  for (let trials = 1; ; trials += 1)
    if (Number(planned.leastPDenominator(trials)) * alpha >= 1 - 1e-9 || trials >= 100) return trials;
}

/** A margin that the method does not take is a fault of its field; the plan goes on without it. */
function soundMargin({ margin }: Method, percent: number | undefined): number | undefined {
  return margin === null || percent === undefined || percent > margin.mostPercent ? undefined : percent;
}

/** Trials take the excerpts in turn, so the first ones may come once more often than the last. */
function meanExcerptMs(excerpts: readonly { lengthS: number }[], trialCount: number): number {
  const sumS = Array.from({ length: trialCount }, (_, trial) => excerpts[trial % excerpts.length]?.lengthS ?? 0);
  return Math.round((sumS.reduce((sum, lengthS) => sum + lengthS, 0) * 1000) / trialCount);
}
