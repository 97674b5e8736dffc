import type { HeldAnswer, ListenerCommand, ListenerView } from '#shared/contracts/listener-live.ts';
import type { ProctorCommand, ProctorView } from '#shared/contracts/proctor-live.ts';
import type { Entry } from '#shared/ledger/chain.ts';
import { Problem } from '#shared/problem.ts';
import { decide, type SessionCommand } from '#shared/session/decide.ts';
import type { SessionEvent } from '#shared/session/events.ts';
import { dueAt } from '#shared/session/progress.ts';
import { commitDraw } from '../blind/index.ts';
import { type Tx, withTransaction } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import type { Seat } from '../features/sessions/seat.entity.ts';
import { tokenDigest } from '../features/sessions/seats.service.ts';
import * as store from '../features/sessions/sessions.store.ts';
import { lockStudyRow, studyById, updateStudy } from '../features/studies/studies.store.ts';
import { append } from '../ledger/ledger.ts';
import { type AnswerCommand, answerRow, requireAnswerable, requireLate } from './answers.ts';
import { consoleViewOf, phoneViewOf } from './audience-views.ts';
import { newSessionCode } from './join.ts';
import { afterAnswer, afterEvents, heldOf, loadMemory, type SessionMemory } from './session-memory.ts';
import { Watchers } from './watchers.ts';

/**
 * One session while people sit in it: a queue in which one thing happens at a time. A command is parsed and authorised
 * before it comes here; here it is decided, stored in one transaction, and only then shown.
 */
export class Sitting {
  readonly #deps: Deps;
  readonly #watchers: Watchers;
  #memory: SessionMemory;
  #queue: Promise<unknown> = Promise.resolve();
  #cancelTimer: () => void = () => {};
  #broken = false;

  private constructor(deps: Deps, memory: SessionMemory) {
    this.#deps = deps;
    this.#memory = memory;
    this.#watchers = new Watchers(() => deps.clock.now(), memory.seats.keys());
    this.#schedule();
  }

  /** Reads a session back from the database; null when there is none. */
  static async load(deps: Deps, sessionId: string): Promise<Sitting | null> {
    const session = await store.sessionById(deps.db.manager, sessionId);
    return session === null ? null : new Sitting(deps, await loadMemory(deps, session));
  }

  get proctorId(): string {
    return this.#memory.session.proctorId;
  }

  /** After a failure the memory may lag behind the database; whoever comes next reads the session afresh. */
  get isBroken(): boolean {
    return this.#broken;
  }

  /** Resolves once everything asked for so far has been done and shown. */
  async settled(): Promise<void> {
    await this.#queue;
  }

  stop(): void {
    this.#cancelTimer();
  }

  // --- What people do ---

