import { z } from 'zod';
import { crew, endpoint } from './endpoint.ts';
import { organisationParams, thingParams } from './organisation-params.ts';
import { listQuery, pageOf, sortBy } from './paging.ts';

export const sessionPhases = ['planned', 'seating', 'revealing', 'running', 'finished', 'abandoned'] as const;

export const sessionDraft = z.strictObject({
  plannedAt: z.iso.datetime('Enter date and time'),
  room: z.string().trim().min(1, 'Name the room').max(60, 'At most 60 characters'),
  proctorId: z.uuid('Choose the proctor'),
});
export type SessionDraft = z.output<typeof sessionDraft>;

/** A session in a list: the neutral title and where it stands; nothing of cables, codes or scores. */
export const sessionRow = z.strictObject({
  id: z.uuid(),
  studyId: z.uuid(),
  title: z.string(),
  number: z.int(),
  phase: z.enum(sessionPhases),
  room: z.string(),
  plannedAt: z.iso.datetime(),
  proctor: z.string(),
  proctorId: z.uuid(),
  trials: z.int(),
  trialsLocked: z.int(),
  listeners: z.int(),
});
export type SessionRow = z.output<typeof sessionRow>;

const base = '/organisations/:organisationId/sessions';

const sessionListQuery = listQuery.extend({
  studyId: z.uuid().optional(),
  phase: z.enum(['any', 'open', 'ended']).default('any'),
  sort: sortBy(['title', 'number', 'phase', 'plannedAt', 'room'], '-plannedAt'),
});
export type SessionListQuery = z.output<typeof sessionListQuery>;

export const sessionsApi = {
  list: endpoint({
    method: 'GET',
    path: base,
    summary: 'Sessions, latest first; a proctor sees their own',
    access: crew,
    params: organisationParams,
    query: sessionListQuery,
    reply: pageOf(sessionRow),
  }),
  get: endpoint({
    method: 'GET',
    path: `${base}/:id`,
    summary: 'One session',
    access: crew,
    params: thingParams,
    reply: sessionRow,
  }),
  plan: endpoint({
    method: 'POST',
    path: '/organisations/:organisationId/studies/:id/sessions',
    summary: 'Plan a session of a sealed study; it gets its number for good',
    access: ['owner', 'manager'],
    params: thingParams,
    body: sessionDraft,
    reply: sessionRow,
  }),
};
