import type { AttendanceCounts, AttendanceRow } from '#shared/contracts/attendances.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import * as mails from '../../mail/listener-mails.ts';
import type { Session } from '../sessions/session.entity.ts';
import { findSession, lockSession } from '../sessions/sessions.store.ts';
import { studyById } from '../studies/studies.store.ts';
import { findById } from '../users/users.store.ts';
import type { Attendance } from './attendance.entity.ts';
import * as store from './attendances.store.ts';
import { listenerOf } from './listeners.service.ts';
import { changeState, lastPosition, moveUp, placeAmong } from './seats-and-waiting.service.ts';
import { occasionOf, tell } from './telling.service.ts';

type Who = { organisationId: string; userId: string; role: string | null };

/** @throws Problem `not-found`, also for a proctor of other sessions */
async function visibleSession(tx: Tx, who: Who, id: string): Promise<Session> {
  const session = await findSession(tx, who.organisationId, id);
  if (session === null || (who.role === 'proctor' && session.proctorId !== who.userId))
    throw new Problem('not-found', 'There is no such session.');
  return session;
}

/** The session, locked, while its invitations can still change. @throws Problem */
export async function plannedSession(tx: Tx, organisationId: string, id: string): Promise<Session> {
  const session = await lockSession(tx, organisationId, id);
  if (session === null) throw new Problem('not-found', 'There is no such session.');
  if (session.phase !== 'planned')
    throw new Problem('wrong-phase', 'Invitations can be changed until the session’s seating opens.');
  return session;
}

const isOpen = ({ phase }: Session) => phase === 'seating' || phase === 'revealing' || phase === 'running';

export function waitingPlaceOf(attendances: readonly Attendance[], { id, state }: Attendance): number | null {
  if (state !== 'waiting') return null;
  return attendances.filter((other) => other.state === 'waiting').findIndex((other) => other.id === id) + 1;
}

async function rowsOf(tx: Tx, session: Session, shown: readonly Attendance[], all: readonly Attendance[]) {
  const listeners = await store.listenersById(
    tx,
    shown.map(({ listenerId }) => listenerId),
  );
  return shown.map((attendance): AttendanceRow => {
    const { id, listenerId, state, seated, invitedAt, answeredAt } = attendance;
    return {
      id,
      email: listeners.find((listener) => listener.id === listenerId)?.email ?? null,
      state,
      waitingPlace: waitingPlaceOf(all, attendance),
      seated: isOpen(session) && seated,
      invitedAt: invitedAt.toISOString(),
      answeredAt: answeredAt?.toISOString() ?? null,
    };
  });
}

function countsOf(all: readonly Attendance[], seats: number): AttendanceCounts {
  const of = (wanted: Attendance['state']) => all.filter(({ state }) => state === wanted).length;
  return { seats, invited: of('invited'), accepted: of('accepted'), waiting: of('waiting'), declined: of('declined') };
}

export function listAttendances({ db }: Deps, who: Who, sessionId: string, query: { q: string; page: number }) {
  return withTransaction(db, async (tx) => {
    const session = await visibleSession(tx, who, sessionId);
    const all = await store.attendancesOf(tx, sessionId);
    const found = await store.listAttendances(tx, sessionId, query);
    const { seats } = await occasionOf(tx, session);
    return { ...found, rows: await rowsOf(tx, session, found.rows, all), counts: countsOf(all, seats) };
  });
}

/** Whoever runs the session or knows the codes cannot be one of its listeners. */
async function requireUninvolved(tx: Tx, session: Session, addresses: readonly string[]): Promise<void> {
  const { codeHolderId } = await studyById(tx, session.studyId);
  const faults: string[] = [];
  for (const [userId, duty] of [
    [codeHolderId, 'holds the study’s codes'],
    [session.proctorId, 'is the session’s proctor'],
  ] as const) {
    const email = (await findById(tx, userId))?.email.toLowerCase();
    if (email !== undefined && addresses.includes(email)) faults.push(`${email} ${duty} and cannot be a listener.`);
  }
  if (faults.length > 0)
    throw new Problem('invalid-input', 'Nobody was invited.', [{ pointer: '/addresses', detail: faults.join(' ') }]);
}

