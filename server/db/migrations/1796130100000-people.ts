import type { MigrationInterface, QueryRunner } from 'typeorm';

export class People1796130100000 implements MigrationInterface {
  name = 'People1796130100000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      `CREATE TABLE \`invitations\` (\`id\` uuid NOT NULL, \`organisation_id\` uuid NOT NULL, \`email\` varchar(200) NOT NULL, \`role\` varchar(16) NOT NULL, \`token_digest\` char(64) NOT NULL, \`invited_by\` uuid NOT NULL, \`invited_at\` datetime(3) NOT NULL, \`expires_at\` datetime(3) NOT NULL, \`accepted_at\` datetime(3) NULL, UNIQUE INDEX \`invitations_token\` (\`token_digest\`), INDEX \`invitations_organisation\` (\`organisation_id\`, \`email\`), PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`password_resets\` (\`token_digest\` char(64) NOT NULL, \`user_id\` uuid NOT NULL, \`expires_at\` datetime(3) NOT NULL, INDEX \`password_resets_user\` (\`user_id\`), PRIMARY KEY (\`token_digest\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`sign_in_attempts\` (\`id\` uuid NOT NULL, \`user_id\` uuid NOT NULL, \`at\` datetime(3) NOT NULL, \`succeeded\` tinyint NOT NULL, \`address\` varchar(45) NOT NULL, \`browser\` varchar(200) NOT NULL, INDEX \`sign_in_attempts_at\` (\`at\`), INDEX \`sign_in_attempts_user\` (\`user_id\`, \`at\`), PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`past_roles\` (\`id\` uuid NOT NULL, \`organisation_id\` uuid NOT NULL, \`user_id\` uuid NOT NULL, \`role\` varchar(16) NOT NULL, \`ended_at\` datetime(3) NOT NULL, INDEX \`past_roles_organisation\` (\`organisation_id\`), PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `ALTER TABLE \`memberships\` ADD \`joined_at\` datetime(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3)`,
    );
    await runner.query(
      `ALTER TABLE \`web_sessions\` ADD \`address\` varchar(45) NOT NULL DEFAULT '', ADD \`browser\` varchar(200) NOT NULL DEFAULT '', ADD \`signed_in_at\` datetime(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3), ADD \`last_seen_at\` datetime(3) NOT NULL DEFAULT CURRENT_TIMESTAMP(3)`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(
      `ALTER TABLE \`web_sessions\` DROP COLUMN \`last_seen_at\`, DROP COLUMN \`signed_in_at\`, DROP COLUMN \`browser\`, DROP COLUMN \`address\``,
    );
    await runner.query(`ALTER TABLE \`memberships\` DROP COLUMN \`joined_at\``);
    for (const table of ['past_roles', 'sign_in_attempts', 'password_resets', 'invitations'])
      await runner.query(`DROP TABLE \`${table}\``);
  }
}
