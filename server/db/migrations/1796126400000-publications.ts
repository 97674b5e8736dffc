import type { MigrationInterface, QueryRunner } from 'typeorm';

export class Publications1796126400000 implements MigrationInterface {
  name = 'Publications1796126400000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      `CREATE TABLE \`publications\` (\`id\` char(8) NOT NULL, \`study_id\` uuid NOT NULL, \`organisation_id\` uuid NOT NULL, \`title\` varchar(80) NOT NULL, \`headline\` varchar(500) NOT NULL, \`publisher\` varchar(120) NOT NULL, \`digest\` char(64) NOT NULL, \`document\` longtext NOT NULL, \`bytes\` int NOT NULL, \`published_at\` datetime(3) NOT NULL, \`withdrawn_at\` datetime(3) NULL, \`withdrawn_reason\` varchar(500) NULL, UNIQUE INDEX \`publications_study\` (\`study_id\`), INDEX \`publications_organisation\` (\`organisation_id\`), INDEX \`publications_published\` (\`published_at\`), PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE \`publications\``);
  }
}
