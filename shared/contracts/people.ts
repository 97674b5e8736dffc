import { z } from 'zod';
import { endpoint, roles } from './endpoint.ts';
import { done, organisationParams, thingParams } from './organisation-params.ts';
import { listQuery, pageOf, sortBy } from './paging.ts';
import { emailAddress } from './sign-in.ts';

export const chosenRole = z.enum(roles, 'Choose a role');

/** A member as the owner sees them, with what would be left without them. */
export const personRow = z.strictObject({
  id: z.uuid(),
  name: z.string(),
  email: z.string(),
  role: z.enum(roles),
  joinedAt: z.iso.datetime(),
  /** Sessions not yet ended that this person is the proctor of, and studies not yet closed whose code holder they are. */
  sessionsToRun: z.int(),
  codesHeld: z.int(),
});
export type PersonRow = z.output<typeof personRow>;

export const invitationDraft = z.strictObject({ email: emailAddress, role: chosenRole });
export type InvitationDraft = z.output<typeof invitationDraft>;

/** An invitation that has not been accepted: open, or past its time. */
export const invitationRow = z.strictObject({
  id: z.uuid(),
  email: z.string(),
  role: z.enum(roles),
  invitedBy: z.string(),
  invitedAt: z.iso.datetime(),
  expiresAt: z.iso.datetime(),
  expired: z.boolean(),
});
export type InvitationRow = z.output<typeof invitationRow>;

const people = '/organisations/:organisationId/people';
const invitations = '/organisations/:organisationId/invitations';

export const peopleApi = {
  list: endpoint({
    method: 'GET',
    path: people,
    summary: 'Members of an organisation with their addresses',
    access: ['owner'],
    params: organisationParams,
    query: listQuery.extend({
      role: z.enum(['any', ...roles]).default('any'),
      sort: sortBy(['name', 'role', 'joined'], 'name'),
    }),
    reply: pageOf(personRow),
  }),
  changeRole: endpoint({
    method: 'PUT',
    path: `${people}/:id/role`,
    summary: 'Give a member another role',
    access: ['owner'],
    params: thingParams,
    body: z.strictObject({ role: chosenRole }),
    reply: personRow,
  }),
  remove: endpoint({
    method: 'DELETE',
    path: `${people}/:id`,
    summary: 'Remove a member; what they did stays under their name',
    access: ['owner'],
    params: thingParams,
    reply: done,
  }),
  invitations: endpoint({
    method: 'GET',
    path: invitations,
    summary: 'Invitations that have not been accepted, newest first',
    access: ['owner'],
    params: organisationParams,
    query: listQuery,
    reply: pageOf(invitationRow),
  }),
  invite: endpoint({
    method: 'POST',
    path: invitations,
    summary: 'Invite somebody by e-mail',
    access: ['owner'],
    params: organisationParams,
    body: invitationDraft,
    reply: invitationRow,
  }),
  inviteAgain: endpoint({
    method: 'POST',
    path: `${invitations}/:id/again`,
    summary: 'Send an invitation anew; the link sent before ends',
    access: ['owner'],
    params: thingParams,
    reply: invitationRow,
  }),
  withdraw: endpoint({
    method: 'DELETE',
    path: `${invitations}/:id`,
    summary: 'Withdraw an invitation; its link ends',
    access: ['owner'],
    params: thingParams,
    reply: done,
  }),
};