/** Invites listeners in the order given; whoever finds no seat free waits for one. Nobody is invited twice. */
export function inviteListeners(
  deps: Deps,
  who: Who,
  sessionId: string,
  { addresses }: { addresses: readonly string[] },
): Promise<{ invited: number; waiting: number; already: number }> {
  return withTransaction(deps.db, async (tx) => {
    const session = await plannedSession(tx, who.organisationId, sessionId);
    await requireUninvolved(tx, session, addresses);
    const { seats } = await occasionOf(tx, session);
    const done = { invited: 0, waiting: 0, already: 0 };
    for (const email of addresses) {
      const listener = await listenerOf(tx, deps, session, email);
      const all = await store.attendancesOf(tx, sessionId);
      const known = all.find(({ listenerId }) => listenerId === listener.id);
      if (known !== undefined && known.state !== 'withdrawn') {
        done.already += 1;
        continue;
      }
      const isSeated = placeAmong(all, seats) === 'seat';
      const state = isSeated ? 'invited' : 'waiting';
      const attendance: Attendance = {
        id: known?.id ?? deps.random.id(),
        organisationId: session.organisationId,
        sessionId,
        listenerId: listener.id,
        state,
        position: lastPosition(all) + 1,
        sequence: known?.sequence ?? null,
        inCalendar: known?.inCalendar ?? false,
        seated: false,
        reminderId: null,
        invitedBy: who.userId,
        invitedAt: new Date(deps.clock.now()),
        answeredAt: null,
      };
      if (known === undefined) await store.insertAttendance(tx, attendance);
      else await store.updateAttendance(tx, attendance.id, attendance);
      await tellOfPlace(tx, deps, session, attendance);
      await changeState(tx, deps, session, attendance, { state });
      done[state] += 1;
    }
    return done;
  });
}

function tellOfPlace(tx: Tx, deps: Deps, session: Session, attendance: Attendance): Promise<void> {
  return attendance.state === 'waiting'
    ? tell(tx, deps, session, attendance, mails.waitingMail, null)
    : tell(tx, deps, session, attendance, mails.listenerInvitationMail, 'REQUEST');
}

async function attendanceToChange(tx: Tx, organisationId: string, id: string) {
  const found = await store.findAttendance(tx, id);
  if (found === null || found.organisationId !== organisationId || found.state === 'withdrawn')
    throw new Problem('not-found', 'There is no such invitation; it may have been withdrawn.');
  const session = await plannedSession(tx, organisationId, found.sessionId);
  const attendance = await store.findAttendance(tx, id);
  if (attendance === null) throw new Problem('not-found', 'There is no such invitation.');
  return { session, attendance };
}

/** Sends the invitation once more, as it stands now. */
export function sendAgain(deps: Deps, where: { organisationId: string; id: string }) {
  return withTransaction(deps.db, async (tx) => {
    const { session, attendance } = await attendanceToChange(tx, where.organisationId, where.id);
    if (attendance.state === 'declined')
      throw new Problem('wrong-phase', 'This listener does not come. Their link still lets them change their mind.');
    await tellOfPlace(tx, deps, session, attendance);
    return { ok: true } as const;
  });
}

/** Withdraws an invitation; its link ends, and the seat goes to whoever waits longest. */
export function withdraw(deps: Deps, where: { organisationId: string; id: string }) {
  return withTransaction(deps.db, async (tx) => {
    const { session, attendance } = await attendanceToChange(tx, where.organisationId, where.id);
    if (attendance.state !== 'declined') await tell(tx, deps, session, attendance, mails.withdrawnMail, 'CANCEL');
    await changeState(tx, deps, session, attendance, { state: 'withdrawn' });
    await moveUp(tx, deps, session);
    return { ok: true } as const;
  });
}
