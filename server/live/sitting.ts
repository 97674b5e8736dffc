import type { HeldAnswer, ListenerCommand, ListenerView, LockReceipt } from '#shared/contracts/listener-live.ts';
import { listenerView } from '#shared/contracts/listener-live.ts';
import { type ProctorCommand, type ProctorView, proctorView } from '#shared/contracts/proctor-live.ts';
import type { Entry } from '#shared/ledger/chain.ts';
import type { Method } from '#shared/methods/method.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { Problem } from '#shared/problem.ts';
import { answerLeaf } from '#shared/session/answer-leaf.ts';
import { contributionsOf } from '#shared/session/counted-trials.ts';
import { decide, type SessionCommand } from '#shared/session/decide.ts';
import { readSessionEvent, type SessionEvent, sessionEvents } from '#shared/session/events.ts';
import { evolve, holdAnswer } from '#shared/session/evolve.ts';
import { dueAt, optionsOf, presentationsOf } from '#shared/session/progress.ts';
import type { SessionState } from '#shared/session/state.ts';
import { listenerViewOf, type Presence, proctorViewOf } from '#shared/session/views.ts';
import { commitDraw, cueFor } from '../blind/index.ts';
import { type Tx, withTransaction } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import type { Answer } from '../features/sessions/answer.entity.ts';
import type { Seat } from '../features/sessions/seat.entity.ts';
import { tokenDigest } from '../features/sessions/seats.service.ts';
import type { Session } from '../features/sessions/session.entity.ts';
import * as store from '../features/sessions/sessions.store.ts';
import { lockStudyRow, studyById, updateStudy } from '../features/studies/studies.store.ts';
import { append, readSessionEntries } from '../ledger/ledger.ts';
import { joinOf, newSessionCode } from './join.ts';

type Push<View> = (view: View) => void;
type Lock = { sequence: number; digest: string; trial: number; leaves: ReadonlyMap<string, string> };
type AnswerCommand = Extract<ListenerCommand, { kind: 'answer' }>;

