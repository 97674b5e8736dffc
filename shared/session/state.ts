import type { ChangeStep, VoidReason } from '../contracts/proctor-live.ts';
import type { SoundLevel } from '../exposure/sound-level.ts';
import type { Blocks } from './blocks.ts';
import type { SessionPlan } from './events.ts';
import type { LabelEnd } from './label-text.ts';
import type { LevelStanding } from './level-progress.ts';
import type { Practice } from './practice.ts';

// The state of a session has no cable, no draw and no correctness, and no code but those that an inventory read off the
// sleeves after the last trial: nothing in it needs stripping.

export type SeatState = {
  readonly seat: string;
  readonly commitment: string;
  readonly contributes: boolean;
  /** By a personal link, so that the label is known to stand for one and the same person. */
  readonly isLinked: boolean;
  /** The phone's revealed 32 bytes, once they are in. */
  readonly revealed: string | null;
  readonly left: boolean;
};

export type OpenTrial = {
  /** From 1; 0 is the familiarisation trial, below 0 are practice trials. */
  readonly trial: number;
  /** What is practised, or null in any other trial. */
  readonly practice: Practice | null;
  readonly excerpt: number;
  /** The listeners who take part: those seated when it opened. */
  readonly seats: readonly string[];
  /** From 0. */
  readonly presentation: number;
  /** On request *asking* is the listener's turn, to ask again or to answer; it has no other name once answers are open. */
  readonly stage: 'change' | 'listening' | 'asking' | 'answering';
  readonly changeStartedAt: number;
  readonly stepsDone: readonly ChangeStep[];
  /** Which ends of the cable now fitted bear its code. */
  readonly scannedEnds: readonly LabelEnd[];
  /** When the latest step was confirmed. */
  readonly readyAt: number;
  /** When listening, asking or answering ends; null during a change. */
  readonly endsAt: number | null;
  readonly longChanges: number;
  /** Leaves of the answers held so far; rows beside the record until the trial locks. */
  readonly answers: readonly { readonly seat: string; readonly leaf: string }[];
  /** On request what was asked for, in order; the label is a row beside the record, and null where only that is at hand. */
  readonly requests: readonly { readonly leaf: string; readonly label: string | null }[];
};

export type EndedTrial = {
  readonly trial: number;
  readonly outcome: 'locked' | 'void';
  readonly excerpt: number;
  readonly seats: readonly string[];
  readonly missing: readonly string[];
  readonly longChanges: number;
  readonly voidReason: VoidReason | null;
};

export type SessionState = {
  readonly session: number;
  readonly sessionId: string;
  readonly proctor: string;
  readonly plan: SessionPlan;
  /** The number of this session's events so far. */
  readonly version: number;
  readonly phase: 'planned' | 'seating' | 'revealing' | 'running' | 'finished' | 'abandoned';
  readonly cautionsConfirmed: boolean;
  readonly seats: readonly SeatState[];
  readonly revealEndsAt: number | null;
  /** How often the labelled cables have been heard through. */
  readonly familiarisations: number;
  /** The practice trials so far, in order. */
  readonly practised: readonly Practice[];
  readonly paused: {
    readonly reason: 'break' | 'too-loud' | 'trouble';
    readonly seat: string | null;
    readonly since: number;
    readonly remainingMs: number | null;
  } | null;
  readonly trial: OpenTrial | null;
  readonly ended: readonly EndedTrial[];
  /** Labels scanned at changes, changes confirmed by hand, wrong labels refused, steps taken back. */
  readonly scans: { readonly made: number; readonly byHand: number; readonly wrong: number; readonly undone: number };
  readonly inventory: {
    readonly found: readonly string[];
    readonly foreign: readonly string[];
    readonly ended: { readonly codes: number; readonly missing: readonly string[]; readonly reason: string } | null;
  };
  readonly late: readonly { readonly trial: number; readonly seat: string }[];
  /** How each measurement of levels came out, in order; never a figure. */
  readonly levels: readonly LevelStanding[];
  /** How loud it is at the listening position, as it was last recorded. */
  readonly sound: SoundLevel | null;
  readonly blocks: Blocks;
  /** Of what listeners said beside the trials, the leaves. */
  readonly remarks: readonly { readonly seat: string; readonly about: string; readonly leaf: string }[];
};

/** How long a phone may take to reveal its contribution before it is dropped. */
export const revealMs = 30_000;

/** How long after a change's registered end listening may still start; later it waits for the next whole length. */
export const startGraceMs = (changeMs: number): number => Math.min(4_000, Math.floor(changeMs / 2));
