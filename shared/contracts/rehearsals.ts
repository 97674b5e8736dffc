import { z } from 'zod';
import { crew, endpoint } from './endpoint.ts';
import { organisationParams } from './organisation-params.ts';

export const rehearsalsApi = {
  begin: endpoint({
    method: 'POST',
    path: '/organisations/:organisationId/rehearsals',
    summary: 'Begin a run with invented codes, on no record',
    access: crew,
    params: organisationParams,
    body: z.strictObject({
      /** The session whose plan is rehearsed; null for a short one of three trials. */
      sessionId: z.uuid().nullable(),
    }),
    reply: z.strictObject({ id: z.uuid() }),
  }),
};
