import type { MigrationInterface, QueryRunner } from 'typeorm';

export class Remarks1796153000000 implements MigrationInterface {
  name = 'Remarks1796153000000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      'CREATE TABLE `remarks` (`session_id` uuid NOT NULL, `seat` varchar(8) NOT NULL, `about` varchar(16) NOT NULL, `said` longtext NOT NULL, `salt` char(32) NOT NULL, `leaf` char(64) NOT NULL, PRIMARY KEY (`session_id`, `seat`, `about`)) ENGINE=InnoDB',
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `remarks`');
  }
}
