import type { Entry } from '#shared/ledger/chain.ts';
import type { SessionEvent } from '#shared/session/events.ts';
import type { Practice } from '#shared/session/practice.ts';
import type { Answer } from '../features/sessions/answer.entity.ts';
import type { Remark } from '../features/sessions/remark.entity.ts';
import type { PresentationRequest } from '../features/sessions/request.entity.ts';
import type { Seat } from '../features/sessions/seat.entity.ts';
import type { SessionMemory } from './session-memory.ts';

/** Whoever comes by a personal link: the listener of the study, their attendance, and the token that their seat gets. */
export type SeatLink = { readonly attendanceId: string; readonly listenerId: string; readonly seatToken: string };

/** What can be kept of a session within one action. */
export type Keeping = {
  /**
   * Commits to the draw's secret and takes a session code.
   * @throws Problem `wrong-phase` while the specimens are not coded
   */
  openSeating(memory: SessionMemory): Promise<{ commitment: string; code: string }>;
  /** Writes down a seat: under the label that a linked listener has in the study, or the next free one. */
  addSeat(seat: Omit<Seat, 'label'>, link: SeatLink | null): Promise<Seat>;
  saveAnswer(row: Answer): Promise<void>;
  /** @throws Problem `too-late` once the study is closed */
  saveRemark(row: Remark): Promise<void>;
  /** Keeps what was asked for, beside the record. */
  saveRequest(row: PresentationRequest): Promise<void>;
  /** Puts events on the record. */
  record(memory: SessionMemory, events: readonly SessionEvent[]): Promise<Entry[]>;
};

/** Where a session is kept: the database with the study's record, or the memory alone for a rehearsal. */
export type Keeper = {
  /** One action: everything in it is kept, or nothing. */
  keep<T>(work: (keeping: Keeping) => Promise<T>): Promise<T>;
  /** The blind code of the presentation that is being fitted or heard, for the proctor alone. */
  codeToFit(memory: SessionMemory): Promise<string | null>;
  /** What was right in a practice trial that has ended, for its phones. */
  truthPractised(memory: SessionMemory, practice: Practice): Promise<string>;
  /** Every code that the study's sleeves bear, in their order, and nothing of what they stand for. */
  codes(memory: SessionMemory): Promise<readonly string[]>;
  /** The neutral title of the organisation's study whose labels bear a mark; null when there is none. */
  titleOfMark(memory: SessionMemory, mark: string): Promise<string | null>;
};
