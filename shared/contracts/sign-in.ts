import { z } from 'zod';
import { endpoint, roles } from './endpoint.ts';
import { done } from './organisation-params.ts';

/** An e-mail address as people type it; upper and lower case are the same person. */
export const emailAddress = z
  .email('Enter an e-mail address such as name@example.org')
  .max(200, 'At most 200 characters');

export const credentials = z.strictObject({
  email: emailAddress,
  password: z.string().min(1, 'Enter your password').max(200, 'At most 200 characters'),
});
export type Credentials = z.output<typeof credentials>;

export const membership = z.strictObject({
  organisationId: z.uuid(),
  organisation: z.string(),
  role: z.enum(roles),
});
export type Membership = z.output<typeof membership>;

export const signedInPerson = z.strictObject({
  id: z.uuid(),
  name: z.string(),
  email: z.string(),
  memberships: z.array(membership),
});
export type SignedInPerson = z.output<typeof signedInPerson>;

/**
 * Who is signed in (null when nobody is); the demo's people when this is the demo seen on its own machine; and whether
 * mail can be read at /mailbox from here.
 */
export const whoAmI = z.strictObject({
  person: signedInPerson.nullable(),
  demoPeople: z.array(z.strictObject({ name: z.string(), duty: z.string(), email: z.string(), password: z.string() })),
  mailbox: z.boolean(),
});
export type WhoAmI = z.output<typeof whoAmI>;

export const signInApi = {
  me: endpoint({ method: 'GET', path: '/me', summary: 'Who is signed in', access: 'anyone', reply: whoAmI }),
  signIn: endpoint({
    method: 'POST',
    path: '/sign-in',
    summary: 'Sign in by e-mail and password',
    access: 'anyone',
    body: credentials,
    reply: signedInPerson,
  }),
  signOut: endpoint({ method: 'POST', path: '/sign-out', summary: 'Sign out here', access: 'signed-in', reply: done }),
  signOutEverywhere: endpoint({
    method: 'POST',
    path: '/sign-out-everywhere',
    summary: 'Sign out on every device',
    access: 'signed-in',
    reply: done,
  }),
};
