import { createHash } from 'node:crypto';
import type { OpenSession } from '#shared/contracts/seats.ts';
import { Problem } from '#shared/problem.ts';
import { sessionMinutes } from '#shared/session/session-minutes.ts';
import type { Deps } from '../../deps.ts';
import type { Sitting } from '../../live/sitting.ts';
import type { Sittings } from '../../live/sittings.ts';
import { sessionByCode } from './sessions.store.ts';

export const tokenDigest = (token: string) => createHash('sha256').update(token).digest('hex');

/** The session or rehearsal that takes listeners under a code. */
async function sittingUnder({ db }: Deps, sittings: Sittings, code: string): Promise<Sitting> {
  const session = await sessionByCode(db.manager, code);
  const sitting = session === null ? sittings.rehearsals.byCode(code) : await sittings.of(session.id);
  if (sitting === null)
    throw new Problem('not-found', 'No session takes listeners under this code. Check it on the proctor’s screen.');
  return sitting;
}

/** What a listener is told before taking a seat. */
export async function lookAtSession(deps: Deps, sittings: Sittings, code: string): Promise<OpenSession> {
  const { memory } = await sittingUnder(deps, sittings, code);
  return {
    title: memory.title,
    room: memory.session.room,
    minutes: sessionMinutes(memory.state.plan, memory.method),
    trials: memory.state.plan.trials,
    running: memory.state.phase === 'running',
    rehearsal: memory.isRehearsal,
  };
}

/** Takes a seat: consent, a label in the study, and a token that is the seat. */
export async function takeSeat(
  deps: Deps,
  sittings: Sittings,
  body: { code: string; place: string; commitment: string; consentVersion: number },
): Promise<{ token: string; seat: string }> {
  const sitting = await sittingUnder(deps, sittings, body.code);
  return sitting.takeSeat(body, null);
}
