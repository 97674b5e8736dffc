import type { MigrationInterface, QueryRunner } from 'typeorm';

export class Mail1796130000000 implements MigrationInterface {
  name = 'Mail1796130000000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      `CREATE TABLE \`outbox\` (\`id\` uuid NOT NULL, \`organisation_id\` uuid NULL, \`recipient\` varchar(200) NOT NULL, \`subject\` varchar(250) NOT NULL, \`text\` mediumtext NOT NULL, \`html\` mediumtext NOT NULL, \`state\` varchar(16) NOT NULL, \`attempts\` int NOT NULL, \`last_error\` varchar(500) NULL, \`next_attempt_at\` datetime(3) NOT NULL, \`created_at\` datetime(3) NOT NULL, \`sent_at\` datetime(3) NULL, INDEX \`outbox_organisation\` (\`organisation_id\`, \`created_at\`), INDEX \`outbox_due\` (\`state\`, \`next_attempt_at\`), PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE \`outbox\``);
  }
}
