import type { Method } from '../methods/method.ts';
import { couldBeReadyAt, isLastStep } from './change-steps.ts';
import type { SessionPlan } from './events.ts';
import type { OpenTrial, SessionState } from './state.ts';
import { startGraceMs } from './state.ts';

// Questions that decide and the views both ask of a state.

export const voidsOf = (state: SessionState) => state.ended.filter((trial) => trial.outcome === 'void');

/** How many trials the session comes to: those registered, and one spare for each void while spares last. */
export function trialsInAll(state: SessionState): number {
  return state.plan.trials + Math.min(voidsOf(state).length, state.plan.spares);
}

/** The number of the trial to open next, or null when every one has ended. */
export function nextTrial(state: SessionState): number | null {
  const next = state.ended.length + 1;
  return next <= trialsInAll(state) ? next : null;
}

/** The excerpt of a trial, from 0: balanced over trial numbers; a spare uses the excerpt of the void it stands for. */
export function excerptOf(state: SessionState, trial: number): number {
  if (trial <= state.plan.trials) return Math.max(0, trial - 1) % state.plan.programme.length;
  const replaced = voidsOf(state)[trial - state.plan.trials - 1];
  if (replaced === undefined) throw new RangeError(`trial ${trial} stands for no void`);
  return replaced.excerpt;
}

/** The registered trial that a trial is or, as a spare, stands for. */
export function standsFor({ plan, ended }: Pick<SessionState, 'plan' | 'ended'>, trial: number): number {
  if (trial <= plan.trials) return trial;
  const replaced = ended.filter(({ outcome }) => outcome === 'void')[trial - plan.trials - 1];
  if (replaced === undefined) throw new RangeError(`trial ${trial} stands for no void`);
  return standsFor({ plan, ended }, replaced.trial);
}

export const activeSeats = (state: SessionState) => state.seats.filter((seat) => !seat.left);

/** Seats whose answer the open trial still waits for. */
export function openAnswers(state: SessionState, trial: OpenTrial): string[] {
  const here = new Set(activeSeats(state).map((seat) => seat.seat));
  const held = new Set(trial.answers.map((answer) => answer.seat));
  return trial.seats.filter((seat) => here.has(seat) && !held.has(seat));
}

export const presentationsOf = (method: Method, trial: number): readonly string[] =>
  trial === 0 ? method.familiarisation : method.presentations;

/** What is being fitted or heard, or null outside a trial's presentations. */
export function presentationNow({ trial }: SessionState, method: Method): string | null {
  if (trial === null || trial.stage === 'answering' || trial.stage === 'asking') return null;
  if (trial.requests.length > 0) return trial.requests[trial.presentation]?.label ?? null;
  const presentation = presentationsOf(method, trial.trial)[trial.presentation];
  if (presentation === undefined) throw new RangeError('a trial beyond its presentations');
  return presentation;
}
/** The answers that a session offers. */
export const optionsOf = ({ plan }: SessionState, method: Method) => method.options(plan);

/**
 * When listening may start: at the registered end of the change, or, when the cable was not ready by then or the start
 * was missed, at the end of the next whole length. Real and sham changes therefore last alike.
 */
export function listeningMayStartAt(trial: OpenTrial, plan: SessionPlan, now: number): number {
  const { changeMs } = plan;
  const readyAt = couldBeReadyAt(trial, plan, now);
  const lengths = Math.max(1, Math.ceil((readyAt - trial.changeStartedAt) / changeMs));
  let at = trial.changeStartedAt + lengths * changeMs;
  while (isLastStep(trial, plan) && now > at + startGraceMs(changeMs)) at += changeMs;
  return at;
}

/** When something is due without anybody acting: a window ends, an excerpt is over, a start was missed. Null when nothing is. */
export function dueAt(state: SessionState, now: number): number | null {
  if (state.phase === 'revealing') return state.revealEndsAt;
  if (state.paused !== null || state.trial === null) return null;
  if (state.trial.stage !== 'change') return state.trial.endsAt;
  return listeningMayStartAt(state.trial, state.plan, now) + startGraceMs(state.plan.changeMs) + 1;
}
