import type { ListenerView } from '../contracts/listener-live.ts';
import type { ProctorView } from '../contracts/proctor-live.ts';
import type { Method } from '../methods/method.ts';
import { breakNow, isBreakDue, whyRest } from './blocks.ts';
import { isAskedAtExit } from './decide-remarks.ts';
import { activeSeats } from './progress.ts';
import type { SessionState } from './state.ts';

const heldBy = (state: SessionState, seat: string, about: string): string | null =>
  state.remarks.find((remark) => remark.seat === seat && remark.about === about)?.leaf ?? null;

/** What listeners are asked to guess: each label that stands for one cable all through a session, else the two cables. */
export function questionsAtExit(method: Method): string[] {
  const named = method.familiarisation.filter((label) => method.presentations.includes(label));
  const isFixed = named.every((label) =>
    [0, 1].every(
      (side) => new Set(method.truths.map((truth) => method.fitted(label, truth, side as 0 | 1))).size === 1,
    ),
  );
  return isFixed && named.length > 0
    ? named.map((label) => `What do you think ${label} was?`)
    : ['Which two cables do you think they were?'];
}

/** The exit questions as one phone is asked them, or null while they are not. */
export function exitFor(state: SessionState, method: Method, seat: string): ListenerView['exit'] {
  return isAskedAtExit(state, seat) ? { guesses: questionsAtExit(method), held: heldBy(state, seat, 'exit') } : null;
}

/** The break after a block as a phone shows it, or null. */
export function breakFor(state: SessionState, seat: string): ListenerView['break'] {
  const now = breakNow(state);
  return now === null ? null : { ...now, held: heldBy(state, seat, `break/${now.number}`) };
}

/** Block and break as the console shows them: how many said how they feel, never what. */
export function blockFor(state: SessionState, now: number): ProctorView['block'] {
  const { breaks } = state.plan;
  if (breaks === undefined) return null;
  const on = breakNow(state);
  const said = state.remarks.filter(({ about }) => about === `break/${on?.number}`).length;
  return {
    trials: breaks.trials,
    locked: state.blocks.locked,
    isBreakDue: isBreakDue(state),
    break: on === null ? null : { ...on, why: whyRest(state, now) ?? '', said, of: activeSeats(state).length },
  };
}

/** How many answered the exit questions; null before anybody is asked. */
export function exitsFor(state: SessionState): ProctorView['exit'] {
  const asked = state.seats.filter(({ seat }) => isAskedAtExit(state, seat));
  if (asked.length === 0) return null;
  return { said: state.remarks.filter(({ about }) => about === 'exit').length, of: asked.length };
}
