import { z } from 'zod';
import { levelChecks, measuredLevels } from '../levels/measured-levels.ts';
import { registeredLevels } from '../levels/registered-levels.ts';
import { allMembers, endpoint, managers } from './endpoint.ts';
import { thingParams } from './organisation-params.ts';
import { sessionPhases } from './sessions.ts';

/** One measurement as whoever asks may see it: in or out, and the figures for whoever took them, or after closing. */
export const levelsTaken = z.strictObject({
  check: z.enum(levelChecks),
  at: z.iso.datetime(),
  /** Whether it is within what is registered; null where it was left out. */
  isIn: z.boolean().nullable(),
  /** Null where it was left out. */
  by: z.string().nullable(),
  measured: measuredLevels.nullable(),
});
export type LevelsTaken = z.output<typeof levelsTaken>;

/** The levels of a session, for whoever measures them, whoever waits for them, and the managers. */
export const levelsPage = z.strictObject({
  sessionId: z.uuid(),
  studyId: z.uuid(),
  title: z.string(),
  session: z.int(),
  phase: z.enum(sessionPhases),
  /** Null where the protocol registers no measurement. */
  registered: registeredLevels.nullable(),
  /** Who measures; null while nobody is named but the proctor. */
  measurer: z.strictObject({ id: z.uuid(), name: z.string() }).nullable(),
  proctor: z.string(),
  duty: z.enum(['measurer', 'proctor', 'manager']),
  /** The blind codes to measure; empty for whoever does not. */
  codes: z.array(z.string()),
  codesAreDrawn: z.boolean(),
  /** Which checks can be recorded now, the one that is due first. */
  open: z.array(z.enum(levelChecks)),
  due: z.enum(levelChecks).nullable(),
  /** Why the session cannot start as its levels are; in words without a figure. */
  bar: z.string().nullable(),
  taken: z.array(levelsTaken),
});
export type LevelsPage = z.output<typeof levelsPage>;

export const levelsDraft = measuredLevels.extend({
  /** The proctor measures alone, sees levels by code, and knows what follows for the blind. */
  asProctor: z.boolean(),
  /** The questions that were answered with yes. */
  answered: z.array(z.string().max(20)).max(10),
});
export type LevelsDraft = z.output<typeof levelsDraft>;

const path = '/organisations/:organisationId/sessions/:id/levels';

export const levelsApi = {
  get: endpoint({
    method: 'GET',
    path,
    summary: 'The levels of a session: in or out, and figures for whoever measured them',
    access: allMembers,
    params: thingParams,
    query: z.strictObject({ asProctor: z.enum(['yes', 'no']).default('no') }),
    reply: levelsPage,
  }),
  record: endpoint({
    method: 'POST',
    path,
    summary: 'Record a measurement of every code at the load',
    access: allMembers,
    params: thingParams,
    body: levelsDraft,
    reply: levelsPage,
  }),
  assign: endpoint({
    method: 'PUT',
    path: `${path}/measurer`,
    summary: 'Say who measures the levels of a session',
    access: managers,
    params: thingParams,
    body: z.strictObject({ userId: z.uuid('Choose who measures') }),
    reply: levelsPage,
  }),
};
