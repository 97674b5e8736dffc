import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { eraseMailTo } from '../../mail/outbox.ts';
import type { Session } from '../sessions/session.entity.ts';
import { lockSession } from '../sessions/sessions.store.ts';
import * as store from './attendances.store.ts';
import type { Listener } from './listener.entity.ts';
import { changeState, moveUp } from './seats-and-waiting.service.ts';

/** The listener of an address in a study: always the same one, so that one person is one listener. */
export async function listenerOf(
  tx: Tx,
  { random }: Deps,
  { organisationId, studyId }: Session,
  email: string,
): Promise<Listener> {
  const [known] = await store.listenersByEmail(tx, studyId, [email]);
  if (known !== undefined) return known;
  const listener = { id: random.id(), organisationId, studyId, email, label: null };
  await store.insertListener(tx, listener);
  return listener;
}

/**
 * Erases the address of a listener: from the study, from its mail, and with it every personal link. What was answered
 * stays under the label. Seats of planned sessions are given to whoever waits.
 */
export async function eraseListener(tx: Tx, deps: Deps, listenerId: string): Promise<void> {
  for (const found of await store.attendancesOfListener(tx, listenerId)) {
    const session = await lockSession(tx, found.organisationId, found.sessionId);
    if (session?.phase !== 'planned') continue;
    await changeState(tx, deps, session, found, { state: 'withdrawn' });
    await moveUp(tx, deps, session);
  }
  await eraseMailTo(tx, listenerId);
  await store.eraseEmail(tx, listenerId);
}

export function erase(deps: Deps, { organisationId, id }: { organisationId: string; id: string }) {
  return withTransaction(deps.db, async (tx) => {
    const attendance = await store.findAttendance(tx, id);
    if (attendance === null || attendance.organisationId !== organisationId)
      throw new Problem('not-found', 'There is no such invitation.');
    await eraseListener(tx, deps, attendance.listenerId);
    return { ok: true } as const;
  });
}
