import { z } from 'zod';
import { sessionDraft } from '#shared/contracts/sessions.ts';

/** A date and time of this browser's zone, as its field holds it, in UTC; what is none stays as it was typed. */
function utcOf(local: string): string {
  const at = new Date(local);
  return local === '' || Number.isNaN(at.getTime()) ? local : at.toISOString();
}

/** The contract's draft as it is typed: the time in the reader's own zone, everything else as it is. */
export const typedSession = sessionDraft.extend({
  plannedAt: z.string().transform(utcOf).pipe(sessionDraft.shape.plannedAt),
});
export type SessionFormValues = z.input<typeof typedSession>;

export const emptySession: SessionFormValues = { plannedAt: '', room: '', proctorId: '' };
