import { methodOf } from '#shared/methods/methods.ts';
import { sessionPlanOf } from '#shared/protocol/protocol.ts';
import { sessionMinutes } from '#shared/session/session-minutes.ts';
import type { Tx } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { calendarFile } from '../../mail/calendar-file.ts';
import * as mails from '../../mail/listener-mails.ts';
import type { MailContent } from '../../mail/mails.ts';
import { postMail, takeBack } from '../../mail/outbox.ts';
import { pageAddresses } from '../../mail/page-addresses.ts';
import type { Session } from '../sessions/session.entity.ts';
import { protocolOf } from '../studies/studies.service.ts';
import { studyById } from '../studies/studies.store.ts';
import { namesOf } from '../users/users.store.ts';
import type { Attendance } from './attendance.entity.ts';
import { attendancesOf, holdsSeat, listenerById, updateAttendance } from './attendances.store.ts';
import { linkTokenOf } from './personal-link.ts';

export const reminderBeforeMs = 24 * 60 * 60 * 1000;

/** What a session takes of its sealed protocol, as its listeners need to know it. */
export async function occasionOf(tx: Tx, session: Session) {
  const study = await studyById(tx, session.studyId);
  const plan = sessionPlanOf(protocolOf(study));
  return {
    title: study.title,
    seats: study.draft.listenersPerSession,
    trials: plan.trials,
    minutes: sessionMinutes(plan, methodOf(plan.method)),
  };
}

/** One listener's session, in the words that mail and calendar use: the neutral title and nothing of a cable. */
async function invitationTo(tx: Tx, { config }: Deps, session: Session, attendance: Attendance) {
  const { title, minutes } = await occasionOf(tx, session);
  const { room, plannedAt, timeZone, number } = session;
  const names = await namesOf(tx, [attendance.invitedBy]);
  const invitedBy = names.get(attendance.invitedBy) ?? 'Fairlead';
  const url = pageAddresses.personalLink(config, linkTokenOf(config, attendance.id));
  return { title, number, minutes, room, plannedAt, timeZone, invitedBy, url };
}

/**
 * Tells a listener what became of their attendance, and puts the session into their calendar or takes it out. A listener
 * whose address is erased is told nothing.
 *
 * @param calendar REQUEST to put it in, CANCEL to take it out if it is in, null to leave the calendar alone
 */
export async function tell(
  tx: Tx,
  deps: Deps,
  session: Session,
  attendance: Attendance,
  content: (to: mails.ListenerInvitation) => MailContent,
  calendar: 'REQUEST' | 'CANCEL' | null,
): Promise<void> {
  const { email } = await listenerById(tx, attendance.listenerId);
  if (email === null) return;
  const to = await invitationTo(tx, deps, session, attendance);
  const addressed = { organisationId: session.organisationId, recipient: email, listenerId: attendance.listenerId };
  const isDue = calendar === 'REQUEST' || (calendar === 'CANCEL' && attendance.inCalendar);
  if (!isDue || calendar === null) {
    await postMail(tx, deps, addressed, content(to));
    return;
  }
  attendance.sequence = attendance.sequence === null ? 0 : attendance.sequence + 1;
  attendance.inCalendar = calendar === 'REQUEST';
  const { sequence, inCalendar } = attendance;
  await updateAttendance(tx, attendance.id, { sequence, inCalendar });
  const file = calendarFile(deps, { ...to, method: calendar, uid: attendance.id, sequence, attendee: email });
  await postMail(tx, deps, addressed, content(to), { calendar: { method: calendar, content: file } });
}

/** The same session as a file to be put into a calendar by hand. */
export async function calendarOf(tx: Tx, deps: Deps, session: Session, attendance: Attendance): Promise<string> {
  const to = await invitationTo(tx, deps, session, attendance);
  const sequence = attendance.sequence ?? 0;
  return calendarFile(deps, { ...to, method: 'PUBLISH', uid: attendance.id, sequence, attendee: null });
}

/** Sees to it that whoever holds a seat is reminded a day before, and nobody else; writes a waiting reminder anew. */
export async function setReminder(tx: Tx, deps: Deps, session: Session, attendance: Attendance): Promise<void> {
  if (attendance.reminderId !== null) await takeBack(tx, deps, attendance.reminderId);
  attendance.reminderId = null;
  const dueAt = session.plannedAt.getTime() - reminderBeforeMs;
  const { email } = await listenerById(tx, attendance.listenerId);
  if (holdsSeat(attendance) && email !== null && dueAt > deps.clock.now()) {
    const to = await invitationTo(tx, deps, session, attendance);
    const { organisationId } = session;
    const addressed = { organisationId, recipient: email, listenerId: attendance.listenerId };
    attendance.reminderId = await postMail(tx, deps, addressed, mails.reminderMail(to), { dueAt });
  }
  await updateAttendance(tx, attendance.id, { reminderId: attendance.reminderId });
}

/** Takes back the reminders of a session that were not sent. */
export async function dropReminders(tx: Tx, deps: Deps, sessionId: string): Promise<void> {
  for (const { id, reminderId } of await attendancesOf(tx, sessionId)) {
    if (reminderId === null) continue;
    await takeBack(tx, deps, reminderId);
    await updateAttendance(tx, id, { reminderId: null });
  }
}

/** A planned session does not take place: whoever holds a seat or waits for one is told. */
export async function tellCancelled(tx: Tx, deps: Deps, session: Session): Promise<void> {
  await dropReminders(tx, deps, session.id);
  for (const attendance of await attendancesOf(tx, session.id))
    if (holdsSeat(attendance) || attendance.state === 'waiting')
      await tell(tx, deps, session, attendance, mails.cancelledMail, 'CANCEL');
}
