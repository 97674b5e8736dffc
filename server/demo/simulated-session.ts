import { randomBytes } from 'node:crypto';
import type { ListenerView } from '#shared/contracts/listener-live.ts';
import { cautions, type ProctorCommand, type ProctorView } from '#shared/contracts/proctor-live.ts';
import { consentVersion, linkedConsentVersion } from '#shared/contracts/seats.ts';
import { contributionCommitment } from '#shared/session/answer-leaf.ts';
import type { Deps } from '../deps.ts';
import { takeLinkedSeat } from '../features/attendances/answering.service.ts';
import { tokenDigest } from '../features/sessions/seats.service.ts';
import { seatByToken } from '../features/sessions/sessions.store.ts';
import type { Sitting } from '../live/sitting.ts';
import type { Sittings } from '../live/sittings.ts';
import type { HandClock } from './hand-clock.ts';

type Command = ProctorCommand extends infer C ? (C extends ProctorCommand ? Omit<C, 'expectVersion'> : never) : never;

type Phone = { seat: string; secret: string; view: ListenerView | null };

const paceOf: { readonly [step: string]: number } = { mute: 2_000, unplug: 5_000, fit: 9_000, check: 3_000 };

/** What one simulated listener answers, from the codes that were fitted for each presentation and from chance. */
export type Hearing = (codes: readonly string[], seat: number, trial: number) => string | null;

/** A whole session run through the program's own services: a proctor at the console and phones in the room. */
export class SimulatedSession {
  readonly #clock: HandClock;
  readonly #sitting: Sitting;
  readonly #sittings: Sittings;
  readonly #deps: Deps;
  #console: ProctorView | null = null;
  readonly #phones: Phone[] = [];
  /** The codes that were fitted. */
  readonly #codes = new Set<string>();

  private constructor(deps: Deps, clock: HandClock, sittings: Sittings, sitting: Sitting) {
    this.#sittings = sittings;
    this.#deps = deps;
    this.#clock = clock;
    this.#sitting = sitting;
    sitting.connectConsole((view) => {
      this.#console = view;
    });
  }

  static async open(deps: Deps, clock: HandClock, sittings: Sittings, sessionId: string): Promise<SimulatedSession> {
    const session = new SimulatedSession(deps, clock, sittings, await sittings.of(sessionId));
    await session.#sitting.settled();
    return session;
  }

  get #view(): ProctorView {
    if (this.#console === null) throw new Error('the console has no view');
    return this.#console;
  }

