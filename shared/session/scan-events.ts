import { z } from 'zod';
import { scannedBy, stepKinds } from '../contracts/proctor-live.ts';
import { mostPractice } from './practice.ts';

// What is read off the sleeves, and steps taken back. Payload shapes are permanent.

const session = z.int().min(1);
const code = z.string().regex(/^[1-9]\d\d$/);
// Below 0 in practice.
const at = { session, trial: z.int().min(-mostPractice), presentation: z.int() };

export const scanEvents = {
  /** One end of the cable that is to be fitted bears its code. Which code that is follows from the draw and is not told. */
  'label-scanned': z.strictObject({ ...at, end: z.union([z.literal(1), z.literal(2)]), by: z.enum(scannedBy) }),
  /** Another cable was in hand; its code, as it was read. */
  'scan-refused': z.strictObject({ ...at, code, why: z.enum(['other-code', 'other-study']), by: z.enum(scannedBy) }),
  /** Both ends were read and not scanned; `ends` tells how many had been scanned before. */
  'scan-by-hand': z.strictObject({ ...at, reason: z.string(), ends: z.int() }),
  /** The last step is taken back; the one that started listening takes the presentation back to its change. */
  'step-undone': z.strictObject({ ...at, step: z.enum(stepKinds) }),
  'inventory-scanned': z.strictObject({ session, code, by: z.enum(scannedBy), isOurs: z.boolean() }),
  'inventory-ended': z.strictObject({
    session,
    codes: z.int(),
    missing: z.array(code),
    foreign: z.array(code),
    reason: z.string(),
  }),
} as const;
