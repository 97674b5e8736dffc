import { methodOf } from '#shared/methods/methods.ts';
import { Problem } from '#shared/problem.ts';
import type { SessionPlan } from '#shared/session/events.ts';
import { evolve } from '#shared/session/evolve.ts';
import type { Deps } from '../deps.ts';
import type { Seat } from '../features/sessions/seat.entity.ts';
import { newSessionCode } from './join.ts';
import { rehearsalKeeper } from './rehearsal-keeper.ts';
import type { SessionMemory } from './session-memory.ts';
import { Sitting } from './sitting.ts';

/** How long a rehearsal stays, whether or not anybody is in it. */
const lifeMs = 6 * 60 * 60 * 1000;
const mostAtOnce = 100;

export type RehearsalOf = {
  readonly organisationId: string;
  readonly proctorId: string;
  /** Neutral, as every title that a listener sees. */
  readonly title: string;
  readonly room: string;
  readonly plan: SessionPlan;
};

type Rehearsal = { readonly sitting: Sitting; readonly endsAt: number };

/** Full runs with invented codes, in memory alone: on no record, and gone when the server stops. */
export class Rehearsals {
  readonly #deps: Deps;
  readonly #byId = new Map<string, Rehearsal>();

  constructor(deps: Deps) {
    this.#deps = deps;
  }

  /** @throws Problem `too-many-requests` when very many are under way */
  async begin(of: RehearsalOf): Promise<string> {
    this.#forgetOld();
    if (this.#byId.size >= mostAtOnce)
      throw new Problem('too-many-requests', 'Too many rehearsals are under way. Try again later.');
    const { random, clock } = this.#deps;
    const id = random.id();
    const code = await newSessionCode(this.#deps.db.manager, random);
    const method = methodOf(of.plan.method);
    const payload = { session: 1, sessionId: id, proctor: of.proctorId, plan: of.plan };
    const memory: SessionMemory = {
      session: {
        id,
        organisationId: of.organisationId,
        studyId: random.id(),
        number: 1,
        proctorId: of.proctorId,
        room: of.room,
        plannedAt: new Date(clock.now()),
        timeZone: 'UTC',
        phase: 'planned',
        code: null,
        trialsLocked: 0,
        listeners: 0,
      },
      title: of.title,
      isRehearsal: true,
      method,
      state: evolve(null, { kind: 'session-planned', at: clock.now(), payload }, method),
      entries: 0,
      lock: null,
      told: null,
      held: new Map(),
      seats: new Map<string, Seat>(),
    };
    const sitting = new Sitting(this.#deps, memory, rehearsalKeeper(random, code, of.plan));
    this.#byId.set(id, { sitting, endsAt: clock.now() + lifeMs });
    return id;
  }

  of(id: string): Sitting | null {
    return this.#byId.get(id)?.sitting ?? null;
  }

  byCode(code: string): Sitting | null {
    const all = [...this.#byId.values()].map(({ sitting }) => sitting);
    return all.find(({ memory }) => memory.session.code === code) ?? null;
  }

  bySeat(tokenDigest: string): { sitting: Sitting; seat: string } | null {
    for (const { sitting } of this.#byId.values())
      for (const seat of sitting.memory.seats.values())
        if (seat.tokenDigest === tokenDigest) return { sitting, seat: seat.label };
    return null;
  }

  stop(): void {
    for (const { sitting } of this.#byId.values()) sitting.stop();
    this.#byId.clear();
  }

  #forgetOld(): void {
    for (const [id, { sitting, endsAt }] of this.#byId) {
      if (endsAt > this.#deps.clock.now()) continue;
      sitting.stop();
      this.#byId.delete(id);
    }
  }
}
