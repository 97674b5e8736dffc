import type { MigrationInterface, QueryRunner } from 'typeorm';

export class Observers1796153100000 implements MigrationInterface {
  name = 'Observers1796153100000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      'CREATE TABLE `observers` (`id` uuid NOT NULL, `organisation_id` uuid NOT NULL, `session_id` uuid NOT NULL, `label` varchar(8) NOT NULL, `name` varchar(80) NOT NULL, `email` varchar(320) NOT NULL, `invited_at` datetime(3) NOT NULL, `withdrawn` tinyint NOT NULL, UNIQUE INDEX `observers_label` (`session_id`, `label`), PRIMARY KEY (`id`)) ENGINE=InnoDB',
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `observers`');
  }
}
