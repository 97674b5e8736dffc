import type { MigrationInterface, QueryRunner } from 'typeorm';

export class Construction1796149000000 implements MigrationInterface {
  name = 'Construction1796149000000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE \`cables\` ADD \`construction\` json NULL`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE \`cables\` DROP COLUMN \`construction\``);
  }
}
