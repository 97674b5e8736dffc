import { HandClock } from '../../server/demo/hand-clock.ts';
import { until } from './until.ts';

/** Moves only once the postman waits for it, so that no round is missed. */
export class PostmansClock extends HandClock {
  readonly #waiting = new Set<object>();

  override at(atMs: number, callback: () => void): () => void {
    const timer = {};
    this.#waiting.add(timer);
    const cancel = super.at(atMs, () => {
      this.#waiting.delete(timer);
      callback();
    });
    return () => {
      this.#waiting.delete(timer);
      cancel();
    };
  }

  async pass(ms: number): Promise<void> {
    await until('the postman to wait', () => this.#waiting.size > 0);
    this.advance(ms);
  }
}
