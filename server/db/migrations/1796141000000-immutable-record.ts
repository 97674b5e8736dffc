import type { MigrationInterface, QueryRunner } from 'typeorm';

const refuse = (message: string) => `SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = '${message}'`;
const recordTables = ['record_entries', 'head_signatures', 'timestamp_tokens'];

const onRecord = (kinds: string) =>
  `SELECT 1 FROM record_entries entry JOIN sessions session ON session.study_id = entry.study_id AND session.number = entry.session_number WHERE session.id = OLD.session_id AND entry.kind IN (${kinds})`;

/** Triggers, since one account makes the tables and uses them: no right to take away would bind it. */
export class ImmutableRecord1796141000000 implements MigrationInterface {
  name = 'ImmutableRecord1796141000000';

  async up(runner: QueryRunner): Promise<void> {
    for (const table of recordTables)
      for (const act of ['update', 'delete'])
        await runner.query(
          `CREATE TRIGGER ${table}_no_${act} BEFORE ${act} ON ${table} FOR EACH ROW ${refuse('The record is only added to; nothing in it changes.')}`,
        );
    await runner.query(
      `CREATE TRIGGER answers_no_update BEFORE UPDATE ON answers FOR EACH ROW BEGIN IF OLD.late = 0 AND EXISTS (${onRecord("'trial-locked'")} AND JSON_VALUE(entry.payload, '$.trial') = OLD.trial) THEN ${refuse('The trial is locked; its answers do not change.')}; END IF; END`,
    );
    await runner.query(
      `CREATE TRIGGER answers_no_delete BEFORE DELETE ON answers FOR EACH ROW BEGIN IF EXISTS (${onRecord("'session-finished', 'session-abandoned'")}) THEN ${refuse('The session has ended; its answers stay.')}; END IF; END`,
    );
    await runner.query(
      `CREATE TRIGGER signing_keys_no_update BEFORE UPDATE ON signing_keys FOR EACH ROW BEGIN IF NEW.fingerprint <> OLD.fingerprint OR NEW.organisation_id <> OLD.organisation_id OR NEW.public_key <> OLD.public_key OR NEW.created_at <> OLD.created_at OR OLD.retired_at IS NOT NULL THEN ${refuse('A key can be retired, once, and is otherwise kept as it was made.')}; END IF; END`,
    );
    await runner.query(
      `CREATE TRIGGER signing_keys_no_delete BEFORE DELETE ON signing_keys FOR EACH ROW ${refuse('A key is never deleted; what it signed must stay verifiable.')}`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const table of [...recordTables, 'answers', 'signing_keys'])
      for (const act of ['update', 'delete']) await runner.query(`DROP TRIGGER ${table}_no_${act}`);
  }
}
