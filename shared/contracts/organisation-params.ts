import { z } from 'zod';

/** The parameters of everything that belongs to an organisation. */
export const organisationParams = z.strictObject({ organisationId: z.uuid() });

/** A thing of an organisation, by its id. */
export const thingParams = z.strictObject({ organisationId: z.uuid(), id: z.uuid() });

/** The reply of an action that has nothing to tell. */
export const done = z.strictObject({ ok: z.literal(true) });
