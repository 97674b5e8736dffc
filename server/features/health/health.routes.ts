import { readFileSync } from 'node:fs';
import type { Router } from 'express';
import { z } from 'zod';
import { type Health, healthApi } from '#shared/contracts/health.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';

export const { version } = z
  .object({ version: z.string() })
  .parse(JSON.parse(readFileSync(new URL('../../../package.json', import.meta.url), 'utf8')));

async function migrationsOf({ db }: Deps): Promise<{ applied: number; pending: number }> {
  const applied: { count: string }[] = await db.query('select count(*) as count from migrations');
  const count = Number(applied[0]?.count ?? 0);
  return { applied: count, pending: Math.max(0, db.migrations.length - count) };
}

export function healthRoutes(router: Router, access: Access, deps: Deps): void {
  mount(router, access, healthApi.get, async ({ response }): Promise<Health> => {
    try {
      const migrations = await migrationsOf(deps);
      return { status: 'ok', version: version, database: 'up', migrations };
    } catch (error) {
      deps.log.error({ err: error }, 'the database does not answer');
      response.status(503);
      return {
        status: 'failing',
        version: version,
        database: 'down',
        migrations: { applied: 0, pending: 0 },
      };
    }
  });
}
