import type { DataSource } from 'typeorm';
import { recordTriggers } from '../../server/features/audits/audits.service.ts';

/** Does what the database refuses, as whoever holds its account could: takes the triggers away, and puts them back. */
export async function pastTriggers(db: DataSource, ...statements: readonly (string | [string, unknown[]])[]) {
  const made: string[] = [];
  for (const name of recordTriggers) {
    const [row]: Record<string, string>[] = await db.query(`show create trigger ${name}`);
    made.push(row?.['SQL Original Statement'] ?? '');
    await db.query(`drop trigger ${name}`);
  }
  for (const statement of statements)
    await (typeof statement === 'string' ? db.query(statement) : db.query(statement[0], statement[1]));
  for (const statement of made) await db.query(statement);
}
