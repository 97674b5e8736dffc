import { Problem } from '../problem.ts';
import type { SessionEvent } from './events.ts';
import { nextTrial } from './progress.ts';
import type { SessionState } from './state.ts';

/** Where a session stands in its blocks. */
export type Blocks = {
  /** Trials locked since the block began. */
  readonly locked: number;
  /** When each block opened its first trial. */
  readonly began: readonly number[];
  readonly breaks: number;
  readonly lastEndedAt: number | null;
  readonly sittings: number;
};

export const noBlocks: Blocks = { locked: 0, began: [], breaks: 0, lastEndedAt: null, sittings: 1 };

/** Longer than this after the trial before, it is another sitting of the same session. */
export const sittingMs = 24 * 60 * 60_000;

/** Blocks that began within it count as one day's, in whichever time zone the room lies. */
export const dayMs = 18 * 60 * 60_000;

type Resting = Pick<SessionState, 'plan' | 'blocks' | 'paused' | 'trial'>;

/** Whether the block is over and trials remain, so that a break must come first. */
export function isBreakDue(state: SessionState): boolean {
  const { breaks } = state.plan;
  return (
    breaks !== undefined && state.trial === null && state.blocks.locked >= breaks.trials && nextTrial(state) !== null
  );
}

/** The break after a block that is on, or null: its number, and when it may end. */
export function breakNow({ plan, blocks, paused, trial }: Resting): { number: number; leastEndsAt: number } | null {
  const { breaks } = plan;
  if (breaks === undefined || paused?.reason !== 'break' || trial !== null || blocks.locked < breaks.trials)
    return null;
  return { number: blocks.breaks, leastEndsAt: paused.since + breaks.leastMinutes * 60_000 };
}

/** Why the session may not go on from its break yet, or null. */
export function whyRest(state: SessionState, now: number): string | null {
  const { breaks } = state.plan;
  const resting = breakNow(state);
  if (breaks === undefined || resting === null) return null;
  const today = state.blocks.began.filter((at) => at > now - dayMs).length;
  if (today >= breaks.blocksPerDay)
    return `The protocol registers at most ${breaks.blocksPerDay} blocks a day. Go on tomorrow, or go on and say why.`;
  if (now < resting.leastEndsAt)
    return `The break lasts ${breaks.leastMinutes} min at least. Wait, or go on and say why.`;
  return null;
}

/** @throws Problem while a block is over and its break has not been held */
export function requireBreak(state: SessionState): void {
  if (isBreakDue(state)) throw new Problem('wrong-phase', 'The block is over: the break comes first.');
}

/** Where the blocks stand after one more event; `before` is the state that the event came upon. */
export function blocksAfter(before: SessionState, event: SessionEvent): Blocks {
  const { blocks, plan } = before;
  switch (event.kind) {
    case 'trial-opened': {
      if (event.payload.trial === 0 || blocks.locked > 0) return blocks;
      // A void first trial is not another block.
      const isNew = blocks.began.length === 0 || blocks.breaks >= blocks.began.length;
      return isNew ? { ...blocks, began: [...blocks.began, event.at] } : blocks;
    }
    case 'trial-locked':
      return { ...blocks, locked: blocks.locked + 1, lastEndedAt: event.at };
    case 'trial-voided':
      return { ...blocks, lastEndedAt: event.at };
    case 'paused':
      return event.payload.reason === 'break' &&
        before.trial === null &&
        blocks.locked >= (plan.breaks?.trials ?? Infinity)
        ? { ...blocks, breaks: Math.max(blocks.breaks, blocks.began.length) }
        : blocks;
    case 'resumed':
      return breakNow(before) === null ? blocks : { ...blocks, locked: 0 };
    case 'sitting-began':
      return { ...blocks, sittings: event.payload.sitting };
    default:
      return blocks;
  }
}
