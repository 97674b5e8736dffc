import { z } from 'zod';
import { endpoint } from './endpoint.ts';

export const health = z.strictObject({
  status: z.enum(['ok', 'failing']),
  version: z.string(),
  database: z.enum(['up', 'down']),
  migrations: z.strictObject({ applied: z.int(), pending: z.int() }),
});

export type Health = z.output<typeof health>;

export const healthApi = {
  get: endpoint({
    method: 'GET',
    path: '/health',
    summary: 'Version, database and migrations',
    access: 'anyone',
    reply: health,
  }),
};
