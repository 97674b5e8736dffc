import { randomBytes } from 'node:crypto';
import { type Connection, createConnection, type RowDataPacket } from 'mysql2/promise';

function required(name: string): string {
  const value = process.env[name];
  if (value === undefined) throw new Error(`${name} is not set; run the tests with npm test`);
  return value;
}

export const databaseAccount = () => ({
  socketPath: required('TEST_DATABASE_SOCKET'),
  user: required('TEST_DATABASE_USER'),
  password: required('TEST_DATABASE_PASSWORD'),
});

const databasesOfRun = 'TEST_DATABASE_PREFIX';

/** Says what the names of all databases of this run begin with; before anything takes one. */
export function nameDatabases(): void {
  process.env[databasesOfRun] = `fairlead_test_${randomBytes(6).toString('hex')}_`;
}

/** `isNew` until it has been given back once: it has no tables yet. */
export type TestDatabase = { readonly name: string; readonly isNew: boolean; giveBack: () => Promise<void> };

// Making the tables takes longer than many a test: a database is migrated once, and the next server of this worker finds
// it emptied.
const spare: string[] = [];

/** An empty database that no other server has. */
export async function testDatabase(): Promise<TestDatabase> {
  const found = spare.pop();
  const name = found ?? (await asAdmin(newDatabase));
  return {
    name,
    isNew: found === undefined,
    giveBack: async () => {
      await asAdmin((admin) => empty(admin, name));
      spare.push(name);
    },
  };
}

/** Removes every database of this run. */
export function removeDatabases(): Promise<void> {
  return asAdmin(async (admin) => {
    const [rows] = await admin.query<RowDataPacket[]>('select schema_name as name from information_schema.schemata');
    const own = rows.map(({ name }) => String(name)).filter((name) => name.startsWith(prefix()));
    for (const name of own) await admin.query(`drop database \`${name}\``);
  });
}

async function asAdmin<T>(work: (admin: Connection) => Promise<T>): Promise<T> {
  const admin = await createConnection(databaseAccount());
  try {
    return await work(admin);
  } finally {
    await admin.end();
  }
}

const prefix = () => required(databasesOfRun);

async function newDatabase(admin: Connection): Promise<string> {
  const name = `${prefix()}${randomBytes(6).toString('hex')}`;
  await admin.query(`create database ${name} character set utf8mb4`);
  return name;
}

/** Truncating asks neither the keys between tables nor the triggers that keep what is recorded. */
async function empty(admin: Connection, name: string): Promise<void> {
  await admin.query(`use ${name}`);
  await admin.query('set foreign_key_checks = 0');
  const [rows] = await admin.query<RowDataPacket[]>("show full tables where table_type = 'BASE TABLE'");
  for (const table of rows.map((row) => String(Object.values(row)[0]))) {
    if (table === 'migrations') continue;
    const [some] = await admin.query<RowDataPacket[]>(`select 1 from \`${table}\` limit 1`);
    if (some.length > 0) await admin.query(`truncate table \`${table}\``);
  }
}
