import { z } from 'zod';
import { crew, endpoint } from './endpoint.ts';
import { done, thingParams } from './organisation-params.ts';
import { listQuery, pageOf } from './paging.ts';
import { emailAddress } from './sign-in.ts';

/**
 * Where somebody's attendance at a session stands: a seat is offered, they come, they wait for a seat, they do not come,
 * or the invitation was withdrawn.
 */
export const attendanceStates = ['invited', 'accepted', 'waiting', 'declined', 'withdrawn'] as const;
export type AttendanceState = (typeof attendanceStates)[number];

/** Somebody who is invited to a session, as its crew sees them. It has no field for the label, which stands for answers. */
export const attendanceRow = z.strictObject({
  id: z.uuid(),
  /** Null once it is erased. */
  email: z.string().nullable(),
  state: z.enum(attendanceStates),
  /** From 1, of whoever waits for a seat. */
  waitingPlace: z.int().nullable(),
  /** While the session is open: whether they have taken the seat. */
  seated: z.boolean(),
  invitedAt: z.iso.datetime(),
  answeredAt: z.iso.datetime().nullable(),
});
export type AttendanceRow = z.output<typeof attendanceRow>;

/** How many stand where; seats are those that the protocol registers. */
export const attendanceCounts = z.strictObject({
  seats: z.int(),
  invited: z.int(),
  accepted: z.int(),
  waiting: z.int(),
  declined: z.int(),
});
export type AttendanceCounts = z.output<typeof attendanceCounts>;

const most = 200;

type Line = { readonly number: number; readonly written: string };

/** What stands between commas, semicolons and line ends, with the number of its line; "Name <address>" is its address. */
function writtenIn(text: string): Line[] {
  return text.split('\n').flatMap((line, index) =>
    line
      .split(/[,;]/)
      .map((part) => (/<([^<>]*)>\s*$/.exec(part)?.[1] ?? part).trim())
      .filter((written) => written !== '')
      .map((written) => ({ number: index + 1, written })),
  );
}

function faultsIn(lines: readonly Line[]): string[] {
  const wrong = lines.filter(({ written }) => !emailAddress.safeParse(written).success);
  const told = wrong
    .slice(0, 10)
    .map(({ number, written }) => `Line ${number}: “${written.slice(0, 80)}” is no e-mail address.`);
  return wrong.length > told.length ? [...told, `${wrong.length - told.length} more lines are like that.`] : told;
}

/** E-mail addresses as they are pasted: one a line, or with commas between them. Each comes out once, in lower case. */
export const pastedAddresses = z
  .string('Enter at least one e-mail address')
  .max(20_000, 'At most 20,000 characters at once')
  .transform((text, context) => {
    const lines = writtenIn(text);
    const faults = faultsIn(lines);
    const addresses = [...new Set(lines.map(({ written }) => written.toLowerCase()))];
    if (addresses.length === 0) faults.push('Enter at least one e-mail address.');
    if (addresses.length > most) faults.push(`At most ${most} addresses at once; these are ${addresses.length}.`);
    if (faults.length > 0) context.addIssue({ code: 'custom', message: faults.join(' ') });
    return addresses;
  });

export const attendanceDraft = z.strictObject({ addresses: pastedAddresses });

const ofSession = '/organisations/:organisationId/sessions/:id/attendances';
const one = '/organisations/:organisationId/attendances/:id';
const managing = ['owner', 'manager'] as const;

export const attendancesApi = {
  list: endpoint({
    method: 'GET',
    path: ofSession,
    summary: 'Who is invited to a session as a listener, and what they answered; a proctor sees their own sessions',
    access: crew,
    params: thingParams,
    query: listQuery,
    reply: pageOf(attendanceRow).extend({ counts: attendanceCounts }),
  }),
  invite: endpoint({
    method: 'POST',
    path: ofSession,
    summary: 'Invite listeners to a planned session; beyond the registered seats they go on its waiting list',
    access: managing,
    params: thingParams,
    body: attendanceDraft,
    reply: z.strictObject({ invited: z.int(), waiting: z.int(), already: z.int() }),
  }),
  sendAgain: endpoint({
    method: 'POST',
    path: `${one}/again`,
    summary: 'Send a listener the invitation once more, with a calendar file of the next sequence',
    access: managing,
    params: thingParams,
    reply: done,
  }),
  withdraw: endpoint({
    method: 'DELETE',
    path: one,
    summary: 'Withdraw a listener’s invitation; the next on the waiting list moves up',
    access: managing,
    params: thingParams,
    reply: done,
  }),
  erase: endpoint({
    method: 'POST',
    path: `${one}/erase`,
    summary: 'Erase a listener’s e-mail address from the study; what they answered stays under the label',
    access: managing,
    params: thingParams,
    reply: done,
  }),
};
