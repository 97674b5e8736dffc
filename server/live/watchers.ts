import type { ListenerView } from '#shared/contracts/listener-live.ts';
import type { ObserverView } from '#shared/contracts/observer-live.ts';
import type { ProctorView } from '#shared/contracts/proctor-live.ts';

/** A witness as their page needs them. */
export type Watching = { readonly label: string; readonly name: string };
type Push<View> = (view: View) => void;

/** Who watches a session: phones by seat and consoles, and since when a seat's phone has been away. */
export class Watchers {
  readonly #now: () => number;
  readonly #phones = new Map<string, Set<Push<ListenerView>>>();
  readonly #observers = new Map<string, { observer: Watching; pushes: Set<Push<ObserverView>> }>();
  readonly #consoles = new Set<Push<ProctorView>>();
  readonly #awaySince = new Map<string, number>();

  /** Every seat is away until its phone connects. */
  constructor(now: () => number, seats: Iterable<string>) {
    this.#now = now;
    for (const seat of seats) this.seatTaken(seat);
  }

  seatTaken(seat: string): void {
    this.#awaySince.set(seat, this.#now());
  }

  /** Since when nothing has been heard from the seat's phone; null while one is connected. */
  awaySince(seat: string): number | null {
    return this.#awaySince.get(seat) ?? null;
  }

  /** Returns what disconnects it again; `changed` is called when the seat comes or goes. */
  addPhone(seat: string, push: Push<ListenerView>, changed: () => void): () => void {
    const pushes = this.#phones.get(seat) ?? new Set();
    pushes.add(push);
    this.#phones.set(seat, pushes);
    this.#awaySince.delete(seat);
    changed();
    return () => {
      pushes.delete(push);
      if (pushes.size > 0) return;
      this.#awaySince.set(seat, this.#now());
      changed();
    };
  }

  /** Returns what disconnects it again; `changed` is told when the first page of an observer comes and the last one goes. */
  addObserver(observer: Watching, push: Push<ObserverView>, changed: (isHere: boolean) => void): () => void {
    const own = this.#observers.get(observer.label) ?? { observer, pushes: new Set() };
    own.pushes.add(push);
    this.#observers.set(observer.label, own);
    if (own.pushes.size === 1) changed(true);
    return () => {
      own.pushes.delete(push);
      if (own.pushes.size === 0) changed(false);
    };
  }

  addConsole(push: Push<ProctorView>): () => void {
    this.#consoles.add(push);
    return () => this.#consoles.delete(push);
  }

  /** Sends everyone the view that is made for them. */
  async show(
    phoneView: (seat: string) => ListenerView,
    consoleView: () => Promise<ProctorView>,
    observerView: (observer: Watching) => ObserverView,
  ): Promise<void> {
    for (const { observer, pushes } of this.#observers.values()) {
      if (pushes.size === 0) continue;
      const view = observerView(observer);
      for (const push of pushes) push(view);
    }
    for (const [seat, pushes] of this.#phones) {
      if (pushes.size === 0) continue;
      const view = phoneView(seat);
      for (const push of pushes) push(view);
    }
    if (this.#consoles.size === 0) return;
    const view = await consoleView();
    for (const push of this.#consoles) push(view);
  }
}
