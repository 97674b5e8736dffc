import { z } from 'zod';
import { crew, endpoint } from './endpoint.ts';
import { done, organisationParams, thingParams } from './organisation-params.ts';
import { listQuery, pageOf, sortBy } from './paging.ts';

export const sessionPhases = ['planned', 'seating', 'revealing', 'running', 'finished', 'abandoned'] as const;

function isTimeZone(name: string): boolean {
  try {
    return new Intl.DateTimeFormat('en', { timeZone: name }).resolvedOptions().timeZone !== '';
  } catch {
    return false;
  }
}

/** A name of the IANA time zone database, such as Europe/Lisbon. */
const timeZone = z
  .string()
  .max(64, 'At most 64 characters')
  .regex(/^[A-Za-z]/, 'Give the time zone by its name, such as Europe/Lisbon')
  .refine(isTimeZone, 'There is no such time zone');

/** When and where; the zone is the one in which mail and calendars tell the time. */
export const sessionMove = z.strictObject({
  plannedAt: z.iso.datetime('Enter date and time'),
  timeZone: timeZone.default('UTC'),
  room: z.string().trim().min(1, 'Name the room').max(60, 'At most 60 characters'),
});
export type SessionMove = z.output<typeof sessionMove>;

export const sessionDraft = sessionMove.extend({
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
  timeZone: z.string(),
  proctor: z.string(),
  proctorId: z.uuid(),
  trials: z.int(),
  trialsLocked: z.int(),
  listeners: z.int(),
  /** Whether its levels at the load are measured. */
  hasLevels: z.boolean(),
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
  move: endpoint({
    method: 'PUT',
    path: `${base}/:id`,
    summary: 'Change date or room of a planned session; whoever is invited is told',
    access: ['owner', 'manager'],
    params: thingParams,
    body: sessionMove,
    reply: sessionRow,
  }),
  cancel: endpoint({
    method: 'POST',
    path: `${base}/:id/cancel`,
    summary: 'Cancel a planned session; it keeps its number, and whoever is invited is told',
    access: ['owner', 'manager'],
    params: thingParams,
    body: z.strictObject({ reason: z.string().trim().min(3, 'Say why').max(300, 'At most 300 characters') }),
    reply: done,
  }),
};
