import { type Confidence, type HeldAnswer, type ListenerView, listenerView } from '#shared/contracts/listener-live.ts';
import type { ExitAnswers, Fatigue, RemarkCommand } from '#shared/contracts/remarks.ts';
import { Problem, type ProblemCode } from '#shared/problem.ts';
import { type Live, type LiveSnapshot, openLive } from '../lib/live.ts';
import {
  acknowledged,
  answerTo,
  commandOf,
  isDifferent,
  isOwnLeaf,
  learnt,
  nextToSend,
  type OwnAnswer,
  refused,
  tapped,
  withAnswer,
} from './answers.ts';
import { newRemark, type OwnRemark, remarkToSend, withRemark } from './remarks.ts';
import { type KeptReceipt, randomHex, recall, remember } from './seat-memory.ts';

export type SeatSnapshot = LiveSnapshot<ListenerView> & {
  readonly answers: readonly OwnAnswer[];
  readonly receipts: readonly KeptReceipt[];
  /** What this phone sent where the server holds something else; kept with its salt. */
  readonly disputed: readonly OwnAnswer[];
  readonly remarks: readonly OwnRemark[];
  readonly exitDraft: ExitAnswers;
  /** Whether this tab has the random number that the seat committed to. */
  readonly hasContribution: boolean;
  /** What the listener must know and tell: what was sent and what was stored are not the same. */
  readonly alarm: string | null;
};

/** After these the command may still be taken; everything else is the server's last word. */
const passing: readonly ProblemCode[] = ['unreachable', 'unavailable', 'internal', 'too-many-requests', 'too-early'];
const againMs = 2_000;

/** One seat on this phone: the live view, the answers being held, and the receipts. */
export class Seat {
  readonly #token: string;
  readonly #contribution: string | null;
  readonly #live: Live<ListenerView>;
  readonly #listeners = new Set<() => void>();
  #snapshot: SeatSnapshot;
  #isSending = false;
  #isRevealing = false;
  #isRevealRefused = false;
  #requested: { trial: number; presentation: number; label: string; salt: string } | null = null;
  #again: ReturnType<typeof setTimeout> | undefined;

  constructor(token: string) {
    this.#token = token;
    const { contribution, ...kept } = recall(token);
    this.#contribution = contribution;
    this.#live = openLive({ audience: 'listener', token }, (value) => listenerView.parse(value));
    const hasContribution = contribution !== null;
    this.#snapshot = { ...this.#live.getSnapshot(), ...kept, hasContribution, alarm: null };
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
    const { view, answers } = this.#snapshot;
    const trial = view?.trial?.number;
    if (view === null || trial === undefined) return;
    const tap = { trial, choice, confidence, salt: randomHex(16) };
    this.#keep(tapped(answerTo(answers, trial), tap, { session: view.sessionId, seat: view.seat }));
    this.#deliver();
  }

  /** Keeps what is typed of the exit questions over a reload. */
  draftExit(exitDraft: ExitAnswers): void {
    remember(this.#token, { exitDraft });
    this.#update({ exitDraft });
  }

  sendExit(answers: ExitAnswers): void {
    this.#say({ kind: 'exit', salt: randomHex(16), answers });
  }

  sayFatigue(number: number, fatigue: Fatigue): void {
    this.#say({ kind: 'fatigue', salt: randomHex(16), break: number, fatigue });
  }

  #say(command: RemarkCommand): void {
    const { view } = this.#snapshot;
    if (view === null) return;
    this.#keepRemark(newRemark(command, view));
    this.#deliver();
  }

