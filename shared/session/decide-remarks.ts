import { Problem } from '../problem.ts';
import type { PayloadOf, SessionEvent, SessionEventKind } from './events.ts';
import type { SessionState } from './state.ts';

export type RemarkKept = { kind: 'keep-remark'; seat: string; about: string; leaf: string };

type Emit = <K extends SessionEventKind>(kind: K, payload: Omit<PayloadOf<K>, 'session'>) => SessionEvent;

/** Whether this listener is asked the exit questions: after a trial of theirs, once they have left or the session is over. */
export function isAskedAtExit(state: SessionState, seat: string): boolean {
  const isOver = state.phase === 'finished' || state.phase === 'abandoned';
  const hasLeft = state.seats.some((own) => own.seat === seat && own.left);
  return (isOver || hasLeft) && state.ended.some(({ seats }) => seats.includes(seat));
}

/**
 * A listener's remark, once: a repeat of the same is harmless, another one in its place is refused.
 *
 * @throws Problem `wrong-phase` where nothing of the kind is asked, `already-taken` where something else was said before
 */
export function keepRemark(state: SessionState, { seat, about, leaf }: RemarkKept, emit: Emit): SessionEvent[] {
  const known = state.remarks.find((remark) => remark.seat === seat && remark.about === about);
  if (known?.leaf === leaf) return [];
  if (known !== undefined) throw new Problem('already-taken', 'This was answered before; the first answer stands.');
  if (about === 'exit') {
    if (!isAskedAtExit(state, seat)) throw new Problem('wrong-phase', 'These questions come after the last trial.');
  } else {
    const number = Number(about.slice('break/'.length));
    const isSeated = state.seats.some((own) => own.seat === seat && !own.left);
    if (!isSeated || number > state.blocks.breaks) throw new Problem('wrong-phase', 'That break has not come.');
  }
  return [emit('remark-kept', { seat, about, leaf })];
}
