import { type Confidence, type ListenerView, listenerView } from '#shared/contracts/listener-live.ts';
import { Problem } from '#shared/problem.ts';
import { type Live, type LiveSnapshot, openLive } from '../lib/live.ts';
import { acknowledged, commandOf, leafOf, type OwnAnswer, refusedAsLate, tapped } from './answers.ts';
import { type KeptReceipt, randomHex, recall, remember } from './seat-memory.ts';

export type SeatSnapshot = LiveSnapshot<ListenerView> & {
  readonly answer: OwnAnswer | null;
  readonly receipts: readonly KeptReceipt[];
  /** Something the listener must know: what was sent and what was stored are not the same, or a call failed. */
  readonly alarm: string | null;
};

/** One seat on this phone: the live view, the answer being held, and the receipts. */
export class Seat {
  readonly #token: string;
  readonly #live: Live<ListenerView>;
  readonly #listeners = new Set<() => void>();
  #snapshot: SeatSnapshot;
  #isSending = false;
  #isRevealing = false;

  constructor(token: string) {
    this.#token = token;
    const { answer, receipts } = recall(token);
    this.#live = openLive({ audience: 'listener', token }, (value) => listenerView.parse(value));
    this.#snapshot = { ...this.#live.getSnapshot(), answer, receipts, alarm: null };
    this.#live.subscribe(() => this.#viewed());
    window.addEventListener('focus', () => this.#deliver());
    window.addEventListener('online', () => this.#deliver());
  }

  subscribe = (listener: () => void): (() => void) => {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  };

  getSnapshot = (): SeatSnapshot => this.#snapshot;

  /** Stores an answer on the phone, then sends it. */
  answer(choice: string, confidence: Confidence | null): void {
    const trial = this.#snapshot.view?.trial?.number;
    if (trial === undefined) return;
    const answer = tapped(this.#known(trial), { trial, choice, confidence, salt: randomHex(16) });
    this.#keep(answer);
    this.#deliver();
  }

  /** @throws Problem when the server cannot be told */
  async tooLoud(): Promise<void> {
    await this.#live.send({ kind: 'too-loud' });
  }

  async leave(): Promise<void> {
    await this.#live.send({ kind: 'leave' });
  }

  /** The answer to a trial as far as it is known: on the phone, or, after a loss of memory, on the server. */
  #known(trial: number): OwnAnswer | null {
    const { answer, view } = this.#snapshot;
    if (answer?.trial === trial) return answer;
    const held = view?.trial?.held;
    if (held?.trial !== trial) return null;
    const { choice, confidence, revision, heldAt } = held;
    return { trial, choice, confidence, revision, heldAt, salt: '', state: 'held', why: null };
  }

  #update(change: Partial<SeatSnapshot>): void {
    this.#snapshot = { ...this.#snapshot, ...change };
    for (const listener of this.#listeners) listener();
  }

  #keep(answer: OwnAnswer): void {
    remember(this.#token, { answer });
    this.#update({ answer });
  }

  #viewed(): void {
    const live = this.#live.getSnapshot();
    this.#update({ ...live, answer: this.#snapshot.answer });
    const { view } = live;
    if (view === null) return;
    const trial = view.trial?.number;
    const known = trial === undefined ? null : this.#known(trial);
    if (known !== null && known !== this.#snapshot.answer) this.#update({ answer: known });
    if (view.lastLock !== null) this.#receive(view.lastLock, view);
    if (view.revealWanted) this.#reveal();
    this.#deliver();
  }

  #receive(lock: NonNullable<ListenerView['lastLock']>, view: ListenerView): void {
    const { receipts, answer } = this.#snapshot;
    if (receipts.some(({ trial }) => trial === lock.trial)) return;
    const own = answer?.trial === lock.trial && answer.salt !== '' ? answer : null;
    const isOwn = own === null ? null : leafOf(own, { session: view.sessionId, seat: view.seat }) === lock.leaf;
    const kept = [...receipts, { ...lock, isOwn }];
    remember(this.#token, { receipts: kept });
    const alarm =
      isOwn === false
        ? `The record of trial ${lock.trial} does not hold the answer of this phone. Tell the proctor.`
        : this.#snapshot.alarm;
    this.#update({ receipts: kept, alarm });
  }

  #reveal(): void {
    const { contribution } = recall(this.#token);
    if (contribution === null || this.#isRevealing) return;
    this.#isRevealing = true;
    this.#live
      .send({ kind: 'reveal', value: contribution })
      .catch((error: unknown) => this.#report(error))
      .finally(() => {
        this.#isRevealing = false;
      });
  }

  /** Sends what is still on this phone, until it is acknowledged or refused as late. */
  #deliver(): void {
    const { answer, connection, view } = this.#snapshot;
    if (answer === null || answer.state !== 'here' || connection !== 'connected' || this.#isSending) return;
    this.#isSending = true;
    this.#live
      .send(commandOf(answer))
      .then(
        ({ held }) => {
          if (held === undefined || view === null) return;
          if (
            held.revision === answer.revision &&
            held.leaf !== leafOf(answer, { session: view.sessionId, seat: view.seat })
          )
            this.#update({ alarm: 'The server stored something else than this phone sent. Tell the proctor.' });
          const current = this.#snapshot.answer;
          if (current !== null) this.#keep(acknowledged(current, held));
        },
        (error: unknown) => this.#refused(answer, error),
      )
      .finally(() => {
        this.#isSending = false;
        if (this.#snapshot.answer !== answer) this.#deliver();
      });
  }

  #refused(answer: OwnAnswer, error: unknown): void {
    if (!(error instanceof Problem)) throw error;
    // Unreachable is no refusal: the answer stays on this phone and goes out with the next connection.
    if (error.code === 'unreachable') return;
    if (this.#snapshot.answer === answer) this.#keep(refusedAsLate(answer, error.message));
  }

  #report(error: unknown): void {
    if (!(error instanceof Problem)) throw error;
    if (error.code !== 'unreachable') this.#update({ alarm: error.message });
  }
}
