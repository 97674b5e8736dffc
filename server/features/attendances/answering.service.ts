import type { PersonalInvitation } from '#shared/contracts/personal-link.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import type { Sittings } from '../../live/sittings.ts';
import * as mails from '../../mail/listener-mails.ts';
import type { Session } from '../sessions/session.entity.ts';
import { lockSession, sessionById } from '../sessions/sessions.store.ts';
import type { Attendance } from './attendance.entity.ts';
import * as store from './attendances.store.ts';
import { waitingPlaceOf } from './inviting.service.ts';
import { eraseListener } from './listeners.service.ts';
import { attendanceIn, seatTokenOf } from './personal-link.ts';
import { changeState, lastPosition, moveUp, placeAmong } from './seats-and-waiting.service.ts';
import { calendarOf, occasionOf, tell } from './telling.service.ts';

const noInvitation = () =>
  new Problem('not-found', 'This link leads to no invitation. It was withdrawn, or the address was erased.');

/** What a link leads to. Never given, withdrawn and erased all look alike. @throws Problem `not-found` */
async function foundBy(tx: Tx, { config }: Deps, token: string): Promise<{ attendance: Attendance; session: Session }> {
  const id = attendanceIn(config, token);
  const attendance = id === null ? null : await store.findAttendance(tx, id);
  if (attendance === null || attendance.state === 'withdrawn') throw noInvitation();
  const { email } = await store.listenerById(tx, attendance.listenerId);
  const session = await sessionById(tx, attendance.sessionId);
  if (email === null || session === null) throw noInvitation();
  return { attendance, session };
}

/** The same with the session locked, so that two answers never give one seat twice. */
async function lockedBy(tx: Tx, deps: Deps, token: string) {
  const { session } = await foundBy(tx, deps, token);
  await lockSession(tx, session.organisationId, session.id);
  return foundBy(tx, deps, token);
}

function phaseOf({ phase, listeners }: Session): PersonalInvitation['phase'] {
  if (phase === 'planned') return 'planned';
  if (phase === 'abandoned' && listeners === 0) return 'cancelled';
  return phase === 'finished' || phase === 'abandoned' ? 'over' : 'open';
}

async function viewOf(tx: Tx, { config }: Deps, attendance: Attendance, session: Session): Promise<PersonalInvitation> {
  const { title, minutes, trials } = await occasionOf(tx, session);
  const { state } = attendance;
  if (state === 'withdrawn') throw noInvitation();
  return {
    title,
    session: session.number,
    room: session.room,
    plannedAt: session.plannedAt.toISOString(),
    timeZone: session.timeZone,
    minutes,
    trials,
    state,
    waitingPlace: waitingPlaceOf(await store.attendancesOf(tx, session.id), attendance),
    phase: phaseOf(session),
    running: session.phase === 'running',
    seat: attendance.seated ? seatTokenOf(config, attendance.id) : null,
  };
}

export function lookAtInvitation(deps: Deps, token: string): Promise<PersonalInvitation> {
  return withTransaction(deps.db, async (tx) => {
    const { attendance, session } = await foundBy(tx, deps, token);
    return viewOf(tx, deps, attendance, session);
  });
}

async function accept(tx: Tx, deps: Deps, attendance: Attendance, session: Session, answeredAt: Date): Promise<void> {
  if (attendance.state === 'invited')
    return changeState(tx, deps, session, attendance, { state: 'accepted', answeredAt });
  if (attendance.state !== 'declined') return;
  const all = await store.attendancesOf(tx, session.id);
  const { seats } = await occasionOf(tx, session);
  const isSeated = placeAmong(all, seats) === 'seat';
  const state = isSeated ? 'accepted' : 'waiting';
  await changeState(tx, deps, session, attendance, { state, answeredAt, position: lastPosition(all) + 1 });
  if (isSeated) await tell(tx, deps, session, attendance, mails.acceptedAfterAllMail, 'REQUEST');
  else await tell(tx, deps, session, attendance, mails.waitingMail, null);
}

async function decline(tx: Tx, deps: Deps, attendance: Attendance, session: Session, answeredAt: Date): Promise<void> {
  if (attendance.state === 'declined') return;
  await changeState(tx, deps, session, attendance, { state: 'declined', answeredAt });
  await tell(tx, deps, session, attendance, mails.declinedMail, 'CANCEL');
  await moveUp(tx, deps, session);
}

/** Says whether a listener comes. A seat that becomes free goes to whoever waits longest. */
export function answerInvitation(deps: Deps, token: string, coming: boolean): Promise<PersonalInvitation> {
  return withTransaction(deps.db, async (tx) => {
    const { attendance, session } = await lockedBy(tx, deps, token);
    if (session.phase !== 'planned')
      throw new Problem('too-late', 'The session has begun or is over; its invitations cannot be answered any more.');
    const now = new Date(deps.clock.now());
    await (coming ? accept : decline)(tx, deps, attendance, session, now);
    return viewOf(tx, deps, attendance, session);
  });
}

export function calendarFor(deps: Deps, token: string): Promise<{ fileName: string; content: string }> {
  return withTransaction(deps.db, async (tx) => {
    const { attendance, session } = await foundBy(tx, deps, token);
    return { fileName: 'session.ics', content: await calendarOf(tx, deps, session, attendance) };
  });
}

type Consent = { token: string; place: string; commitment: string; consentVersion: number };

/** Takes the seat of a personal link: without a code, and under the label that the listener has in the study. */
export async function takeLinkedSeat(deps: Deps, sittings: Sittings, { token, ...consent }: Consent) {
  const { attendance, session, seats } = await withTransaction(deps.db, async (tx) => {
    const found = await foundBy(tx, deps, token);
    return { ...found, seats: (await occasionOf(tx, found.session)).seats };
  });
  const sitting = await sittings.of(session.id);
  if (sitting.memory.state.phase === 'planned')
    throw new Problem('too-early', 'Seats are taken once the proctor opens the seating. Try again in the room.');
  const taken = sitting.memory.state.seats.filter(({ left }) => !left).length;
  if (!attendance.seated && !store.holdsSeat(attendance) && taken >= seats)
    throw new Problem('wrong-phase', 'Every seat of this session is taken. Ask the proctor.');
  const { id: attendanceId, listenerId } = attendance;
  return sitting.takeSeat(consent, { attendanceId, listenerId, seatToken: seatTokenOf(deps.config, attendanceId) });
}

/** A listener has their own address erased. */
export function eraseOwn(deps: Deps, token: string) {
  return withTransaction(deps.db, async (tx) => {
    const { attendance } = await foundBy(tx, deps, token);
    await eraseListener(tx, deps, attendance.listenerId);
    return { ok: true } as const;
  });
}
