import * as z from 'zod/mini';
import { endpoint } from './endpoint.ts';

// What a phone loads is written with zod's small build, which keeps the listener's page light.

const hex = (bytes: number) => z.string().check(z.regex(new RegExp(`^[0-9a-f]{${bytes * 2}}$`), 'Not readable'));

/** A session code: six letters and figures that cannot be taken for one another, typed without regard to case. */
export const sessionCode = z
  .string()
  .check(z.trim(), z.toUpperCase(), z.regex(/^[2-9A-HJ-NP-Z]{6}$/, 'Enter the six characters on the screen'));

/** What a listener agrees to who joins by code; the phone's words of it. A change of the words is another version. */
export const consentVersion = 1;
/** The same for whoever comes by a personal link, whose address stands beside the label until it is erased. */
export const linkedConsentVersion = 2;

/** What a phone learns before it takes a seat. */
export const openSession = z.strictObject({
  title: z.string(),
  room: z.string(),
  minutes: z.int(),
  trials: z.int(),
  running: z.boolean(),
  rehearsal: z.boolean(),
});
export type OpenSession = z.output<typeof openSession>;

export const takeSeatBody = z.strictObject({
  code: sessionCode,
  place: z.string().check(z.trim(), z.maxLength(24, 'At most 24 characters')),
  adult: z.literal(true, 'Only adults can take part'),
  agreed: z.literal(true, 'Please agree, or leave this page'),
  consentVersion: z.literal(consentVersion),
  /** SHA-256 commitment to 32 random bytes of the phone's own. */
  commitment: hex(32),
});

export const seatsApi = {
  look: endpoint({
    method: 'POST',
    path: '/seats/look',
    summary: 'What a session code leads to',
    access: 'anyone',
    body: z.strictObject({ code: sessionCode }),
    reply: openSession,
  }),
  take: endpoint({
    method: 'POST',
    path: '/seats',
    summary: 'Consent and take a seat; the reply holds the token that is the seat',
    access: 'anyone',
    body: takeSeatBody,
    reply: z.strictObject({ token: z.string(), seat: z.string() }),
  }),
};
