import { Problem } from '#shared/problem.ts';
import type { Deps } from '../deps.ts';
import { openSessions } from '../features/sessions/sessions.store.ts';
import { Rehearsals } from './rehearsals.ts';
import { Sitting } from './sitting.ts';

/** The sessions that this server has in memory; the database stays the authority. */
export class Sittings {
  readonly #deps: Deps;
  readonly rehearsals: Rehearsals;
  readonly #byId = new Map<string, Promise<Sitting | null>>();

  constructor(deps: Deps) {
    this.#deps = deps;
    this.rehearsals = new Rehearsals(deps);
  }

  /** @throws Problem `not-found` */
  async of(sessionId: string): Promise<Sitting> {
    const rehearsal = this.rehearsals.of(sessionId);
    if (rehearsal !== null) return rehearsal;
    const known = await this.#byId.get(sessionId);
    if (known?.isBroken === true) this.forget(sessionId, known);
    if (!this.#byId.has(sessionId)) {
      const loading = Sitting.load(this.#deps, sessionId);
      this.#byId.set(sessionId, loading);
      loading.catch(() => this.#byId.delete(sessionId));
    }
    const sitting = await this.#byId.get(sessionId);
    if (sitting === null || sitting === undefined) {
      this.#byId.delete(sessionId);
      throw new Problem('not-found', 'There is no such session.');
    }
    return sitting;
  }

  forget(sessionId: string, sitting: Sitting): void {
    sitting.stop();
    this.#byId.delete(sessionId);
  }

  /** Something else than its sitting has changed a session: whoever watches it sees it as it now is. */
  async readAfresh(sessionId: string): Promise<void> {
    await (await this.#byId.get(sessionId))?.readAfresh();
  }

  /** Takes up the sessions that were open when the server stopped, so that what falls due happens. */
  async resumeAll(): Promise<void> {
    for (const { id } of await openSessions(this.#deps.db.manager)) await (await this.of(id)).noteRestart();
  }

  async stop(): Promise<void> {
    this.rehearsals.stop();
    for (const sitting of await Promise.all(this.#byId.values())) sitting?.stop();
    this.#byId.clear();
  }
}
