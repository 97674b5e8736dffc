import { z } from 'zod';
import { endpoint, roles } from './endpoint.ts';
import { done } from './organisation-params.ts';
import { emailAddress, signedInPerson } from './sign-in.ts';

// What people do who come by a link of a mail or of the terminal. The token travels in the body alone, so that it
// stands in no log.

const token = z
  .string('The link is not complete')
  .min(20, 'The link is not complete')
  .max(100, 'The link is not complete');

/** A password that is being chosen: length is what counts (NIST SP 800-63B, 3.1.1.2), no rule about its characters. */
export const newPassword = z.string().min(12, 'At least 12 characters').max(200, 'At most 200 characters');
export const personName = z.string().trim().min(2, 'At least 2 characters').max(120, 'At most 120 characters');

/** What an invitation's link shows to whoever holds it. */
export const invitationOffer = z.strictObject({
  organisation: z.string(),
  role: z.enum(roles),
  email: z.string(),
  invitedBy: z.string(),
  expiresAt: z.iso.datetime(),
  /** The invited address has an account: sign in with it and accept. Otherwise name and password make one. */
  hasAccount: z.boolean(),
});
export type InvitationOffer = z.output<typeof invitationOffer>;

export const invitationAnswer = z.strictObject({ token, name: personName, password: newPassword });
export type InvitationAnswer = z.output<typeof invitationAnswer>;

export const resetRequest = z.strictObject({ email: emailAddress });
export type ResetRequest = z.output<typeof resetRequest>;
export const passwordChoice = z.strictObject({ token, password: newPassword });
export type PasswordChoice = z.output<typeof passwordChoice>;

export const firstOwnerDraft = z.strictObject({
  token,
  organisation: personName,
  name: personName,
  email: emailAddress,
  password: newPassword,
});
export type FirstOwnerDraft = z.output<typeof firstOwnerDraft>;

const joined = z.strictObject({ organisationId: z.uuid() });

export const linksApi = {
  lookAtInvitation: endpoint({
    method: 'POST',
    path: '/invitations/look',
    summary: 'What an invitation’s link is for',
    access: 'anyone',
    body: z.strictObject({ token }),
    reply: invitationOffer,
  }),
  acceptInvitation: endpoint({
    method: 'POST',
    path: '/invitations/accept',
    summary: 'Accept an invitation with a new account, and sign in',
    access: 'anyone',
    body: invitationAnswer,
    reply: joined,
  }),
  joinByInvitation: endpoint({
    method: 'POST',
    path: '/invitations/join',
    summary: 'Accept an invitation with the account that is signed in',
    access: 'signed-in',
    body: z.strictObject({ token }),
    reply: joined,
  }),
  askForReset: endpoint({
    method: 'POST',
    path: '/password-resets',
    summary: 'Have a link sent that sets a new password; answered alike for any address',
    access: 'anyone',
    body: resetRequest,
    reply: done,
  }),
  lookAtReset: endpoint({
    method: 'POST',
    path: '/password-resets/look',
    summary: 'Whose password a link sets',
    access: 'anyone',
    body: z.strictObject({ token }),
    reply: z.strictObject({ email: z.string() }),
  }),
  resetPassword: endpoint({
    method: 'POST',
    path: '/password-resets/use',
    summary: 'Set a new password; every sign-in of the person ends',
    access: 'anyone',
    body: passwordChoice,
    reply: z.strictObject({ email: z.string() }),
  }),
  createFirstOwner: endpoint({
    method: 'POST',
    path: '/first-owner',
    summary: 'Create the first organisation and its owner, by the link printed at the first start',
    access: 'anyone',
    body: firstOwnerDraft,
    reply: signedInPerson,
  }),
};
