import type { ObserverView } from '../contracts/observer-live.ts';
import type { Method } from '../methods/method.ts';
import { breakNow } from './blocks.ts';
import { stepKindsOf } from './change-steps.ts';
import { canSign, hasSigned, watchedBy } from './observers.ts';
import { presentationsOf, trialsInAll } from './progress.ts';
import type { SessionState } from './state.ts';
import { courseOf } from './views.ts';

export type ObserverContext = {
  readonly title: string;
  readonly observer: string;
  readonly name: string;
  readonly now: number;
};

function trialFor(state: SessionState, method: Method): ObserverView['trial'] {
  const { trial } = state;
  if (trial === null) return null;
  const presentations = presentationsOf(method, trial.trial);
  return {
    number: trial.trial,
    of: trialsInAll(state),
    familiarisation: trial.trial <= 0,
    stage: trial.stage,
    presentation: state.plan.onRequest === undefined ? (presentations[trial.presentation] ?? '') : '',
    presentationNumber: trial.presentation + 1,
    presentations: state.plan.onRequest?.most ?? presentations.length,
    steps: [...stepKindsOf(state.plan)],
    stepsDone: [...trial.stepsDone],
    stageSince: trial.stage === 'change' ? trial.changeStartedAt : trial.readyAt,
    endsAt: state.paused === null ? trial.endsAt : null,
  };
}

/** What an observer sees: built field by field, with nothing of codes, levels, the draw or an answer in it. */
export function observerViewOf(state: SessionState, method: Method, context: ObserverContext): ObserverView {
  const { title, observer, name, now } = context;
  const answered = new Set(state.trial?.answers.map(({ seat }) => seat));
  const { paused } = state;
  return {
    audience: 'observer',
    now,
    title,
    session: state.session,
    method: method.name,
    observer,
    name,
    phase: state.phase,
    paused:
      paused === null
        ? null
        : { reason: paused.reason, since: paused.since, leastEndsAt: breakNow(state)?.leastEndsAt ?? null },
    trial: trialFor(state, method),
    course: courseOf(state),
    seats: state.seats.map(({ seat, left }) => ({
      seat,
      state: left ? 'left' : answered.has(seat) ? 'answered' : 'here',
    })),
    watched: [...watchedBy(state, observer)],
    canSign: canSign(state, observer),
    signed: hasSigned(state, observer),
  };
}
