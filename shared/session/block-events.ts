import { z } from 'zod';

const session = z.int().min(1);

/** What breaks and remarks put on the record. */
export const blockEvents = {
  /** A listener said something beside the trials; what it was stands beside the record, under this leaf. */
  'remark-kept': z.strictObject({
    session,
    seat: z.string(),
    about: z.string(),
    leaf: z.string().regex(/^[0-9a-f]{64}$/),
  }),
  /** More than a day after the trial before: another sitting of the same session. */
  'sitting-began': z.strictObject({ session, sitting: z.int().min(2) }),
} as const;
