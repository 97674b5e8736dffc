import { z } from 'zod';
import { endpoint, managers, savedFile } from './endpoint.ts';
import { thingParams } from './organisation-params.ts';

/** The largest file of evidence. */
export const evidenceFileBytes = 10_000_000;

const note = z.string().trim().min(3, 'Say what the file shows').max(500, 'At most 500 characters');

/** An answer to a statement that is held under the light: a file, and what it shows. */
export const evidence = z.strictObject({
  id: z.uuid(),
  /** The rule that it answers (`StatementUnderTheLight`). */
  rule: z.string(),
  note: z.string(),
  file: z.strictObject({ name: z.string(), digest: z.string() }),
  addedAt: z.iso.datetime(),
});
export type Evidence = z.output<typeof evidence>;

const base = '/organisations/:organisationId/cables/:id/evidence';

export const evidenceApi = {
  list: endpoint({
    method: 'GET',
    path: base,
    summary: 'What answers the statements about a cable that are held under the light',
    access: managers,
    params: thingParams,
    reply: z.strictObject({ evidence: z.array(evidence) }),
  }),
  add: endpoint({
    method: 'POST',
    path: base,
    summary: 'Answer a statement with a file: text, PDF or picture; at most 50 for a cable',
    access: managers,
    params: thingParams,
    body: z.strictObject({ rule: z.string().regex(/^[a-zA-Z0-9-]{3,60}$/, 'Choose the statement'), note }),
    upload: { limitBytes: evidenceFileBytes, isRequired: true },
    reply: evidence,
  }),
  file: endpoint({
    method: 'GET',
    path: `${base}/:evidenceId/file`,
    summary: 'The file of an answer',
    access: managers,
    params: z.strictObject({ organisationId: z.uuid(), id: z.uuid(), evidenceId: z.uuid() }),
    isDownload: true,
    reply: savedFile,
  }),
};
