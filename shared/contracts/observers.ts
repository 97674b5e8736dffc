import { z } from 'zod';
import { crew, endpoint } from './endpoint.ts';
import { done, thingParams } from './organisation-params.ts';
import { emailAddress } from './sign-in.ts';

/** A witness who is asked to watch a session. What they sign stands on the record under their label. */
export const observerRow = z.strictObject({
  id: z.uuid(),
  label: z.string(),
  name: z.string(),
  email: z.string(),
  invitedAt: z.iso.datetime(),
  hasSigned: z.boolean(),
});
export type ObserverRow = z.output<typeof observerRow>;

export const observerDraft = z.strictObject({
  name: z.string().trim().min(1, 'Name the observer').max(80, 'At most 80 characters'),
  email: emailAddress,
});
export type ObserverDraft = z.output<typeof observerDraft>;

const base = '/organisations/:organisationId/sessions/:id/observers';

export const observersApi = {
  list: endpoint({
    method: 'GET',
    path: base,
    summary: 'Who is asked to watch a session; four at most',
    access: crew,
    params: thingParams,
    reply: z.strictObject({ rows: z.array(observerRow) }),
  }),
  plan: endpoint({
    method: 'POST',
    path: base,
    summary: 'Ask somebody to watch a session; they get a link of their own by mail',
    access: ['owner', 'manager'],
    params: thingParams,
    body: observerDraft,
    reply: observerRow,
  }),
  withdraw: endpoint({
    method: 'DELETE',
    path: '/organisations/:organisationId/observers/:id',
    summary: 'Ask somebody no longer; the link ends',
    access: ['owner', 'manager'],
    params: thingParams,
    reply: done,
  }),
};
