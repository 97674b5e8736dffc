import type { Method } from '../methods/method.ts';
import { methodOf } from '../methods/methods.ts';
import { Problem } from '../problem.ts';
import type { PayloadOf } from './events.ts';
import { activeSeats, openAnswers } from './progress.ts';
import type { OpenTrial, SessionState } from './state.ts';

// A single listener, on request: in a trial the listener asks for what is presented. What was asked for is no event: the
// record carries a salted leaf of it, and the label lies beside it until closing, as answers do. Whoever could read
// labels beside codes would hold the key.

export type RequestCommand = {
  readonly kind: 'request-presentation';
  readonly seat: string;
  readonly trial: number;
  /** The place of the presentation in its trial, from 0. */
  readonly presentation: number;
  readonly label: string;
  readonly leaf: string;
};

/** Whether a trial goes by what its listener asks for; the familiarisation never does. */
export const isOnRequest = ({ plan }: Pick<SessionState, 'plan'>, trial: number): boolean =>
  plan.onRequest !== undefined && trial > 0;

/** Whether the trial waits for its listeners: for a request, or for answers. */
export const waitsForListeners = ({ stage }: Pick<OpenTrial, 'stage'>): boolean =>
  stage === 'asking' || stage === 'answering';

/** How many more presentations the open trial has. */
export const requestsLeft = ({ plan }: SessionState, trial: OpenTrial): number =>
  Math.max(0, (plan.onRequest?.most ?? 0) - trial.requests.length);

/** The labels of the method that were not asked for yet. */
export function unheardOf(trial: OpenTrial, method: Method): string[] {
  const asked = new Set(trial.requests.map(({ label }) => label));
  return method.presentations.filter((label) => !asked.has(label));
}

/** Whether a label can be asked for now: one that was heard must leave room for those that were not. */
export function canRequest(state: SessionState, trial: OpenTrial, method: Method, label: string): boolean {
  const unheard = unheardOf(trial, method);
  if (!method.presentations.includes(label) || trial.answers.length > 0) return false;
  return requestsLeft(state, trial) > (unheard.includes(label) ? 0 : unheard.length);
}

/** Whether the open trial takes answers now: on request, once everything was heard at least once. */
export function takesAnswers(trial: OpenTrial, method: Method): boolean {
  return trial.stage === 'answering' || (trial.stage === 'asking' && unheardOf(trial, method).length === 0);
}

/**
 * What a request comes to: its entry, or nothing when it is the same request again.
 *
 * @throws Problem when nothing can be asked for now, or not this
 */
export function request(
  state: SessionState,
  trial: OpenTrial,
  { seat, presentation, label, leaf, ...command }: RequestCommand,
): Omit<PayloadOf<'presentation-requested'>, 'session'> | null {
  const refuse = (detail: string) => new Problem('wrong-phase', detail);
  if (command.trial !== trial.trial || !isOnRequest(state, trial.trial)) throw refuse('There is nothing to ask for.');
  if (!trial.seats.includes(seat) || !activeSeats(state).some((active) => active.seat === seat))
    throw refuse('You do not take part in this trial.');
  const known = trial.requests[presentation];
  if (known?.leaf === leaf) return null;
  if (state.paused !== null) throw refuse('The session is paused. Ask once it goes on.');
  if (trial.stage !== 'asking') throw refuse('Ask again once this presentation is over.');
  if (openAnswers(state, trial).length === 0)
    throw refuse('Your answer is held. You can change it until the trial locks.');
  if (presentation !== trial.requests.length)
    throw new Problem('stale-view', 'The trial has moved on; look at the screen and ask again.');
  const method = methodOf(state.plan.method);
  if (!method.presentations.includes(label))
    throw new Problem('invalid-input', `Ask for ${method.presentations.join(', ')}.`);
  if (requestsLeft(state, trial) === 0) throw refuse('That was the last presentation of this trial. Answer now.');
  if (!canRequest(state, trial, method, label))
    throw refuse(`What is left of this trial is for ${unheardOf(trial, method).join(' and ')}.`);
  return { trial: trial.trial, presentation, seat, leaf };
}

/** The state with the label of a request, which is a row beside the record and no part of its event. */
export function holdRequest(state: SessionState, presentation: number, label: string): SessionState {
  const { trial } = state;
  if (trial === null) throw new RangeError('no trial is open');
  const requests = trial.requests.map((asked, index) => (index === presentation ? { ...asked, label } : asked));
  return { ...state, trial: { ...trial, requests } };
}
