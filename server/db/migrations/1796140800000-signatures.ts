import type { MigrationInterface, QueryRunner } from 'typeorm';

export class Signatures1796140800000 implements MigrationInterface {
  name = 'Signatures1796140800000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      `CREATE TABLE \`signing_keys\` (\`fingerprint\` char(64) NOT NULL, \`organisation_id\` uuid NOT NULL, \`public_key\` char(64) NOT NULL, \`private_part\` varchar(200) NOT NULL, \`created_at\` datetime(3) NOT NULL, \`created_by\` uuid NULL, \`retired_at\` datetime(3) NULL, \`retired_reason\` varchar(500) NULL, INDEX \`signing_keys_organisation\` (\`organisation_id\`, \`created_at\`), PRIMARY KEY (\`fingerprint\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`head_signatures\` (\`study_id\` uuid NOT NULL, \`sequence\` int NOT NULL, \`head\` char(64) NOT NULL, \`moment\` varchar(16) NOT NULL, \`at\` char(24) NOT NULL, \`key_fingerprint\` char(64) NOT NULL, \`signature\` char(128) NOT NULL, PRIMARY KEY (\`study_id\`, \`sequence\`)) ENGINE=InnoDB`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE \`head_signatures\``);
    await runner.query(`DROP TABLE \`signing_keys\``);
  }
}
