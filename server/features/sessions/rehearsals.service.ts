import { methodIds } from '#shared/methods/methods.ts';
import type { SessionPlan } from '#shared/session/events.ts';
import type { Deps } from '../../deps.ts';
import type { Sittings } from '../../live/sittings.ts';
import { getSession } from './sessions.service.ts';

/** Three quick trials: enough to meet every step once, and a void. */
const shortPlan: SessionPlan = {
  method: methodIds[0],
  trials: 3,
  spares: 1,
  rig: 'loudspeaker',
  changeMs: 8_000,
  answerMs: 60_000,
  confidence: true,
  programme: [{ title: 'Any music', start: '0:30', lengthMs: 8_000 }],
};

/**
 * Begins a rehearsal that the caller leads: of a session of theirs, by its own plan, or a short one.
 * @throws Problem `not-found` when the session is not theirs to see
 */
export async function beginRehearsal(
  deps: Deps,
  sittings: Sittings,
  who: { organisationId: string; userId: string; role: string | null },
  sessionId: string | null,
): Promise<{ id: string }> {
  const leader = { organisationId: who.organisationId, proctorId: who.userId };
  if (sessionId === null) {
    const id = await sittings.rehearsals.begin({ ...leader, title: 'Rehearsal', room: 'any room', plan: shortPlan });
    return { id };
  }
  await getSession(deps, who, sessionId);
  const { memory } = await sittings.of(sessionId);
  const { title, session, state } = memory;
  // Levels are measured of the cables themselves; a rehearsal has none.
  const { levels: _, ...plan } = state.plan;
  return { id: await sittings.rehearsals.begin({ ...leader, title, room: session.room, plan }) };
}
