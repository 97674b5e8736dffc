import type { Clock } from '../deps.ts';

/** A clock that stands still until it is moved; what falls due on the way happens in order. */
export class HandClock implements Clock {
  #now: number;
  #due: { atMs: number; callback: () => void }[] = [];

  constructor(startMs: number) {
    this.#now = startMs;
  }

  now(): number {
    return this.#now;
  }

  at(atMs: number, callback: () => void): () => void {
    const item = { atMs, callback };
    this.#due.push(item);
    return () => {
      this.#due = this.#due.filter((other) => other !== item);
    };
  }

  /** Moves on by some milliseconds and calls back whatever fell due. */
  advance(ms: number): void {
    const until = this.#now + ms;
    for (;;) {
      const next = this.#due.filter(({ atMs }) => atMs <= until).sort((a, b) => a.atMs - b.atMs)[0];
      if (next === undefined) break;
      this.#due = this.#due.filter((other) => other !== next);
      this.#now = Math.max(this.#now, next.atMs);
      next.callback();
    }
    this.#now = until;
  }
}
