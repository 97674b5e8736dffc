import type { MigrationInterface, QueryRunner } from 'typeorm';

export class Audits1796141100000 implements MigrationInterface {
  name = 'Audits1796141100000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      `CREATE TABLE \`audits\` (\`organisation_id\` uuid NOT NULL, \`at\` datetime(3) NOT NULL, \`studies\` int NOT NULL, \`entries\` int NOT NULL, \`signatures\` int NOT NULL, \`tokens\` int NOT NULL, \`faults\` json NOT NULL, PRIMARY KEY (\`organisation_id\`, \`at\`)) ENGINE=InnoDB`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE \`audits\``);
  }
}
