import 'reflect-metadata';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pino } from 'pino';
import { type Config, readConfig } from '../../server/config.ts';
import { createDataSource } from '../../server/db/data-source.ts';
import type { Clock, Deps, Random } from '../../server/deps.ts';
import { folderStore } from '../../server/files/file-store.ts';
import type { OwnCertificate } from '../../server/network/own-certificate.ts';
import { serve } from '../../server/serve.ts';
import { systemClock, systemRandom } from '../../server/system.ts';
import type { TimestampAuthority } from '../../server/timestamps/authority.ts';
import { databaseAccount, testDatabase } from './test-database.ts';

export function testConfig(databaseName: string, environment: Record<string, string> = {}): Config {
  const { socketPath, user, password } = databaseAccount();
  const config = readConfig({
    SESSION_SECRET: 'a secret for tests, and long enough for the rule',
    SIGNING_SECRET: 'another secret for tests, and long enough too',
    FAIRLEAD_DEMO: 'off',
    DATABASE_SOCKET: socketPath,
    DATABASE_USER: user,
    DATABASE_PASSWORD: password,
    DATABASE_NAME: databaseName,
    PUBLIC_URL: 'http://fairlead.test:4180',
    LOG_LEVEL: 'error',
    ...environment,
  });
  return { ...config, port: 0 };
}

/** The real application on a port of its own, over a real, empty database. */
export async function testServer(
  given: {
    clock?: Clock;
    random?: Random;
    environment?: Record<string, string>;
    certificate?: OwnCertificate;
    timestamps?: TimestampAuthority;
  } = {},
) {
  const database = await testDatabase();
  const config = testConfig(database.name, given.environment);
  const db = createDataSource(config.database);
  await db.initialize();
  if (database.isNew) await db.runMigrations();
  const folder = await mkdtemp(join(tmpdir(), 'fairlead-test-'));
  const deps: Deps = {
    config,
    db,
    clock: given.clock ?? systemClock,
    random: given.random ?? systemRandom,
    timestamps: given.timestamps ?? null,
    files: folderStore(join(folder, 'files')),
    log: pino({ level: config.logLevel }),
  };
  const server = await serve(deps, given.certificate);
  return {
    deps,
    server,
    address: `http://127.0.0.1:${server.port}`,
    stop: async () => {
      await server.stop();
      await db.destroy();
      await rm(folder, { recursive: true });
      await database.giveBack();
    },
  };
}
export type TestServer = Awaited<ReturnType<typeof testServer>>;
