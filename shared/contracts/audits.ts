import { z } from 'zod';
import { endpoint } from './endpoint.ts';
import { organisationParams } from './organisation-params.ts';

/** The first break of a study's record, or of the database itself. */
export const auditFault = z.strictObject({
  /** Null where it lies in the database itself and in no study. */
  studyId: z.uuid().nullable(),
  title: z.string(),
  /** The entry at which it lies; null where it lies in none. */
  sequence: z.int().nullable(),
  why: z.string(),
});
export type AuditFault = z.output<typeof auditFault>;

/** What the audit of an organisation's records came to. */
export const auditOutcome = z.strictObject({
  at: z.iso.datetime(),
  studies: z.int(),
  entries: z.int(),
  signatures: z.int(),
  tokens: z.int(),
  faults: z.array(auditFault),
});
export type AuditOutcome = z.output<typeof auditOutcome>;

export const auditsApi = {
  latest: endpoint({
    method: 'GET',
    path: '/organisations/:organisationId/audit',
    summary: 'The latest audit of an organisation’s records: every chain, signature and token',
    access: ['owner'],
    params: organisationParams,
    reply: z.strictObject({ latest: auditOutcome.nullable() }),
  }),
};
