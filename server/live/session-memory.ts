import type { HeldAnswer } from '#shared/contracts/listener-live.ts';
import type { Entry } from '#shared/ledger/chain.ts';
import type { Method } from '#shared/methods/method.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { readSessionEvent, type SessionEvent, sessionEvents } from '#shared/session/events.ts';
import { evolve, holdAnswer } from '#shared/session/evolve.ts';
import { holdRequest } from '#shared/session/on-request.ts';
import type { SessionState } from '#shared/session/state.ts';
import { withTransaction } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import type { Answer } from '../features/sessions/answer.entity.ts';
import { requestsInTrial } from '../features/sessions/requests.store.ts';
import type { Seat } from '../features/sessions/seat.entity.ts';
import type { Session } from '../features/sessions/session.entity.ts';
import * as store from '../features/sessions/sessions.store.ts';
import { studyById } from '../features/studies/studies.store.ts';
import { readSessionEntries } from '../ledger/ledger.ts';

/** The last trial that locked, with the leaves that phones keep as receipts. */
export type Lock = { sequence: number; digest: string; trial: number; leaves: ReadonlyMap<string, string> };

/** What was right in a practice trial, and what each seat had answered. Kept nowhere else. */
export type Told = {
  readonly practice: number;
  readonly truth: string;
  readonly choices: ReadonlyMap<string, string>;
};

/** What the server holds in memory of a session: nothing that its keeper does not hold too. */
export type SessionMemory = {
  readonly session: Session;
  readonly title: string;
  /** A rehearsal is on no record and leaves nothing behind. */
  readonly isRehearsal: boolean;
  readonly method: Method;
  readonly state: SessionState;
  /** Entries of the study's record so far. */
  readonly entries: number;
  readonly lock: Lock | null;
  /** The open trial's answers, by seat. */
  readonly held: ReadonlyMap<string, HeldAnswer>;
  readonly seats: ReadonlyMap<string, Seat>;
  /** The practice trial that has just ended and tells what was right; null once the next trial opens. */
  readonly told: Told | null;
};

export const heldOf = ({ trial, choice, confidence, revision, leaf, heldAt }: Answer): HeldAnswer => ({
  trial,
  choice,
  confidence: confidence as HeldAnswer['confidence'],
  revision,
  leaf,
  heldAt: heldAt.getTime(),
});

function lockOf(entry: Entry): Lock | null {
  if (entry.kind !== 'trial-locked') return null;
  const { trial, leaves } = sessionEvents['trial-locked'].parse(entry.payload);
  return {
    sequence: entry.sequence,
    digest: entry.digest,
    trial,
    leaves: new Map(leaves.map(({ seat, leaf }) => [seat, leaf])),
  };
}

/** The memory after events that the database has taken. */
export function afterEvents(
  memory: SessionMemory,
  events: readonly SessionEvent[],
  entries: readonly Entry[],
): SessionMemory {
  const state = events.reduce((before, event) => evolve(before, event, memory.method), memory.state);
  const isOtherTrial = state.trial?.trial !== memory.state.trial?.trial;
  return {
    ...memory,
    state,
    entries: entries.at(-1)?.sequence ?? memory.entries,
    lock: entries.reduce<Lock | null>((lock, entry) => lockOf(entry) ?? lock, memory.lock),
    held: isOtherTrial ? new Map() : memory.held,
    told: isOtherTrial ? null : memory.told,
  };
}

/** The memory after an answer that the database has taken. */
export function afterAnswer(memory: SessionMemory, row: Answer): SessionMemory {
  const held = heldOf(row);
  return {
    ...memory,
    state: holdAnswer(memory.state, row.seat, row.leaf),
    held: new Map(memory.held).set(row.seat, held),
  };
}

/** Reads a session back: the replay of its entries, and the answers of the open trial. */
export async function loadMemory({ db }: Deps, session: Session): Promise<SessionMemory> {
  return withTransaction(db, async (tx) => {
    const study = await studyById(tx, session.studyId);
    const method = methodOf(study.draft.method);
    const entries = await readSessionEntries(tx, study.id, session.number);
    const events = entries.flatMap((entry) => readSessionEvent(entry.kind, entry.at, entry.payload) ?? []);
    const replayed = events.reduce<SessionState | null>((state, event) => evolve(state, event, method), null);
    if (replayed === null) throw new Error(`session ${session.id} is not on the record`);
    const rows = replayed.trial === null ? [] : await store.answersToTrial(tx, session.id, replayed.trial.trial);
    const asked = replayed.trial === null ? [] : await requestsInTrial(tx, session.id, replayed.trial.trial);
    const seats = await store.seatsOf(tx, session.id);
    return {
      session,
      title: study.title,
      isRehearsal: false,
      method,
      state: asked.reduce(
        (state, { presentation, label }) => holdRequest(state, presentation, label),
        rows.reduce((state, { seat, leaf }) => holdAnswer(state, seat, leaf), replayed),
      ),
      entries: study.headSequence,
      lock: entries.reduce<Lock | null>((lock, entry) => lockOf(entry) ?? lock, null),
      held: new Map(rows.map((row) => [row.seat, heldOf(row)])),
      seats: new Map(seats.map((seat) => [seat.label, seat])),
      told: null,
    };
  });
}
