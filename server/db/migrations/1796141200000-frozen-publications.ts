import type { MigrationInterface, QueryRunner } from 'typeorm';

const refuse = (message: string) => `SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = '${message}'`;
const frozen = [
  'id',
  'study_id',
  'organisation_id',
  'title',
  'headline',
  'publisher',
  'digest',
  'document',
  'bytes',
  'published_at',
];
const changed = frozen.map((column) => `NEW.${column} <> OLD.${column}`).join(' OR ');

/** A publication can be withdrawn, once, and is never deleted. */
export class FrozenPublications1796141200000 implements MigrationInterface {
  name = 'FrozenPublications1796141200000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      `CREATE TRIGGER publications_no_update BEFORE UPDATE ON publications FOR EACH ROW BEGIN IF ${changed} OR OLD.withdrawn_at IS NOT NULL THEN ${refuse('A publication is frozen; it can be withdrawn, once.')}; END IF; END`,
    );
    await runner.query(
      `CREATE TRIGGER publications_no_delete BEFORE DELETE ON publications FOR EACH ROW ${refuse('A publication stays at its address.')}`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const act of ['update', 'delete']) await runner.query(`DROP TRIGGER publications_no_${act}`);
  }
}
