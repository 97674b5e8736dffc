import * as z from 'zod/mini';
import { endpoint } from './endpoint.ts';
import { linkedConsentVersion, takeSeatBody } from './seats.ts';

// What a listener does who comes by the personal link of a mail. The token travels in the body alone, so that it stands
// in no log.

const token = z.string('The link is not complete').check(z.regex(/^[\w-]{64}$/, 'The link is not complete'));

/** What a personal link leads to: the session by its neutral title, and where the listener's attendance stands. */
export const personalInvitation = z.strictObject({
  title: z.string(),
  session: z.int(),
  room: z.string(),
  plannedAt: z.string(),
  timeZone: z.string(),
  minutes: z.int(),
  trials: z.int(),
  state: z.enum(['invited', 'accepted', 'waiting', 'declined']),
  /** From 1, of whoever waits for a seat. */
  waitingPlace: z.nullable(z.int()),
  /** Answers can be changed while it is planned; seats are taken while it is open. */
  phase: z.enum(['planned', 'open', 'over', 'cancelled']),
  running: z.boolean(),
  /** The token of the seat that this listener has taken; the link leads back to it. */
  seat: z.nullable(z.string()),
});
export type PersonalInvitation = z.output<typeof personalInvitation>;

const { code: _code, consentVersion: _version, ...consent } = takeSeatBody.shape;

export const personalLinkApi = {
  look: endpoint({
    method: 'POST',
    path: '/personal-link/look',
    summary: 'What a listener’s personal link leads to',
    access: 'anyone',
    body: z.strictObject({ token }),
    reply: personalInvitation,
  }),
  answer: endpoint({
    method: 'POST',
    path: '/personal-link/answer',
    summary: 'Say whether one comes, or change one’s mind; until seating opens',
    access: 'anyone',
    body: z.strictObject({ token, coming: z.boolean('Say whether you come') }),
    reply: personalInvitation,
  }),
  calendar: endpoint({
    method: 'POST',
    path: '/personal-link/calendar',
    summary: 'The session as a calendar file (RFC 5545)',
    access: 'anyone',
    body: z.strictObject({ token }),
    reply: z.strictObject({ fileName: z.string(), content: z.string() }),
  }),
  takeSeat: endpoint({
    method: 'POST',
    path: '/personal-link/seat',
    summary: 'Consent and take the seat without a code, under the label that this listener has in the study',
    access: 'anyone',
    body: z.strictObject({ token, ...consent, consentVersion: z.literal(linkedConsentVersion) }),
    reply: z.strictObject({ token: z.string(), seat: z.string() }),
  }),
  erase: endpoint({
    method: 'POST',
    path: '/personal-link/erase',
    summary: 'Have one’s e-mail address erased from the study; every link of it ends',
    access: 'anyone',
    body: z.strictObject({ token }),
    reply: z.strictObject({ ok: z.literal(true) }),
  }),
};
