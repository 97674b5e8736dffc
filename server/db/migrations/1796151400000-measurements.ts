import type { MigrationInterface, QueryRunner } from 'typeorm';

export class Measurements1796151400000 implements MigrationInterface {
  name = 'Measurements1796151400000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      'CREATE TABLE `measurements` (`id` uuid NOT NULL, `specimen_id` uuid NOT NULL, `quantity` varchar(16) NOT NULL, `instrument` varchar(200) NOT NULL, `person` varchar(120) NOT NULL, `taken_on` date NOT NULL, `temperature_c` double NULL, `moment` varchar(8) NOT NULL, `note` varchar(500) NOT NULL, `circuit` json NULL, `text` mediumtext NOT NULL, `columns` json NOT NULL, `points` json NOT NULL, `point_count` int NOT NULL, `file_digest` char(64) NULL, `file_name` varchar(120) NULL, `is_corrected` tinyint NOT NULL, `added_by` uuid NOT NULL, `added_at` datetime(3) NOT NULL, `struck_at` datetime(3) NULL, `struck_reason` varchar(500) NULL, INDEX `measurements_specimen` (`specimen_id`, `quantity`, `taken_on`), PRIMARY KEY (`id`)) ENGINE=InnoDB',
    );
    await runner.query(
      'ALTER TABLE `measurements` ADD CONSTRAINT `measurements_specimen_fk` FOREIGN KEY (`specimen_id`) REFERENCES `specimens`(`id`) ON DELETE NO ACTION ON UPDATE NO ACTION',
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `measurements`');
  }
}
