import { z } from 'zod';
import { crew, endpoint } from './endpoint.ts';
import { thingParams } from './organisation-params.ts';

const share = z.number().min(0);

/** What the sound of a session, and of its proctor's week, uses of published allowances; shares, 1 for all. */
export const exposure = z.strictObject({
  /** Null while no sound level is recorded for this session. */
  session: z
    .strictObject({
      tenthsDba: z.int(),
      minutes: z.number(),
      /** Whether the minutes are those of the plan, or have been played. */
      isPlanned: z.boolean(),
      ofWeek: share,
      ofWeekSensitive: share,
      ofDay: share,
    })
    .nullable(),
  week: z.strictObject({
    /** Sessions of this proctor in the seven days up to this one for which a sound level is recorded, this one included. */
    sessions: z.int(),
    unrecorded: z.int(),
    ofWeek: share,
    ofWeekSensitive: share,
  }),
});
export type Exposure = z.output<typeof exposure>;

export const exposureApi = {
  get: endpoint({
    method: 'GET',
    path: '/organisations/:organisationId/sessions/:id/exposure',
    summary: 'What a session’s sound, and its proctor’s week, use of published allowances',
    access: crew,
    params: thingParams,
    reply: exposure,
  }),
};
