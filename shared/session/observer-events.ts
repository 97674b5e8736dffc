import { z } from 'zod';

const session = z.int().min(1);
const observer = z.string();

/** What a witness puts on the record: when their page was connected, and what they signed. */
export const observerEvents = {
  'observer-came': z.strictObject({ session, observer }),
  'observer-went': z.strictObject({ session, observer }),
  'observer-signed': z.strictObject({
    session,
    observer,
    /** The trials at which the page was connected from the opening to the end. */
    watched: z.array(z.int()),
    remarks: z.string(),
    /** There only where the observer agreed to be named. */
    name: z.string().nullable(),
    /** Other duties that this person has in the study; with any of them they are no witness. */
    duties: z.array(z.string()),
  }),
} as const;
