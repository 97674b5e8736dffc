import { DataSource } from 'typeorm';
import type { Config } from '../config.ts';
import { entities } from '../entities.ts';
import { migrations } from './migrations/index.ts';

/** The connection to MariaDB. The schema is changed by migrations alone. */
export function createDataSource(database: Config['database']): DataSource {
  const where =
    database.socketPath === undefined
      ? { host: database.host, port: database.port }
      : { socketPath: database.socketPath };
  return new DataSource({
    type: 'mariadb',
    ...where,
    username: database.user,
    password: database.password,
    database: database.name,
    entities,
    migrations,
    synchronize: false,
    migrationsTransactionMode: 'each',
    charset: 'utf8mb4',
    timezone: 'Z',
    bigNumberStrings: false,
    supportBigNumbers: true,
    poolSize: 20,
  });
}
