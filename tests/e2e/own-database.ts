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

/** A database for one server, and how to remove it; with the tables, rows and triggers of another one if it is named. */
export async function ownDatabase(copyOf?: string): Promise<{ name: string; remove: () => Promise<void> }> {
  const name = `fairlead_e2e_${randomBytes(6).toString('hex')}`;
  const admin = await createConnection(databaseAccount());
  await admin.query(`create database ${name} character set utf8mb4`);
  if (copyOf !== undefined) await copy(admin, copyOf, name);
  return {
    name,
    remove: async () => {
      await admin.query(`drop database ${name}`);
      await admin.end();
    },
  };
}

/** Every table as it was created, keys of all kinds included; its rows; then the triggers, which no copied row sets off. */
async function copy(admin: Connection, from: string, to: string): Promise<void> {
  const rows = async (query: string) => (await admin.query<RowDataPacket[]>(query))[0];
  const made = async (kind: 'table' | 'trigger', thing: string, column: string) =>
    String((await rows(`show create ${kind} \`${from}\`.\`${thing}\``))[0]?.[column]);
  await admin.query(`use ${to}`);
  await admin.query('set foreign_key_checks = 0');
  for (const row of await rows(`show full tables from ${from} where table_type = 'BASE TABLE'`)) {
    const table = String(Object.values(row)[0]);
    await admin.query(await made('table', table, 'Create Table'));
    await admin.query(`insert into \`${table}\` select * from ${from}.\`${table}\``);
  }
  for (const { Trigger: trigger } of await rows(`show triggers from ${from}`))
    await admin.query(await made('trigger', trigger, 'SQL Original Statement'));
  await admin.query('set foreign_key_checks = 1');
}
