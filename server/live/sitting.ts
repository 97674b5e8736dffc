import type { HeldAnswer, ListenerCommand, ListenerView } from '#shared/contracts/listener-live.ts';
import type { ProctorCommand, ProctorView } from '#shared/contracts/proctor-live.ts';
import type { RemarkCommand } from '#shared/contracts/remarks.ts';
import { Problem } from '#shared/problem.ts';
import { decide, type SessionCommand } from '#shared/session/decide.ts';
import { takesAnswers } from '#shared/session/on-request.ts';
import { dueAt } from '#shared/session/progress.ts';
import type { Deps } from '../deps.ts';
import type { Seat } from '../features/sessions/seat.entity.ts';
import { tokenDigest } from '../features/sessions/seats.service.ts';
import type { Session } from '../features/sessions/session.entity.ts';
import { sessionById } from '../features/sessions/sessions.store.ts';
import { type AnswerCommand, answerRow, requireAnswerable, requireLate } from './answers.ts';
import { consoleViewOf, phoneViewOf } from './audience-views.ts';
import { databaseKeeper } from './database-keeper.ts';
import type { Keeper, Keeping, SeatLink } from './keeper.ts';
import { remarkRow } from './remarks.ts';
import { afterRequest, isHeldRequest, type RequestCommand, requestDecided, requestRow } from './requests.ts';
import { scanned } from './scanning.ts';
import { afterAnswer, afterEvents, heldOf, loadMemory, type SessionMemory } from './session-memory.ts';
import { Watchers } from './watchers.ts';

/** What means the same whatever has happened since the view it was sent on: a note, and a label held up. */
const anyTime: readonly ProctorCommand['kind'][] = ['record-deviation', 'scan-label'];

/** What an action comes to: a command, what to remember once it is kept, and what to answer. */
type Act<T> = {
  command: SessionCommand;
  /** What is kept beside the record, once the command is not refused. */
  alongside?: () => Promise<void>;
  stored?: () => void;
  result: T;
};

/**
 * One session while people sit in it: a queue in which one thing happens at a time. A command is parsed and authorised
 * before it comes here; here it is decided, stored in one transaction, and only then shown.
 */
export class Sitting {
  readonly #deps: Deps;
  readonly #keeper: Keeper;
  readonly #watchers: Watchers;
  #memory: SessionMemory;
  #queue: Promise<unknown> = Promise.resolve();
  #cancelTimer: () => void = () => {};
  #broken = false;

  constructor(deps: Deps, memory: SessionMemory, keeper: Keeper) {
    this.#deps = deps;
    this.#keeper = keeper;
    this.#memory = memory;
    this.#watchers = new Watchers(() => deps.clock.now(), memory.seats.keys());
    this.#schedule();
  }

  /** Reads a session back from the database; null when there is none. */
  static async load(deps: Deps, sessionId: string): Promise<Sitting | null> {
    const session = await sessionById(deps.db.manager, sessionId);
    return session === null ? null : new Sitting(deps, await loadMemory(deps, session), databaseKeeper(deps));
  }

