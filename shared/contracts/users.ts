import { z } from 'zod';
import { allMembers, endpoint, roles } from './endpoint.ts';
import { organisationParams } from './organisation-params.ts';

export const member = z.strictObject({ id: z.uuid(), name: z.string(), role: z.enum(roles) });
export type Member = z.output<typeof member>;

/** One thing that waits for the person who looks: what, in which study or session, and where to go. */
export const waitingItem = z.strictObject({
  kind: z.enum([
    'draft-to-finish',
    'codes-to-draw',
    'codes-to-confirm',
    'session-to-plan',
    'session-to-run',
    'levels-to-measure',
    'study-to-close',
    'report-to-read',
  ]),
  studyId: z.uuid(),
  sessionId: z.uuid().nullable(),
  title: z.string(),
  detail: z.string(),
  since: z.iso.datetime(),
});
export type WaitingItem = z.output<typeof waitingItem>;

export const usersApi = {
  members: endpoint({
    method: 'GET',
    path: '/organisations/:organisationId/members',
    summary: 'The members of an organisation, by name',
    access: allMembers,
    params: organisationParams,
    reply: z.strictObject({ members: z.array(member) }),
  }),
  waiting: endpoint({
    method: 'GET',
    path: '/organisations/:organisationId/waiting',
    summary: 'What waits for whoever asks',
    access: allMembers,
    params: organisationParams,
    reply: z.strictObject({ items: z.array(waitingItem) }),
  }),
};
