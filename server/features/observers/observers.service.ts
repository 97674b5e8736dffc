import type { ObserverDraft, ObserverRow } from '#shared/contracts/observers.ts';
import { Problem } from '#shared/problem.ts';
import { hasSigned } from '#shared/session/observers.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import type { Sittings } from '../../live/sittings.ts';
import { observerMail } from '../../mail/observer-mails.ts';
import { postMail } from '../../mail/outbox.ts';
import { pageAddresses } from '../../mail/page-addresses.ts';
import { listenersByEmail } from '../attendances/attendances.store.ts';
import { observerIn, observerTokenOf } from '../attendances/personal-link.ts';
import { occasionOf } from '../attendances/telling.service.ts';
import type { Session } from '../sessions/session.entity.ts';
import { findSession, lockSession, sessionById } from '../sessions/sessions.store.ts';
import { studyById } from '../studies/studies.store.ts';
import { findById, membersOf, namesOf } from '../users/users.store.ts';
import type { Observer } from './observer.entity.ts';
import * as store from './observers.store.ts';

type Who = { organisationId: string; userId: string; role: string | null };

const most = 4;
const noObserver = () =>
  new Problem('not-found', 'This link leads to no session to watch. It may have been withdrawn.');

const rowOf = (observer: Observer, hasSignedIt: boolean): ObserverRow => ({
  id: observer.id,
  label: observer.label,
  name: observer.name,
  email: observer.email,
  invitedAt: observer.invitedAt.toISOString(),
  hasSigned: hasSignedIt,
});

/** Who is asked to watch a session. @throws Problem `not-found`, also for a proctor of other sessions */
export async function listObservers(deps: Deps, sittings: Sittings, who: Who, sessionId: string) {
  const rows = await withTransaction(deps.db, async (tx) => {
    const session = await findSession(tx, who.organisationId, sessionId);
    if (session === null || (who.role === 'proctor' && session.proctorId !== who.userId))
      throw new Problem('not-found', 'There is no such session.');
    return store.observersOf(tx, sessionId);
  });
  const { state } = (await sittings.of(sessionId)).memory;
  return { rows: rows.filter(({ withdrawn }) => !withdrawn).map((row) => rowOf(row, hasSigned(state, row.label))) };
}

/** Asks somebody to watch; they get a link of their own by mail, under the neutral title. */
export function planObserver(deps: Deps, who: Who, sessionId: string, draft: ObserverDraft): Promise<ObserverRow> {
  return withTransaction(deps.db, async (tx) => {
    const session = await lockSession(tx, who.organisationId, sessionId);
    if (session === null) throw new Problem('not-found', 'There is no such session.');
    if (session.phase === 'finished' || session.phase === 'abandoned')
      throw new Problem('wrong-phase', 'The session is over; nobody can watch it any more.');
    const all = await store.observersOf(tx, sessionId);
    const asked = all.filter(({ withdrawn }) => !withdrawn);
    if (asked.length >= most) throw new Problem('wrong-phase', `At most ${most} observers watch a session.`);
    if (asked.some(({ email }) => email === draft.email))
      throw new Problem('invalid-input', 'Nobody was asked.', [
        { pointer: '/email', detail: 'This address is asked to watch already' },
      ]);
    const observer: Observer = {
      id: deps.random.id(),
      organisationId: who.organisationId,
      sessionId,
      label: `W${all.length + 1}`,
      ...draft,
      invitedAt: new Date(deps.clock.now()),
      withdrawn: false,
    };
    await store.insertObserver(tx, observer);
    const { title, minutes } = await occasionOf(tx, session);
    const { number, room, plannedAt, timeZone, organisationId } = session;
    const invitedBy = (await namesOf(tx, [who.userId])).get(who.userId) ?? 'Fairlead';
    const url = pageAddresses.observer(deps.config, observerTokenOf(deps.config, observer.id));
    const mail = observerMail({ title, number, minutes, room, plannedAt, timeZone, invitedBy, url });
    await postMail(tx, deps, { organisationId, recipient: observer.email }, mail);
    return rowOf(observer, false);
  });
}

export function withdrawObserver(deps: Deps, where: { organisationId: string; id: string }) {
  return withTransaction(deps.db, async (tx) => {
    const observer = await store.findObserver(tx, where.id);
    if (observer === null || observer.organisationId !== where.organisationId || observer.withdrawn)
      throw new Problem('not-found', 'There is no such observer.');
    await store.withdrawObserver(tx, observer.id);
    return { ok: true } as const;
  });
}

/** Whose link a token is. Never given and withdrawn look alike. @throws Problem `not-found` */
export async function observerByToken(tx: Tx, { config }: Deps, token: string): Promise<Observer> {
  const id = observerIn(config, token);
  const observer = id === null ? null : await store.findObserver(tx, id);
  if (observer === null || observer.withdrawn) throw noObserver();
  return observer;
}

/** What else this person does in the study: with any of it they are no witness. */
export function dutiesOf(deps: Deps, observer: Observer): Promise<string[]> {
  return withTransaction(deps.db, async (tx) => {
    const session = await sessionById(tx, observer.sessionId);
    if (session === null) throw noObserver();
    return dutiesIn(tx, session, observer.email.toLowerCase());
  });
}

async function dutiesIn(tx: Tx, session: Session, email: string): Promise<string[]> {
  const { codeHolderId, managerId } = await studyById(tx, session.studyId);
  const emailOf = async (userId: string) => (await findById(tx, userId))?.email.toLowerCase();
  const members = await membersOf(tx, session.organisationId);
  const roles: string[] = [];
  for (const { userId, role } of members)
    if ((role === 'owner' || role === 'manager') && (await emailOf(userId)) === email) roles.push(role);
  const listens = (await listenersByEmail(tx, session.studyId, [email])).length > 0;
  const duties = [
    ...((await emailOf(session.proctorId)) === email ? ['proctor'] : []),
    ...((await emailOf(managerId)) === email ? ['manager'] : []),
    ...((await emailOf(codeHolderId)) === email ? ['code holder'] : []),
    ...roles,
    ...(listens ? ['listener'] : []),
  ];
  return [...new Set(duties)];
}
