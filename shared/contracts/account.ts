import { z } from 'zod';
import { endpoint } from './endpoint.ts';
import { done } from './organisation-params.ts';
import { listQuery, pageOf } from './paging.ts';

/** A browser in which a person is signed in. */
export const signedInPlace = z.strictObject({
  id: z.string(),
  /** What the browser says of itself. */
  browser: z.string(),
  /** The network address that it last came from. */
  address: z.string(),
  signedInAt: z.iso.datetime(),
  lastSeenAt: z.iso.datetime(),
  /** The one that asks. */
  here: z.boolean(),
});
export type SignedInPlace = z.output<typeof signedInPlace>;

export const signInAttempt = z.strictObject({
  id: z.uuid(),
  at: z.iso.datetime(),
  succeeded: z.boolean(),
  browser: z.string(),
  address: z.string(),
});
export type SignInAttempt = z.output<typeof signInAttempt>;

export const accountApi = {
  places: endpoint({
    method: 'GET',
    path: '/account/places',
    summary: 'Where the person who asks is signed in, last seen first',
    access: 'signed-in',
    reply: z.strictObject({ places: z.array(signedInPlace) }),
  }),
  endPlace: endpoint({
    method: 'DELETE',
    path: '/account/places/:id',
    summary: 'End one of one’s own sign-ins',
    access: 'signed-in',
    params: z.strictObject({ id: z.string().max(100) }),
    reply: done,
  }),
  endOtherPlaces: endpoint({
    method: 'POST',
    path: '/account/places/end-others',
    summary: 'End every sign-in of one’s own but this one',
    access: 'signed-in',
    reply: done,
  }),
  attempts: endpoint({
    method: 'GET',
    path: '/account/sign-in-attempts',
    summary: 'Attempts to sign in as the person who asks, newest first, of the last 90 days',
    access: 'signed-in',
    query: listQuery.pick({ page: true }),
    reply: pageOf(signInAttempt),
  }),
};