  command(command: ProctorCommand): Promise<void> {
    return this.#inTurn(async () => {
      if (command.kind !== 'record-deviation' && command.expectVersion !== this.#memory.state.version)
        throw new Problem('stale-view', 'The session has moved on; look at the screen and try again.');
      if (command.kind === 'open-seating') await this.#openSeating();
      else await this.#perform(command);
    });
  }

  fromPhone(seat: string, command: Exclude<ListenerCommand, AnswerCommand>): Promise<void> {
    return this.#inTurn(() => this.#perform({ ...command, seat }));
  }

  /** Stores an answer durably, then acknowledges it. A repeat is acknowledged again; an older revision changes nothing. */
  answer(seat: string, command: AnswerCommand): Promise<HeldAnswer> {
    return this.#inTurn(async () => {
      requireAnswerable(this.#memory, seat, command);
      const { trial } = this.#memory.state;
      if (trial === null || trial.trial !== command.trial) return this.#takeLate(seat, command);
      if (trial.stage !== 'answering') throw new Problem('too-early', 'Answers open after the last presentation.');
      const known = this.#memory.held.get(seat);
      if (known !== undefined && known.revision >= command.revision) return known;
      const row = answerRow(this.#memory, seat, command, { late: false, at: this.#deps.clock.now() });
      await withTransaction(this.#deps.db, (tx) => store.saveAnswer(tx, row));
      this.#memory = afterAnswer(this.#memory, row);
      await this.#show();
      return heldOf(row);
    });
  }

  takeSeat(body: {
    place: string;
    commitment: string;
    consentVersion: number;
  }): Promise<{ token: string; seat: string }> {
    return this.#inTurn(async () => {
      const token = this.#deps.random.bytes('seat-token', 24).toString('base64url');
      const { id: sessionId, studyId } = this.#memory.session;
      const { place, commitment, consentVersion } = body;
      const seat: Seat = {
        id: this.#deps.random.id(),
        studyId,
        sessionId,
        label: '',
        place,
        tokenDigest: tokenDigest(token),
      };
      const seatDown = async (tx: Tx): Promise<SessionCommand> => {
        await lockStudyRow(tx, studyId);
        seat.label = `L${String((await store.countSeatsOfStudy(tx, studyId)) + 1).padStart(2, '0')}`;
        await store.insertSeat(tx, seat);
        return { kind: 'take-seat', seat: seat.label, commitment, consentVersion };
      };
      await this.#perform(seatDown, () => {
        this.#memory = { ...this.#memory, seats: new Map(this.#memory.seats).set(seat.label, seat) };
        this.#watchers.seatTaken(seat.label);
      });
      return { token, seat: seat.label };
    });
  }

  noteRestart(): Promise<void> {
    return this.#inTurn(() => this.#perform({ kind: 'note-restart' }));
  }

  // --- Who watches ---

  connectPhone(seat: string, push: (view: ListenerView) => void): () => void {
    return this.#watchers.addPhone(seat, push, () => this.#later(() => this.#show()));
  }

  connectConsole(push: (view: ProctorView) => void): () => void {
    const disconnect = this.#watchers.addConsole(push);
    this.#later(() => this.#show());
    return disconnect;
  }

  async #show(): Promise<void> {
    await this.#watchers.show(
      (seat) => phoneViewOf(this.#memory, seat, this.#deps.clock.now()),
      () => consoleViewOf(this.#deps, this.#memory, (seat) => this.#watchers.awaySince(seat)),
    );
  }

  // --- One thing at a time ---

  #inTurn<T>(work: () => Promise<T>): Promise<T> {
    const turn = this.#queue.then(work).catch((error) => {
      if (!(error instanceof Problem)) this.#broken = true;
      throw error;
    });
    this.#queue = turn.then(
      () => undefined,
      () => undefined,
    );
    return turn;
  }

  #later(work: () => Promise<void>): void {
    this.#inTurn(work).catch((error) => this.#deps.log.error({ err: error }, 'a session could not be shown'));
  }

  /**
   * Decides, stores and shows. A function makes the command inside the transaction, when it needs rows of its own;
   * `stored` runs once the transaction has committed.
   */
  async #perform(
    given: SessionCommand | ((tx: Tx) => Promise<SessionCommand>),
    stored: () => void = () => {},
  ): Promise<void> {
    const { events, entries } = await withTransaction(this.#deps.db, async (tx) => {
      const command = typeof given === 'function' ? await given(tx) : given;
      const events = decide(this.#memory.state, command, this.#deps.clock.now());
      return { events, entries: await this.#record(tx, events) };
    });
    this.#memory = afterEvents(this.#memory, events, entries);
    stored();
    this.#schedule();
    await this.#show();
  }

  async #openSeating(): Promise<void> {
    const { session, state } = this.#memory;
    let code: string | null = null;
    const open = async (tx: Tx): Promise<SessionCommand> => {
      const study = await studyById(tx, session.studyId);
      if (study.codesState !== 'confirmed')
        throw new Problem(
          'wrong-phase',
          'The code holder has not confirmed the sleeves yet. Seating opens after that.',
        );
      if (state.phase !== 'planned') throw new Problem('wrong-phase', 'Seating is open already.');
      const commitment = await commitDraw(tx, this.#deps.random, session.id);
      code = await newSessionCode(tx, this.#deps.random);
      await store.updateSession(tx, session.id, { code });
      await updateStudy(tx, study.id, { state: 'collecting' }, new Date(this.#deps.clock.now()));
      return { kind: 'open-seating', commitment };
    };
    await this.#perform(open, () => {
      this.#memory = { ...this.#memory, session: { ...session, code } };
    });
  }

  /** Puts events on the record and keeps the columns that lists read. */
  async #record(tx: Tx, events: readonly SessionEvent[]): Promise<Entry[]> {
    if (events.length === 0) return [];
    const { studyId, id, number } = this.#memory.session;
    const entries = await append(
      tx,
      this.#deps.random,
      studyId,
      events.map(({ kind, at, payload }) => ({ kind, at, payload, session: number })),
    );
    const next = afterEvents(this.#memory, events, entries).state;
    const isOver = next.phase === 'finished' || next.phase === 'abandoned';
    await store.updateSession(tx, id, {
      phase: next.phase,
      ...(isOver ? { code: null } : {}),
      trialsLocked: next.ended.filter(({ outcome }) => outcome === 'locked').length,
      listeners: next.seats.length,
    });
    return entries;
  }

  /** Sees to what happens without anybody acting. */
  #schedule(): void {
    this.#cancelTimer();
    const at = dueAt(this.#memory.state, this.#deps.clock.now());
    if (at === null) return;
    this.#cancelTimer = this.#deps.clock.at(at, () => this.#later(() => this.#perform({ kind: 'tick' })));
  }

  /** Records an answer to a trial that has locked without it, and tells the phone that it is not counted. */
  async #takeLate(seat: string, command: AnswerCommand): Promise<never> {
    requireLate(this.#memory.state, seat, command.trial);
    const row = answerRow(this.#memory, seat, command, { late: true, at: this.#deps.clock.now() });
    await this.#perform(async (tx) => {
      await store.saveAnswer(tx, row);
      return { kind: 'note-late-answer', seat, trial: command.trial, leaf: row.leaf };
    });
    throw new Problem(
      'too-late',
      `Trial ${command.trial} had locked before this answer arrived. It is recorded as late and not counted.`,
    );
  }
}
