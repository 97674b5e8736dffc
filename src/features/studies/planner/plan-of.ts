import { z } from 'zod';
import { studyDraft } from '#shared/contracts/studies.ts';
import { alphaText } from '#shared/protocol/protocol.ts';
import { type AbxPlanFigures, abxPlanFigures } from '#shared/statistics/abx-plan.ts';
import type { StudyFormValues } from '../form/study-form-values.ts';

const { sessions, trials, listenersPerSession, alphaPerMille, changeS, answerS, programme } = studyDraft.shape;

/** The part of a draft that decides how much listening there is; it is planned as soon as this part is sound. */
const listening = z.object({
  sessions,
  trials,
  listenersPerSession,
  alphaPerMille,
  changeS,
  answerS,
  programme: z.array(z.object({ lengthS: programme.element.shape.lengthS })).min(1),
});

export type Plan = {
  sessions: number;
  trialsPerSession: number;
  /** Over all sessions: what the registered test pools. */
  trials: number;
  listeners: number;
  alpha: number;
  figures: AbxPlanFigures;
  /** Over all sessions. */
  fittings: number;
  minutesPerSession: number;
  minutes: number;
};

/** As good practice has it: no more than twenty trials in a row, then ten minutes of rest. */
export const breaks = { everyTrials: 20, lengthMs: 600_000 };

/** What a draft comes to, or null while a figure that it takes is missing or out of range. */
export function planOf(values: Partial<StudyFormValues>): Plan | null {
  const parsed = listening.safeParse(values);
  if (!parsed.success) return null;
  const draft = parsed.data;
  const alpha = alphaText(draft.alphaPerMille);
  const figures = abxPlanFigures({
    sessions: draft.sessions,
    trials: draft.trials,
    alpha,
    listeners: draft.listenersPerSession,
    presentationsPerTrial: 3,
    changeMs: draft.changeS * 1000,
    listenMs: meanExcerptMs(draft.programme, draft.trials),
    answerMs: draft.answerS * 1000,
    resetMs: 0,
    breaks,
  });
  return {
    sessions: draft.sessions,
    trialsPerSession: draft.trials,
    trials: figures.trialsInAll,
    listeners: draft.listenersPerSession,
    alpha: Number(alpha),
    figures,
    fittings: draft.sessions * figures.session.fittings,
    minutesPerSession: figures.session.durationMinutes,
    minutes: draft.sessions * figures.session.durationMinutes,
  };
}

/** Trials take the excerpts in turn, so the first ones may come once more often than the last. */
function meanExcerptMs(excerpts: readonly { lengthS: number }[], trialCount: number): number {
  const sumS = Array.from({ length: trialCount }, (_, trial) => excerpts[trial % excerpts.length]?.lengthS ?? 0);
  return Math.round((sumS.reduce((sum, lengthS) => sum + lengthS, 0) * 1000) / trialCount);
}
