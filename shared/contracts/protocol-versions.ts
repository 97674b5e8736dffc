import { z } from 'zod';

/** One line of a protocol that two versions do not share; a side is empty where a version has no such line. */
export const protocolDifference = z.strictObject({ label: z.string(), before: z.string(), after: z.string() });
export type ProtocolDifference = z.output<typeof protocolDifference>;
