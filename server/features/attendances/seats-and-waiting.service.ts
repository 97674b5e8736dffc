import type { AttendanceState } from '#shared/contracts/attendances.ts';
import type { Tx } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import * as mails from '../../mail/listener-mails.ts';
import type { Session } from '../sessions/session.entity.ts';
import type { Attendance } from './attendance.entity.ts';
import { attendancesOf, holdsSeat, updateAttendance } from './attendances.store.ts';
import { occasionOf, setReminder, tell } from './telling.service.ts';

/** A seat, as long as one is free and nobody waits for it; otherwise the end of the waiting list. */
export function placeAmong(others: readonly Attendance[], seats: number): 'seat' | 'waiting' {
  const isFree = others.filter(holdsSeat).length < seats;
  return isFree && !others.some(({ state }) => state === 'waiting') ? 'seat' : 'waiting';
}

export const lastPosition = (attendances: readonly Attendance[]): number =>
  attendances.reduce((last, { position }) => Math.max(last, position), 0);

/** Puts an attendance into another state; the reminder follows. */
export async function changeState(
  tx: Tx,
  deps: Deps,
  session: Session,
  attendance: Attendance,
  change: { state: AttendanceState; answeredAt?: Date | null; position?: number },
): Promise<void> {
  Object.assign(attendance, change);
  await updateAttendance(tx, attendance.id, change);
  await setReminder(tx, deps, session, attendance);
}

/** Gives the seats that are free to whoever waits longest, and tells them. */
export async function moveUp(tx: Tx, deps: Deps, session: Session): Promise<void> {
  const attendances = await attendancesOf(tx, session.id);
  const { seats } = await occasionOf(tx, session);
  const free = seats - attendances.filter(holdsSeat).length;
  const next = attendances.filter(({ state }) => state === 'waiting').slice(0, Math.max(0, free));
  for (const attendance of next) {
    await changeState(tx, deps, session, attendance, { state: 'invited', answeredAt: null });
    await tell(tx, deps, session, attendance, mails.movedUpMail, 'REQUEST');
  }
}
