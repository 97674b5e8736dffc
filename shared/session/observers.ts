import { Problem } from '../problem.ts';
import type { PayloadOf, SessionEvent, SessionEventKind } from './events.ts';
import type { SessionState } from './state.ts';

/** Where a witness stands. Presence is that of their page, as the server's socket measures it. */
export type ObserverState = {
  readonly observer: string;
  readonly isHere: boolean;
  /** The trial that they have watched without a gap since it opened, or null. */
  readonly watching: number | null;
  readonly watched: readonly number[];
  readonly signed: { readonly duties: readonly string[] } | null;
};

export type ObserverSessionCommand =
  | { kind: 'observer-came'; observer: string }
  | { kind: 'observer-went'; observer: string }
  | { kind: 'observer-signed'; observer: string; remarks: string; name: string | null; duties: readonly string[] };

type Emit = <K extends SessionEventKind>(kind: K, payload: Omit<PayloadOf<K>, 'session'>) => SessionEvent;

const isOver = ({ phase }: SessionState) => phase === 'finished' || phase === 'abandoned';

const observerOf = ({ observers }: SessionState, label: string): ObserverState =>
  observers.find(({ observer }) => observer === label) ?? {
    observer: label,
    isHere: false,
    watching: null,
    watched: [],
    signed: null,
  };

export const watchedBy = (state: SessionState, label: string): readonly number[] => observerOf(state, label).watched;
export const hasSigned = (state: SessionState, label: string): boolean => observerOf(state, label).signed !== null;

/** Whether "I watched" can be signed: once the session is over, by whoever watched a trial, once. */
export function canSign(state: SessionState, label: string): boolean {
  return isOver(state) && watchedBy(state, label).length > 0 && !hasSigned(state, label);
}

/** @throws Problem `wrong-phase` where there is nothing to sign */
export function decideObserver(state: SessionState, command: ObserverSessionCommand, emit: Emit): SessionEvent[] {
  const { observer } = command;
  const { isHere, watched } = observerOf(state, observer);
  if (command.kind === 'observer-came') return !isOver(state) && !isHere ? [emit('observer-came', { observer })] : [];
  if (command.kind === 'observer-went') return !isOver(state) && isHere ? [emit('observer-went', { observer })] : [];
  if (!canSign(state, observer))
    throw new Problem(
      'wrong-phase',
      hasSigned(state, observer)
        ? 'You have signed already.'
        : 'You can sign once the session is over and you have watched a trial of it from its opening to its end.',
    );
  const { remarks, name, duties } = command;
  return [emit('observer-signed', { observer, watched: [...watched], remarks, name, duties: [...duties] })];
}

/** The observers after one more event. */
export function observersAfter(before: SessionState, event: SessionEvent): readonly ObserverState[] {
  const change = (label: string, part: Partial<ObserverState>) => [
    ...before.observers.filter(({ observer }) => observer !== label),
    { ...observerOf(before, label), ...part },
  ];
  switch (event.kind) {
    case 'observer-came':
      return change(event.payload.observer, { isHere: true });
    case 'observer-went':
      return change(event.payload.observer, { isHere: false, watching: null });
    case 'observer-signed':
      return change(event.payload.observer, { signed: { duties: event.payload.duties } });
    case 'server-restarted':
      return before.observers.map((own) => ({ ...own, isHere: false, watching: null }));
    case 'trial-opened': {
      const { trial } = event.payload;
      return before.observers.map((own) => ({ ...own, watching: own.isHere && trial > 0 ? trial : null }));
    }
    case 'trial-locked':
    case 'trial-voided':
      return before.observers.map((own) =>
        own.watching === null ? own : { ...own, watching: null, watched: [...own.watched, own.watching] },
      );
    default:
      return before.observers;
  }
}

const lockedOf = ({ ended }: SessionState) =>
  ended.filter(({ outcome }) => outcome === 'locked').map(({ trial }) => trial);

/** Why a session was not witnessed, or null where it was: somebody without another duty watched every counted trial and signed. */
function whyUnwitnessed(state: SessionState): string | null {
  const signed = state.observers.filter((own) => own.signed !== null);
  if (signed.length === 0) return `nobody signed that they watched session ${state.session}`;
  const free = signed.filter((own) => own.signed?.duties.length === 0);
  const [doubled] = signed;
  if (free.length === 0)
    return `${doubled?.observer} in session ${state.session} has another duty (${doubled?.signed?.duties.join(', ')}) and is no witness`;
  const locked = lockedOf(state);
  if (free.some(({ watched }) => locked.every((trial) => watched.includes(trial)))) return null;
  return `not every counted trial of session ${state.session} was watched`;
}

/**
 * Whether a study was witnessed, with what follows from it in a sentence: in every session with a counted trial an observer
 * without another duty watched all of them and signed it.
 */
export function witnessOf(sessions: readonly SessionState[]): { isWitnessed: boolean; words: string } {
  const ran = sessions.filter((state) => lockedOf(state).length > 0);
  if (ran.every(({ observers }) => observers.every(({ signed }) => signed === null)))
    return { isWitnessed: false, words: 'No observer was recorded.' };
  const reasons = ran.flatMap((state) => whyUnwitnessed(state) ?? []);
  const [first] = reasons;
  return first === undefined
    ? {
        isWitnessed: true,
        words: 'Witnessed: an observer without another duty watched every counted trial and signed it.',
      }
    : { isWitnessed: false, words: `Not witnessed: ${first}.` };
}
