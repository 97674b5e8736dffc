import type { MigrationInterface, QueryRunner } from 'typeorm';

export class LevelDuties1796152000000 implements MigrationInterface {
  name = 'LevelDuties1796152000000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      'CREATE TABLE `level_duties` (`session_id` uuid NOT NULL, `user_id` uuid NOT NULL, PRIMARY KEY (`session_id`)) ENGINE=InnoDB',
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `level_duties`');
  }
}
