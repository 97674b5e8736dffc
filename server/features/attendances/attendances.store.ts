import { In, Not } from 'typeorm';
import type { AttendanceState } from '#shared/contracts/attendances.ts';
import { likePattern, pageOfRows } from '../../db/paging.ts';
import type { Tx } from '../../db/transaction.ts';
import { Attendance } from './attendance.entity.ts';
import { Listener } from './listener.entity.ts';

export function findAttendance(tx: Tx, id: string): Promise<Attendance | null> {
  return tx.findOneBy(Attendance, { id });
}

export function attendancesOf(tx: Tx, sessionId: string): Promise<Attendance[]> {
  return tx.find(Attendance, { where: { sessionId }, order: { position: 'ASC' } });
}

export function attendancesOfListener(tx: Tx, listenerId: string): Promise<Attendance[]> {
  return tx.findBy(Attendance, { listenerId, state: Not('withdrawn') });
}

/** A page of a session's attendances in the order of the seats; words are looked for in the addresses. */
export async function listAttendances(tx: Tx, sessionId: string, { q, page }: { q: string; page: number }) {
  const rows = tx
    .createQueryBuilder(Attendance, 'attendance')
    .innerJoin(Listener, 'listener', 'listener.id = attendance.listenerId')
    .where('attendance.sessionId = :sessionId', { sessionId })
    .orderBy('attendance.position')
    .addOrderBy('attendance.id');
  if (q !== '') rows.andWhere('listener.email like :q', { q: likePattern(q) });
  return pageOfRows(rows, page);
}

export async function insertAttendance(tx: Tx, attendance: Attendance): Promise<void> {
  await tx.insert(Attendance, attendance);
}

export async function updateAttendance(tx: Tx, id: string, change: Partial<Attendance>): Promise<void> {
  await tx.update(Attendance, { id }, change);
}

export function listenersById(tx: Tx, ids: readonly string[]): Promise<Listener[]> {
  return ids.length === 0 ? Promise.resolve([]) : tx.findBy(Listener, { id: In([...ids]) });
}

export function listenerById(tx: Tx, id: string): Promise<Listener> {
  return tx.findOneByOrFail(Listener, { id });
}

export function listenersByEmail(tx: Tx, studyId: string, emails: readonly string[]): Promise<Listener[]> {
  return tx.findBy(Listener, { studyId, email: In([...emails]) });
}

export async function insertListener(tx: Tx, listener: Listener): Promise<void> {
  await tx.insert(Listener, listener);
}

/** The label that a listener has in the study; null before their first seat. */
export async function labelOf(tx: Tx, listenerId: string): Promise<string | null> {
  return (await listenerById(tx, listenerId)).label;
}

/** A listener has taken the seat of an attendance, and keeps its label in the study from now on. */
export async function noteSeated(
  tx: Tx,
  { attendanceId, listenerId }: { attendanceId: string; listenerId: string },
  label: string,
): Promise<void> {
  await tx.update(Listener, { id: listenerId }, { label });
  await tx.update(Attendance, { id: attendanceId }, { seated: true });
}

export async function eraseEmail(tx: Tx, listenerId: string): Promise<void> {
  await tx.update(Listener, { id: listenerId }, { email: null });
}

const seatHolding: readonly AttendanceState[] = ['invited', 'accepted'];
export const holdsSeat = ({ state }: { state: AttendanceState }): boolean => seatHolding.includes(state);
