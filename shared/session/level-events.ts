import { z } from 'zod';
import { levelChecks, measuredLevels } from '../levels/measured-levels.ts';

const session = z.int().min(1);

/** What a session puts on the record of its levels at the load. Read by nobody before closing but whoever measured. */
export const levelEvents = {
  'levels-measured': z.strictObject({
    session,
    by: z.uuid(),
    ...measuredLevels.shape,
    /** What it came to by the registered rule: recomputed by whoever verifies. */
    grade: z.enum(['target', 'pass', 'warn', 'fail']),
    /** Against the check before the session; null for that one itself. */
    isDrifted: z.boolean().nullable(),
  }),
  'levels-skipped': z.strictObject({ session, check: z.enum(levelChecks), reason: z.string() }),
} as const;
