import type { MigrationInterface, QueryRunner } from 'typeorm';

export class Timestamps1796140900000 implements MigrationInterface {
  name = 'Timestamps1796140900000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      `CREATE TABLE \`token_requests\` (\`study_id\` uuid NOT NULL, \`sequence\` int NOT NULL, \`attempts\` int NOT NULL, \`last_error\` varchar(500) NULL, \`next_attempt_at\` datetime(3) NOT NULL, INDEX \`token_requests_due\` (\`next_attempt_at\`), PRIMARY KEY (\`study_id\`, \`sequence\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`timestamp_tokens\` (\`study_id\` uuid NOT NULL, \`sequence\` int NOT NULL, \`imprint\` char(64) NOT NULL, \`authority\` varchar(200) NOT NULL, \`is_local\` tinyint NOT NULL, \`time\` char(24) NOT NULL, \`gap_ms\` bigint NOT NULL, \`serial\` varchar(80) NOT NULL, \`attempts\` int NOT NULL, \`request\` blob NOT NULL, \`reply\` mediumblob NOT NULL, \`certificates\` mediumtext NOT NULL, \`received_at\` datetime(3) NOT NULL, PRIMARY KEY (\`study_id\`, \`sequence\`)) ENGINE=InnoDB`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE \`timestamp_tokens\``);
    await runner.query(`DROP TABLE \`token_requests\``);
  }
}