const heldOf = ({ trial, choice, confidence, revision, leaf, heldAt }: Answer): HeldAnswer => ({
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

/**
 * One session while people sit in it: a queue in which one thing happens at a time. A command is parsed and authorised
 * before it comes here; here it is decided, stored in one transaction, and only then shown.
 */
export class Sitting {
  readonly #deps: Deps;
  readonly #session: Session;
  readonly #title: string;
  readonly #method: Method;
  #state: SessionState;
  #entries: number;
  #lock: Lock | null;
  #held: Map<string, HeldAnswer>;
  #seats: Map<string, Seat>;
  #queue: Promise<unknown> = Promise.resolve();
  #cancelTimer: () => void = () => {};
  #broken = false;
  readonly #phones = new Map<string, Set<Push<ListenerView>>>();
  readonly #consoles = new Set<Push<ProctorView>>();
  readonly #awaySince = new Map<string, number>();

  private constructor(deps: Deps, loaded: Awaited<ReturnType<typeof load>>) {
    this.#deps = deps;
    this.#session = loaded.session;
    this.#title = loaded.title;
    this.#method = loaded.method;
    this.#state = loaded.state;
    this.#entries = loaded.entries;
    this.#lock = loaded.lock;
    this.#held = loaded.held;
    this.#seats = loaded.seats;
    for (const label of loaded.seats.keys()) this.#awaySince.set(label, deps.clock.now());
    this.#schedule();
  }

  /** Reads a session back from the database; null when there is none. */
  static async load(deps: Deps, sessionId: string): Promise<Sitting | null> {
    const session = await store.sessionById(deps.db.manager, sessionId);
    return session === null ? null : new Sitting(deps, await load(deps, session));
  }

  get proctorId(): string {
    return this.#session.proctorId;
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
      if (command.kind !== 'record-deviation' && command.expectVersion !== this.#state.version)
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
      this.#requireAnswerable(seat, command);
      const { trial } = this.#state;
      if (trial === null || trial.trial !== command.trial) return this.#refuseOutOfTurn(seat, command);
      if (trial.stage !== 'answering') throw new Problem('too-early', 'Answers open after the last presentation.');
      const known = this.#held.get(seat);
      if (known !== undefined && known.revision >= command.revision) return known;
      const row = this.#answerRow(seat, command, false);
      await withTransaction(this.#deps.db, (tx) => store.saveAnswer(tx, row));
      const held = heldOf(row);
      this.#held.set(seat, held);
      this.#state = holdAnswer(this.#state, seat, held.leaf);
      await this.#show();
      return held;
    });
  }

  takeSeat(body: {
    place: string;
    commitment: string;
    consentVersion: number;
  }): Promise<{ token: string; seat: string }> {
    return this.#inTurn(async () => {
      const token = this.#deps.random.bytes('seat-token', 24).toString('base64url');
      const { id: sessionId, studyId } = this.#session;
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
        this.#seats.set(seat.label, seat);
        this.#awaySince.set(seat.label, this.#deps.clock.now());
      });
      return { token, seat: seat.label };
    });
  }

  noteRestart(): Promise<void> {
    return this.#inTurn(() => this.#perform({ kind: 'note-restart' }));
  }

  // --- Who watches ---

  connectPhone(seat: string, push: Push<ListenerView>): () => void {
    const pushes = this.#phones.get(seat) ?? new Set();
    pushes.add(push);
    this.#phones.set(seat, pushes);
    this.#awaySince.delete(seat);
    this.#later(() => this.#show());
    return () => {
      pushes.delete(push);
      if (pushes.size > 0) return;
      this.#awaySince.set(seat, this.#deps.clock.now());
      this.#later(() => this.#show());
    };
  }

  connectConsole(push: Push<ProctorView>): () => void {
    this.#consoles.add(push);
    this.#later(() => this.#show());
    return () => this.#consoles.delete(push);
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
      const events = decide(this.#state, command, this.#deps.clock.now());
      return { events, entries: await this.#record(tx, events) };
    });
    this.#take(events, entries);
    stored();
    await this.#show();
  }

  async #openSeating(): Promise<void> {
    let code: string | null = null;
    const open = async (tx: Tx): Promise<SessionCommand> => {
      const study = await studyById(tx, this.#session.studyId);
      if (study.codesState !== 'confirmed')
        throw new Problem(
          'wrong-phase',
          'The code holder has not confirmed the sleeves yet. Seating opens after that.',
        );
      if (this.#state.phase !== 'planned') throw new Problem('wrong-phase', 'Seating is open already.');
      const commitment = await commitDraw(tx, this.#deps.random, this.#session.id);
      code = await newSessionCode(tx, this.#deps.random);
      await store.updateSession(tx, this.#session.id, { code });
      await updateStudy(tx, study.id, { state: 'collecting' }, new Date(this.#deps.clock.now()));
      return { kind: 'open-seating', commitment };
    };
    await this.#perform(open, () => {
      this.#session.code = code;
    });
  }

  /** Puts events on the record and keeps the columns that lists read. */
  async #record(tx: Tx, events: readonly SessionEvent[]): Promise<Entry[]> {
    if (events.length === 0) return [];
    const { studyId, id, number } = this.#session;
    const entries = await append(
      tx,
      this.#deps.random,
      studyId,
      events.map(({ kind, at, payload }) => ({ kind, at, payload, session: number })),
    );
    const next = events.reduce((state, event) => evolve(state, event, this.#method), this.#state);
    const isOver = next.phase === 'finished' || next.phase === 'abandoned';
    await store.updateSession(tx, id, {
      phase: next.phase,
      ...(isOver ? { code: null } : {}),
      trialsLocked: next.ended.filter(({ outcome }) => outcome === 'locked').length,
      listeners: next.seats.length,
    });
    return entries;
  }

  #take(events: readonly SessionEvent[], entries: readonly Entry[]): void {
    const trialBefore = this.#state.trial?.trial;
    this.#state = events.reduce((state, event) => evolve(state, event, this.#method), this.#state);
    if (this.#state.trial?.trial !== trialBefore) this.#held = new Map();
    for (const entry of entries) {
      this.#entries = entry.sequence;
      this.#lock = lockOf(entry) ?? this.#lock;
    }
    this.#schedule();
  }

  /** Sees to what happens without anybody acting. */
  #schedule(): void {
    this.#cancelTimer();
    const at = dueAt(this.#state, this.#deps.clock.now());
    if (at === null) return;
    this.#cancelTimer = this.#deps.clock.at(at, () => this.#later(() => this.#tick()));
  }

  async #tick(): Promise<void> {
    await this.#perform({ kind: 'tick' });
    this.#schedule();
  }

  // --- Answers ---

  #requireAnswerable(seat: string, { choice, confidence }: AnswerCommand): void {
    const own = this.#state.seats.find((candidate) => candidate.seat === seat);
    if (own === undefined || own.left) throw new Problem('wrong-phase', 'This seat has left the session.');
    if (!optionsOf(this.#state, this.#method).some((option) => option.value === choice))
      throw new Problem('invalid-input', 'That is not one of the answers.');
    if ((confidence !== null) !== this.#state.plan.confidence)
      throw new Problem(
        'invalid-input',
        this.#state.plan.confidence ? 'Say how sure you are.' : 'Confidence is not asked here.',
      );
    const { trial } = this.#state;
    if (trial !== null && !trial.seats.includes(seat))
      throw new Problem('wrong-phase', 'You take part from the next trial on.');
  }

  #answerRow(seat: string, command: AnswerCommand, late: boolean): Answer {
    const { trial, choice, confidence, revision, salt } = command;
    const session = this.#session.id;
    const leaf = answerLeaf({ salt, session, seat, trial, choice, confidence });
    const heldAt = new Date(this.#deps.clock.now());
    return { sessionId: session, trial, seat, late, revision, choice, confidence, salt, leaf, heldAt };
  }

  async #refuseOutOfTurn(seat: string, command: AnswerCommand): Promise<never> {
    const ended = this.#state.ended.find(({ trial }) => trial === command.trial);
    if (ended === undefined) {
      if (this.#state.phase !== 'running')
        throw new Problem('too-late', 'The session ended before this answer arrived. It is not counted.');
      throw new Problem('too-early', 'That trial is not open.');
    }
    if (ended.outcome === 'void')
      throw new Problem('too-late', `Trial ${command.trial} was set aside. A spare takes its place.`);
    if (!ended.missing.includes(seat))
      throw new Problem('too-late', `Trial ${command.trial} is locked; your earlier answer stands.`);
    const row = this.#answerRow(seat, command, true);
    await withTransaction(this.#deps.db, (tx) => store.saveAnswer(tx, row));
    await this.#perform({ kind: 'note-late-answer', seat, trial: command.trial, leaf: row.leaf });
    throw new Problem(
      'too-late',
      `Trial ${command.trial} had locked before this answer arrived. It is recorded as late and not counted.`,
    );
  }

  // --- Views ---

  async #show(): Promise<void> {
    for (const [seat, pushes] of this.#phones) {
      if (pushes.size === 0) continue;
      const view = this.#listenerView(seat);
      for (const push of pushes) push(view);
    }
    if (this.#consoles.size === 0) return;
    const view = await this.#proctorView();
    for (const push of this.#consoles) push(view);
  }

  #listenerView(seat: string): ListenerView {
    const leaf = this.#lock?.leaves.get(seat);
    const lastLock: LockReceipt | null =
      this.#lock === null || leaf === undefined
        ? null
        : { trial: this.#lock.trial, leaf, sequence: this.#lock.sequence, digest: this.#lock.digest };
    return listenerView.parse(
      listenerViewOf(this.#state, this.#method, {
        title: this.#title,
        seat,
        now: this.#deps.clock.now(),
        held: this.#held.get(seat) ?? null,
        lastLock,
      }),
    );
  }

  async #proctorView(): Promise<ProctorView> {
    const { config, clock } = this.#deps;
    const presence: Presence[] = [...this.#seats].map(([seat, { place }]) => ({
      seat,
      place,
      awaySince: this.#awaySince.get(seat) ?? null,
    }));
    const { phase } = this.#state;
    const isOpen = phase === 'seating' || phase === 'revealing' || phase === 'running';
    return proctorView.parse(
      proctorViewOf(this.#state, this.#method, {
        title: this.#title,
        room: this.#session.room,
        now: clock.now(),
        code: await this.#code(),
        join: isOpen && this.#session.code !== null ? await joinOf(config.publicUrl, this.#session.code) : null,
        presence,
        entries: this.#entries,
        demo: config.demo,
      }),
    );
  }

  /** The blind code of the presentation that is being fitted or heard. */
  async #code(): Promise<string | null> {
    const { trial, plan } = this.#state;
    if (trial === null || trial.stage === 'answering') return null;
    const presentation = presentationsOf(this.#method, trial.trial)[trial.presentation];
    if (presentation === undefined) throw new Error('a trial beyond its presentations');
    return cueFor(this.#deps.db.manager, {
      studyId: this.#session.studyId,
      sessionId: this.#session.id,
      contributions: contributionsOf(this.#state),
      method: this.#method,
      trials: plan.trials + plan.spares,
      trial: trial.trial,
      presentation,
    });
  }
}

async function load({ db }: Deps, session: Session) {
  return withTransaction(db, async (tx) => {
    const study = await studyById(tx, session.studyId);
    const method = methodOf(study.draft.method);
    const entries = await readSessionEntries(tx, study.id, session.number);
    const events = entries.flatMap((entry) => readSessionEvent(entry.kind, entry.at, entry.payload) ?? []);
    const replayed = events.reduce<SessionState | null>((state, event) => evolve(state, event, method), null);
    if (replayed === null) throw new Error(`session ${session.id} is not on the record`);
    const rows = replayed.trial === null ? [] : await store.answersToTrial(tx, session.id, replayed.trial.trial);
    const seats = await store.seatsOf(tx, session.id);
    return {
      session,
      title: study.title,
      method,
      state: rows.reduce((state, { seat, leaf }) => holdAnswer(state, seat, leaf), replayed),
      entries: study.headSequence,
      lock: entries.reduce<Lock | null>((lock, entry) => lockOf(entry) ?? lock, null),
      held: new Map(rows.map((row) => [row.seat, heldOf(row)])),
      seats: new Map(seats.map((seat) => [seat.label, seat])),
    };
  });
}
