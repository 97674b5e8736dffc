import { z } from 'zod';
import { cableKinds } from '../contracts/cables.ts';

/** A cable as a protocol spells it out, with the specimens in use. */
export const protocolCable = z.strictObject({
  id: z.uuid(),
  name: z.string(),
  kind: z.enum(cableKinds),
  lengthMm: z.int(),
  description: z.string(),
  specimens: z.array(z.strictObject({ id: z.uuid(), serial: z.string(), note: z.string() })),
});
export type ProtocolCable = z.output<typeof protocolCable>;