  get memory(): SessionMemory {
    return this.#memory;
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
      if (!anyTime.includes(command.kind) && command.expectVersion !== this.#memory.state.version)
        throw new Problem('stale-view', 'The session has moved on; look at the screen and try again.');
      if (command.kind === 'open-seating') await this.#openSeating();
      else if (command.kind === 'scan-label') await this.#scan(command);
      else if (command.kind === 'end-inventory') {
        const codes = await this.#keeper.codes(this.#memory);
        await this.#do({ kind: 'note-inventory-end', codes, reason: command.reason });
      } else await this.#do(command);
    });
  }

  /** A wrong label is on the record before it is refused. */
  async #scan(command: Extract<ProctorCommand, { kind: 'scan-label' }>): Promise<void> {
    const { command: noted, refusal } = await scanned(this.#memory, this.#keeper, command);
    await this.#do(noted);
    if (refusal !== null) throw refusal;
  }

  fromPhone(seat: string, command: Exclude<ListenerCommand, AnswerCommand | RequestCommand>): Promise<void> {
    return this.#inTurn(() =>
      command.kind === 'exit' || command.kind === 'fatigue'
        ? this.#keepRemark(seat, command)
        : this.#do({ ...command, seat }),
    );
  }

  /** On request: keeps what was asked for beside the record and its leaf on it, and begins the change. */
  request(seat: string, command: RequestCommand): Promise<void> {
    return this.#inTurn(async () => {
      const row = requestRow(this.#memory, seat, command);
      if (isHeldRequest(this.#memory, row)) return;
      const stored = () => {
        this.#memory = afterRequest(this.#memory, row);
      };
      await this.#perform(async (keeping) => ({
        command: requestDecided(row),
        alongside: () => keeping.saveRequest(row),
        stored,
        result: undefined,
      }));
    });
  }

  /** Stores an answer durably, then acknowledges it. A repeat is acknowledged again; an older revision changes nothing. */
  answer(seat: string, command: AnswerCommand): Promise<HeldAnswer> {
    return this.#inTurn(async () => {
      requireAnswerable(this.#memory, seat, command);
      const { trial } = this.#memory.state;
      if (trial === null || trial.trial !== command.trial) return this.#takeLate(seat, command);
      if (!takesAnswers(trial, this.#memory.method))
        throw new Problem('too-early', 'Answers open after the last presentation.');
      const known = this.#memory.held.get(seat);
      if (known !== undefined && known.revision >= command.revision) return known;
      const row = answerRow(this.#memory, seat, command, { late: false, at: this.#deps.clock.now() });
      // What is answered in practice is kept nowhere.
      if (trial.practice === null) await this.#keeper.keep((keeping) => keeping.saveAnswer(row));
      this.#memory = afterAnswer(this.#memory, row);
      await this.#show();
      return heldOf(row);
    });
  }

  /** Takes a seat. Whoever comes by a personal link finds the seat again that they took by it before. */
  takeSeat(
    body: { place: string; commitment: string; consentVersion: number },
    link: SeatLink | null,
  ): Promise<{ token: string; seat: string }> {
    return this.#inTurn(async () => {
      const token = link?.seatToken ?? this.#deps.random.bytes('seat-token', 24).toString('base64url');
      const digest = tokenDigest(token);
      const own = [...this.#memory.seats.values()].find((seat) => seat.tokenDigest === digest);
      if (own !== undefined) return { token, seat: own.label };
      const { id: sessionId, studyId } = this.#memory.session;
      const { place, commitment, consentVersion } = body;
      const unlabelled = { id: this.#deps.random.id(), studyId, sessionId, place, tokenDigest: digest };
      const joinedBy = link === null ? 'code' : 'personal-link';
      const seat = await this.#perform(async (keeping) => {
        const added = await keeping.addSeat(unlabelled, link);
        const command = { kind: 'take-seat', seat: added.label, commitment, consentVersion, joinedBy } as const;
        return { command, stored: () => this.#seatTaken(added), result: added.label };
      });
      return { token, seat };
    });
  }

  /** Changes what is planned while seating has not opened; `store` keeps it. */
  replan(store: () => Promise<Session>): Promise<void> {
    return this.#inTurn(async () => {
      this.#requirePlanned('moved');
      this.#memory = { ...this.#memory, session: await store() };
      await this.#show();
    });
  }

  /** Ends the session before anybody was seated. */
  cancel(reason: string): Promise<void> {
    return this.#inTurn(async () => {
      this.#requirePlanned('cancelled');
      await this.#do({ kind: 'abandon', reason });
    });
  }

  /** Decided first, so that a refused remark never reaches its table. */
  #keepRemark(seat: string, command: RemarkCommand): Promise<void> {
    const row = remarkRow(this.#memory, seat, command);
    const kept = { kind: 'keep-remark', seat, about: row.about, leaf: row.leaf } as const;
    decide(this.#memory.state, kept, this.#deps.clock.now());
    return this.#perform(async (keeping) => {
      await keeping.saveRemark(row);
      return { command: kept, result: undefined };
    });
  }

  #requirePlanned(done: string): void {
    if (this.#memory.state.phase !== 'planned')
      throw new Problem('wrong-phase', `A session can be ${done} until its seating opens.`);
  }

  /** What somebody beside the console does, decided on the session as it then stands. */
  decideOn(make: (memory: SessionMemory) => Promise<SessionCommand>): Promise<void> {
    return this.#inTurn(async () => this.#do(await make(this.#memory)));
  }

  noteRestart(): Promise<void> {
    return this.#inTurn(() => this.#do({ kind: 'note-restart' }));
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
      () => consoleViewOf(this.#deps, this.#memory, this.#keeper, (seat) => this.#watchers.awaySince(seat)),
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

  #do(command: SessionCommand): Promise<void> {
    return this.#perform(async () => ({ command, result: undefined }));
  }

  /**
   * Decides, stores and shows. The act may keep things of its own and says what it comes to as a command; `stored` runs
   * once everything is kept.
   */
  async #perform<T>(act: (keeping: Keeping) => Promise<Act<T>>): Promise<T> {
    const { events, entries, stored, result } = await this.#keeper.keep(async (keeping) => {
      const { command, alongside, stored, result } = await act(keeping);
      const events = decide(this.#memory.state, command, this.#deps.clock.now());
      await alongside?.();
      const entries = events.length === 0 ? [] : await keeping.record(this.#memory, events);
      return { events, entries, stored, result };
    });
    const before = this.#memory;
    this.#memory = afterEvents(before, events, entries);
    if (events.some(({ kind }) => kind === 'practice-ended')) await this.#tell(before);
    stored?.();
    this.#schedule();
    await this.#show();
    return result;
  }

  /** After practice with feedback the phones are told what was right. */
  async #tell({ state, held }: SessionMemory): Promise<void> {
    const practice = state.trial?.practice ?? null;
    if (practice === null || practice.form !== 'feedback') return;
    const truth = await this.#keeper.truthPractised(this.#memory, practice);
    const choices = new Map([...held].map(([seat, { choice }]) => [seat, choice]));
    this.#memory = { ...this.#memory, told: { practice: practice.number, truth, choices } };
  }

  /** Reads the session back from the database, where something else has changed it. */
  readAfresh(): Promise<void> {
    return this.#inTurn(() => this.#reread());
  }

  async #reread(): Promise<void> {
    const session = await sessionById(this.#deps.db.manager, this.#memory.session.id);
    if (session === null) return;
    this.#memory = await loadMemory(this.#deps, session);
    await this.#show();
  }

  async #openSeating(): Promise<void> {
    try {
      await this.#commitAndOpen();
    } catch (error) {
      // Another process may have amended the protocol: the next attempt goes by the new plan.
      if (error instanceof Problem && error.code === 'stale-view') await this.#reread();
      throw error;
    }
  }

  #commitAndOpen(): Promise<void> {
    return this.#perform(async (keeping) => {
      const { commitment, code } = await keeping.openSeating(this.#memory);
      const stored = () => {
        this.#memory = { ...this.#memory, session: { ...this.#memory.session, code } };
      };
      return { command: { kind: 'open-seating', commitment }, stored, result: undefined };
    });
  }

  #seatTaken(seat: Seat): void {
    this.#memory = { ...this.#memory, seats: new Map(this.#memory.seats).set(seat.label, seat) };
    this.#watchers.seatTaken(seat.label);
  }

  /** Sees to what happens without anybody acting. */
  #schedule(): void {
    this.#cancelTimer();
    const at = dueAt(this.#memory.state, this.#deps.clock.now());
    if (at === null) return;
    this.#cancelTimer = this.#deps.clock.at(at, () => this.#later(() => this.#do({ kind: 'tick' })));
  }

  /** Records an answer to a trial that has locked without it, and tells the phone that it is not counted. */
  async #takeLate(seat: string, command: AnswerCommand): Promise<never> {
    requireLate(this.#memory.state, seat, command.trial);
    const row = answerRow(this.#memory, seat, command, { late: true, at: this.#deps.clock.now() });
    await this.#perform(async (keeping) => {
      await keeping.saveAnswer(row);
      const late = { kind: 'note-late-answer', seat, trial: command.trial, leaf: row.leaf } as const;
      return { command: late, result: undefined };
    });
    throw new Problem(
      'too-late',
      `Trial ${command.trial} had locked before this answer arrived. It is recorded as late and not counted.`,
    );
  }
}
