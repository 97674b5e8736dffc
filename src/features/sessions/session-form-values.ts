import { z } from 'zod';
import { type SessionRow, sessionDraft, sessionMove } from '#shared/contracts/sessions.ts';
import { timeZone } from '../../lib/format.ts';

/** A date and time of this browser's zone, as its field holds it, in UTC; what is none stays as it was typed. */
function utcOf(local: string): string {
  const at = new Date(local);
  return local === '' || Number.isNaN(at.getTime()) ? local : at.toISOString();
}

/** A time as the field for date and time holds it, in this browser's zone. */
function localOf(iso: string): string {
  const at = new Date(iso);
  return new Date(at.getTime() - at.getTimezoneOffset() * 60_000).toISOString().slice(0, 16);
}

const typedTime = z.string().transform(utcOf).pipe(sessionDraft.shape.plannedAt);

/** The contract's draft as it is typed: the time in the reader's own zone, everything else as it is. */
export const typedSession = sessionDraft.extend({ plannedAt: typedTime });
export type SessionFormValues = z.input<typeof typedSession>;

export const emptySession = (): SessionFormValues => ({
  plannedAt: '',
  timeZone: timeZone(),
  room: '',
  proctorId: '',
});

export const typedMove = sessionMove.extend({ plannedAt: typedTime });
export type MoveFormValues = z.input<typeof typedMove>;

export const moveOf = ({ plannedAt, timeZone: zone, room }: SessionRow): MoveFormValues => ({
  plannedAt: localOf(plannedAt),
  timeZone: zone,
  room,
});
