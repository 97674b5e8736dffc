import type { MigrationInterface, QueryRunner } from 'typeorm';

export class Evidence1796153400000 implements MigrationInterface {
  name = 'Evidence1796153400000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      'CREATE TABLE `evidence` (`id` uuid NOT NULL, `cable_id` uuid NOT NULL, `rule` varchar(60) NOT NULL, `note` varchar(500) NOT NULL, `file_digest` char(64) NOT NULL, `file_name` varchar(120) NOT NULL, `added_by` uuid NOT NULL, `added_at` datetime(3) NOT NULL, INDEX `evidence_cable` (`cable_id`), PRIMARY KEY (`id`)) ENGINE=InnoDB',
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `evidence`');
  }
}