  #keepRemark(remark: OwnRemark): void {
    const remarks = withRemark(this.#snapshot.remarks, remark);
    remember(this.#token, { remarks });
    this.#update({ remarks });
  }

  /**
   * Asks for what is heard next. Asked again for the same place of the trial, it is the same request.
   * @throws Problem when the server cannot be told, or does not take it
   */
  async request(label: string): Promise<void> {
    const { trial } = this.#snapshot.view ?? {};
    if (trial === null || trial === undefined) return;
    const place = { trial: trial.number, presentation: trial.presentationNumber, label };
    const { salt, ...asked } = this.#requested ?? { salt: '' };
    const isAgain = salt !== '' && JSON.stringify(asked) === JSON.stringify(place);
    this.#requested = isAgain ? { ...place, salt } : { ...place, salt: randomHex(16) };
    await this.#live.send({ kind: 'request-presentation', ...this.#requested });
  }

  /** @throws Problem when the server cannot be told */
  async tooLoud(): Promise<void> {
    await this.#live.send({ kind: 'too-loud' });
  }

  /** @throws Problem when the server cannot be told */
  async leave(): Promise<void> {
    await this.#live.send({ kind: 'leave' });
  }

  /** The listener has read the alarm and told the proctor. */
  dismissAlarm(): void {
    this.#update({ alarm: null });
  }

  #update(change: Partial<SeatSnapshot>): void {
    this.#snapshot = { ...this.#snapshot, ...change };
    for (const listener of this.#listeners) listener();
  }

  #keep(answer: OwnAnswer): void {
    const answers = withAnswer(this.#snapshot.answers, answer);
    remember(this.#token, { answers });
    this.#update({ answers });
  }

  #viewed(): void {
    this.#update(this.#live.getSnapshot());
    const { view } = this.#snapshot;
    if (view === null) return;
    this.#forgetPractice(view.trial?.number ?? 0);
    if (view.trial?.held) this.#hear(view.trial.held);
    if (view.lastLock !== null) this.#receive(view.lastLock);
    if (view.revealWanted) this.#reveal();
    this.#deliver();
  }

  /** A practice trial that is over leaves nothing on the phone either. */
  #forgetPractice(open: number): void {
    const answers = this.#snapshot.answers.filter(({ trial }) => trial > 0 || trial === open);
    if (answers.length === this.#snapshot.answers.length) return;
    remember(this.#token, { answers });
    this.#update({ answers });
  }

  /** Takes in what the server says it holds. */
  #hear(held: HeldAnswer): void {
    const known = answerTo(this.#snapshot.answers, held.trial);
    if (known?.state === 'held' && known.revision === held.revision && !isDifferent(known, held)) return;
    if (known !== null && isDifferent(known, held)) this.#dispute(known);
    this.#keep(known === null ? learnt(held) : acknowledged(known, held));
  }

  #dispute(sent: OwnAnswer): void {
    const disputed = [...this.#snapshot.disputed, sent];
    remember(this.#token, { disputed });
    this.#update({ disputed, alarm: `For trial ${sent.trial} the server holds something else than this phone sent.` });
  }

  #receive(lock: NonNullable<ListenerView['lastLock']>): void {
    const { receipts, answers } = this.#snapshot;
    if (receipts.some(({ trial }) => trial === lock.trial)) return;
    const isOwn = isOwnLeaf(answerTo(answers, lock.trial), lock.leaf);
    const kept = [...receipts, { ...lock, isOwn }];
    remember(this.#token, { receipts: kept });
    this.#update({ receipts: kept });
    if (isOwn === false)
      this.#update({ alarm: `The record of trial ${lock.trial} does not hold the answer that this phone sent.` });
  }

  #reveal(): void {
    if (this.#contribution === null || this.#isRevealing || this.#isRevealRefused) return;
    this.#isRevealing = true;
    this.#live
      .send({ kind: 'reveal', value: this.#contribution })
      .catch((error: unknown) => {
        if (isPassing(error)) this.#tryAgain();
        else this.#isRevealRefused = true;
      })
      .finally(() => {
        this.#isRevealing = false;
      });
  }

  /** Sends what is still on this phone, until it is acknowledged or refused for good. */
  #deliver(): void {
    const { answers, connection } = this.#snapshot;
    const answer = nextToSend(answers);
    const remark = remarkToSend(this.#snapshot.remarks);
    if (connection !== 'connected' || this.#isSending || (answer === null && remark === null)) return;
    this.#isSending = true;
    const sent = answer === null ? this.#sendRemark(remark as OwnRemark) : this.#sendAnswer(answer);
    sent
      .finally(() => {
        this.#isSending = false;
      })
      .then((isSettled) => (isSettled ? this.#deliver() : this.#tryAgain()));
  }

  /** Resolves to whether the matter is settled. */
  #sendAnswer(answer: OwnAnswer): Promise<boolean> {
    return this.#live.send(commandOf(answer)).then(
      ({ held }) => {
        if (held === undefined) throw new Error('an answer was acknowledged without its leaf');
        this.#hear(held);
        return true;
      },
      (error: unknown) => this.#refused(answer, error),
    );
  }

  #sendRemark(remark: OwnRemark): Promise<boolean> {
    return this.#live.send(remark.command).then(
      () => {
        this.#keepRemark({ ...remark, state: 'held' });
        return true;
      },
      (error: unknown) => {
        if (isPassing(error)) return false;
        this.#keepRemark({ ...remark, state: 'refused', why: (error as Problem).message });
        return true;
      },
    );
  }

  /** Whether the matter is settled; if not, the answer stays on this phone and is sent again. */
  #refused(answer: OwnAnswer, error: unknown): boolean {
    if (isPassing(error)) return false;
    const { code, message } = error as Problem;
    const current = answerTo(this.#snapshot.answers, answer.trial);
    if (current?.revision === answer.revision)
      this.#keep(refused(current, code === 'too-late' ? 'late' : 'refused', message));
    return true;
  }

  #tryAgain(): void {
    clearTimeout(this.#again);
    this.#again = setTimeout(() => {
      if (this.#snapshot.view?.revealWanted) this.#reveal();
      this.#deliver();
    }, againMs);
  }
}

/** @throws whatever is no Problem, which is a fault of the program */
function isPassing(error: unknown): boolean {
  if (!(error instanceof Problem)) throw error;
  return passing.includes(error.code);
}
