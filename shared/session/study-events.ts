import { z } from 'zod';
import { confirmations } from '../contracts/publications.ts';
import { cueAuditResult } from '../cue-audit/cue-audit-result.ts';
import { checkResult } from '../findings/check-result.ts';
import { registeredResult } from '../methods/methods.ts';

// What the study itself puts on its record. The payload of `key-revealed` has a file of its own: revealed-key.ts.

const hex32 = z.string().regex(/^[0-9a-f]{64}$/);

export const studyEvents = {
  'protocol-sealed': z.strictObject({ protocolVersion: z.int(), digest: hex32, sealedBy: z.uuid() }),
  /** A later version, sealed before any session opened; nothing of it but its digest is on the record. */
  'protocol-amended': z.strictObject({
    protocolVersion: z.int().min(2),
    digest: hex32,
    amendedBy: z.uuid(),
    reason: z.string(),
  }),
  'code-key-committed': z.strictObject({ commitment: hex32, specimens: z.int(), by: z.uuid() }),
  'code-key-opened': z.strictObject({ by: z.uuid(), purpose: z.enum(['labels', 'check']) }),
  /** The code key committed to before is void: the amended protocol has other specimens or another code holder. */
  'code-key-voided': z.strictObject({ by: z.uuid() }),
  'code-key-confirmed': z.strictObject({ by: z.uuid() }),
  'study-closed': z.strictObject({
    by: z.uuid(),
    complete: z.boolean(),
    reason: z.string(),
    /** The duties as they stood, from which the blinding rung is derived. */
    manager: z.uuid(),
    owners: z.array(z.uuid()),
    managers: z.array(z.uuid()),
    codeHolder: z.uuid(),
  }),
  'result-recorded': z.strictObject({
    analysis: z.string(),
    result: registeredResult,
    /** What the check trials came to; left out where none are registered. */
    checks: checkResult.optional(),
    /** What the cue audit came to; studies closed before there was one have none. */
    cues: cueAuditResult.optional(),
  }),
  /** What the publisher states and confirms; the published document ends with it. */
  'publication-declared': z.strictObject({
    by: z.uuid(),
    publisher: z.string(),
    paid: z.string(),
    supplied: z.string(),
    ties: z.string(),
    confirmations: z.array(z.enum(Object.keys(confirmations) as (keyof typeof confirmations)[])),
  }),
  'study-published': z.strictObject({ by: z.uuid(), id: z.string(), digest: hex32 }),
  'publication-withdrawn': z.strictObject({ by: z.uuid(), id: z.string(), reason: z.string() }),
  'study-shelved': z.strictObject({ by: z.uuid(), reason: z.string() }),
} as const;
export type StudyEventKind = keyof typeof studyEvents;
export type StudyPayloadOf<K extends StudyEventKind> = z.output<(typeof studyEvents)[K]>;