  async #command(command: Command): Promise<void> {
    await this.#sitting.command({ ...command, expectVersion: this.#view.version } as ProctorCommand);
  }

  async #wait(ms: number): Promise<void> {
    this.#clock.advance(ms);
    await this.#sitting.settled();
  }

  /**
   * Cautions, seating, and the phones' randomness, up to the fixed draw.
   *
   * @param links personal links, place by place; whoever has none joins by code
   */
  async seat(places: readonly string[], links: readonly string[] = []): Promise<void> {
    await this.#command({ kind: 'confirm-cautions', items: [...cautions] });
    await this.#command({ kind: 'open-seating' });
    for (const [index, place] of places.entries()) {
      await this.#wait(21_000);
      const secret = randomBytes(32).toString('hex');
      const commitment = contributionCommitment(secret);
      const consent = { place, commitment };
      const link = links[index];
      const { token } =
        link === undefined
          ? await this.#sitting.takeSeat({ ...consent, consentVersion }, null)
          : await takeLinkedSeat(this.#deps, this.#sittings, {
              token: link,
              ...consent,
              consentVersion: linkedConsentVersion,
            });
      const seat = await seatByToken(this.#deps.db.manager, tokenDigest(token));
      if (seat === null) throw new Error('a taken seat is gone');
      const phone: Phone = { seat: seat.label, secret, view: null };
      this.#phones.push(phone);
      this.#sitting.connectPhone(seat.label, (view) => {
        phone.view = view;
      });
    }
    await this.#wait(30_000);
    await this.#command({ kind: 'close-seating' });
    for (const { seat, secret } of this.#phones) await this.#sitting.fromPhone(seat, { kind: 'reveal', value: secret });
  }

  /** One presentation: the steps of the change at a human pace, the wait, the excerpt. Returns the code fitted. */
  async #present(): Promise<string> {
    const { steps } = this.#view;
    for (const { kind: step } of steps.slice(0, -1)) {
      const { trial } = this.#view;
      const paceMs = paceOf[step] ?? 1_000;
      const leftMs = (trial?.endsAt ?? 0) - this.#clock.now();
      const leastMs = (trial?.stepEndsAt ?? 0) - this.#clock.now();
      await this.#wait(Math.max(leastMs, Math.min(paceMs, Math.max(0, Math.floor(leftMs / 5)))));
      if (step === 'scan') await this.#scanBothEnds();
      else await this.#command({ kind: 'confirm-step', step });
    }
    await this.#wait(Math.max(0, (this.#view.trial?.endsAt ?? 0) - this.#clock.now()) + 400);
    const last = steps.at(-1);
    if (last !== undefined) await this.#command({ kind: 'confirm-step', step: last.kind });
    const code = this.#view.trial?.code ?? '';
    this.#codes.add(code);
    await this.#wait(Math.max(0, (this.#view.trial?.endsAt ?? 0) - this.#clock.now()));
    return code;
  }

  async #presentations(count: number): Promise<string[]> {
    const codes: string[] = [];
    for (let index = 0; index < count; index += 1) codes.push(await this.#present());
    return codes;
  }

  async familiarise(): Promise<void> {
    await this.#command({ kind: 'begin-familiarisation' });
    await this.#presentations(this.#view.trial?.presentations ?? 0);
    await this.#wait(20_000);
  }

  /** One trial; `voidAs` sets it aside after its presentations instead of collecting answers. */
  async trial(hearing: Hearing, voidAs?: { reason: 'noise' | 'drop-out'; note: string }): Promise<void> {
    await this.#command({ kind: 'begin-trial' });
    const trial = this.#view.trial?.number ?? 0;
    const codes = await this.#presentations(this.#view.trial?.presentations ?? 0);
    if (voidAs !== undefined) {
      await this.#command({ kind: 'void-trial', ...voidAs });
      return;
    }
    for (const [index, { seat }] of this.#phones.entries()) {
      await this.#wait(1_300);
      const choice = hearing(codes, index, trial);
      if (choice === null) continue;
      const salt = randomBytes(16).toString('hex');
      await this.#sitting.answer(seat, { kind: 'answer', trial, choice, confidence: null, revision: 1, salt });
    }
    await this.#sitting.settled();
    const { trial: open } = this.#view;
    if (open !== null && open.answered === open.expected) await this.#command({ kind: 'lock-trial' });
    else await this.#wait((open?.endsAt ?? 0) - this.#clock.now());
    await this.#wait(15_000);
  }

  /** The measurement of levels that the session waits for, or null. */
  get levelsDue() {
    return this.#view.levels?.due ?? null;
  }

  get trialsLeft(): boolean {
    return this.#view.nextTrial !== null;
  }

  async abandon(reason: string): Promise<void> {
    await this.#command({ kind: 'abandon', reason });
  }

  async #scanBothEnds(): Promise<void> {
    const text = this.#view.trial?.code ?? '';
    for (let end = 1; end <= 2; end += 1) await this.#command({ kind: 'scan-label', text, by: 'typed' });
  }

  /** Every sleeve once more, where labels were scanned. */
  async #takeInventory(): Promise<void> {
    if (this.#view.inventory === null) return;
    for (const text of this.#codes) await this.#command({ kind: 'scan-label', text, by: 'typed' });
    const { found, of } = this.#view.inventory;
    const reason = found.length < of ? 'Only the pieces that were fitted had been brought to the room.' : '';
    await this.#command({ kind: 'end-inventory', reason });
  }

  async finish(): Promise<void> {
    await this.#takeInventory();
    await this.#command({ kind: 'finish' });
  }
}
