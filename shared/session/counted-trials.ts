import type { Method, ScoredTrial } from '../methods/method.ts';
import type { CodeKeyRow } from './commitments.ts';
import { drawOf, kindOf, truthOf } from './fitting.ts';
import type { RevealedKey } from './revealed-key.ts';
import type { SessionState } from './state.ts';
import type { TrialKind } from './trial-kinds.ts';

/** The revealed contributions of a session, in the order in which the record lists them. */
export function contributionsOf(state: SessionState): string[] {
  return state.seats.flatMap((seat) => (seat.contributes && seat.revealed !== null ? [seat.revealed] : []));
}

/** The draw of a session that ran: a pure function of what closing revealed and of the record. */
export function revealedDraw(state: SessionState, method: Method, secret: string, rows: readonly CodeKeyRow[]) {
  return drawOf({ secret, contributions: contributionsOf(state), method, plan: state.plan, rows });
}

export type HeldChoice = {
  readonly session: string;
  readonly trial: number;
  readonly seat: string;
  readonly choice: string;
};

export type LockedTrial = ScoredTrial & { readonly kind: TrialKind; readonly excerpt: number };

/**
 * Every locked trial of every session, abandoned ones included, with what it was, its truth and its answers. A listener
 * who was seated at a trial and gave no answer stands in it with null.
 */
export function lockedTrials(
  method: Method,
  states: readonly SessionState[],
  key: RevealedKey,
  held: readonly HeldChoice[],
): LockedTrial[] {
  const choices = new Map(held.map(({ session, trial, seat, choice }) => [`${session} ${trial} ${seat}`, choice]));
  const secrets = new Map(key.draws.map(({ session, secret }) => [session, secret]));
  return states.flatMap((state) => {
    const secret = secrets.get(state.session);
    const locked = state.ended.filter((trial) => trial.outcome === 'locked');
    if (secret === undefined || locked.length === 0) return [];
    const draw = revealedDraw(state, method, secret, key.codeKey.rows);
    return locked.map(({ trial, seats, excerpt }) => ({
      session: state.session,
      trial,
      excerpt,
      kind: kindOf(draw, state, trial),
      truth: truthOf(draw, trial),
      answers: seats.map((listener) => ({
        listener,
        choice: choices.get(`${state.sessionId} ${trial} ${listener}`) ?? null,
      })),
    }));
  });
}

/** The locked main trials: what the registered analysis reads. */
export function countedTrials(...record: Parameters<typeof lockedTrials>): LockedTrial[] {
  return lockedTrials(...record).filter(({ kind }) => kind === 'main');
}
