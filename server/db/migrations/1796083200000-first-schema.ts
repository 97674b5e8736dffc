import type { MigrationInterface, QueryRunner } from 'typeorm';

export class FirstSchema1796083200000 implements MigrationInterface {
  name = 'FirstSchema1796083200000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      `CREATE TABLE \`code_keys\` (\`study_id\` uuid NOT NULL, \`rows\` text NOT NULL, \`salt\` char(64) NOT NULL, PRIMARY KEY (\`study_id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`draw_secrets\` (\`session_id\` uuid NOT NULL, \`secret\` char(64) NOT NULL, \`salt\` char(64) NOT NULL, PRIMARY KEY (\`session_id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`organisations\` (\`id\` uuid NOT NULL, \`name\` varchar(120) NOT NULL, \`demo\` tinyint NOT NULL, \`created_at\` datetime(3) NOT NULL, PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`specimens\` (\`id\` uuid NOT NULL, \`cable_id\` uuid NOT NULL, \`serial\` varchar(60) NOT NULL, \`note\` varchar(500) NOT NULL, \`archived\` tinyint NOT NULL, \`position\` int NOT NULL, INDEX \`specimens_cable\` (\`cable_id\`), PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`cables\` (\`id\` uuid NOT NULL, \`organisation_id\` uuid NOT NULL, \`name\` varchar(120) NOT NULL, \`kind\` varchar(16) NOT NULL, \`length_mm\` int NOT NULL, \`description\` text NOT NULL, \`archived\` tinyint NOT NULL, \`updated_at\` datetime(3) NOT NULL, INDEX \`cables_organisation\` (\`organisation_id\`), PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`users\` (\`id\` uuid NOT NULL, \`email\` varchar(200) NOT NULL, \`name\` varchar(120) NOT NULL, \`password_hash\` varchar(200) NOT NULL, \`created_at\` datetime(3) NOT NULL, UNIQUE INDEX \`users_email\` (\`email\`), PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`memberships\` (\`organisation_id\` uuid NOT NULL, \`user_id\` uuid NOT NULL, \`role\` varchar(16) NOT NULL, PRIMARY KEY (\`organisation_id\`, \`user_id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`answers\` (\`session_id\` uuid NOT NULL, \`trial\` int NOT NULL, \`seat\` varchar(8) NOT NULL, \`late\` tinyint NOT NULL, \`revision\` int NOT NULL, \`choice\` varchar(16) NOT NULL, \`confidence\` varchar(16) NULL, \`salt\` char(32) NOT NULL, \`leaf\` char(64) NOT NULL, \`held_at\` datetime(3) NOT NULL, INDEX \`answers_trial\` (\`session_id\`, \`trial\`), PRIMARY KEY (\`session_id\`, \`trial\`, \`seat\`, \`late\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`seats\` (\`id\` uuid NOT NULL, \`study_id\` uuid NOT NULL, \`session_id\` uuid NOT NULL, \`label\` varchar(8) NOT NULL, \`place\` varchar(24) NOT NULL, \`token_digest\` char(64) NOT NULL, INDEX \`seats_session\` (\`session_id\`), UNIQUE INDEX \`seats_token\` (\`token_digest\`), UNIQUE INDEX \`seats_label\` (\`study_id\`, \`label\`), PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`sessions\` (\`id\` uuid NOT NULL, \`organisation_id\` uuid NOT NULL, \`study_id\` uuid NOT NULL, \`number\` int NOT NULL, \`proctor_id\` uuid NOT NULL, \`room\` varchar(60) NOT NULL, \`planned_at\` datetime(3) NOT NULL, \`phase\` varchar(16) NOT NULL, \`code\` char(6) NULL, \`trials_locked\` int NOT NULL, \`listeners\` int NOT NULL, INDEX \`sessions_organisation\` (\`organisation_id\`), UNIQUE INDEX \`sessions_code\` (\`code\`), UNIQUE INDEX \`sessions_number\` (\`study_id\`, \`number\`), PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`web_sessions\` (\`id_digest\` char(64) NOT NULL, \`user_id\` uuid NULL, \`data\` text NOT NULL, \`expires_at\` datetime(3) NOT NULL, INDEX \`web_sessions_user\` (\`user_id\`), INDEX \`web_sessions_expires\` (\`expires_at\`), PRIMARY KEY (\`id_digest\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`studies\` (\`id\` uuid NOT NULL, \`organisation_id\` uuid NOT NULL, \`title\` varchar(80) NOT NULL, \`state\` varchar(16) NOT NULL, \`manager_id\` uuid NOT NULL, \`code_holder_id\` uuid NOT NULL, \`draft\` json NOT NULL, \`protocol\` mediumtext NULL, \`head_sequence\` int NOT NULL, \`head_digest\` char(64) NULL, \`codes_state\` varchar(16) NOT NULL, \`updated_at\` datetime(3) NOT NULL, INDEX \`studies_organisation\` (\`organisation_id\`), INDEX \`studies_code_holder\` (\`code_holder_id\`), PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`record_entries\` (\`study_id\` uuid NOT NULL, \`sequence\` int NOT NULL, \`session_number\` int NULL, \`at\` char(24) NOT NULL, \`kind\` varchar(40) NOT NULL, \`version\` int NOT NULL, \`payload\` mediumtext NOT NULL, \`nonce\` char(32) NOT NULL, \`previous\` char(64) NOT NULL, \`digest\` char(64) NOT NULL, INDEX \`record_entries_session\` (\`study_id\`, \`session_number\`, \`sequence\`), PRIMARY KEY (\`study_id\`, \`sequence\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `ALTER TABLE \`specimens\` ADD CONSTRAINT \`specimens_cable_fk\` FOREIGN KEY (\`cable_id\`) REFERENCES \`cables\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
    );
    await runner.query(
      `ALTER TABLE \`cables\` ADD CONSTRAINT \`cables_organisation_fk\` FOREIGN KEY (\`organisation_id\`) REFERENCES \`organisations\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
    );
    await runner.query(
      `ALTER TABLE \`memberships\` ADD CONSTRAINT \`memberships_organisation\` FOREIGN KEY (\`organisation_id\`) REFERENCES \`organisations\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
    );
    await runner.query(
      `ALTER TABLE \`memberships\` ADD CONSTRAINT \`memberships_user\` FOREIGN KEY (\`user_id\`) REFERENCES \`users\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE \`memberships\` DROP FOREIGN KEY \`memberships_user\``);
    await runner.query(`ALTER TABLE \`memberships\` DROP FOREIGN KEY \`memberships_organisation\``);
    await runner.query(`ALTER TABLE \`cables\` DROP FOREIGN KEY \`cables_organisation_fk\``);
    await runner.query(`ALTER TABLE \`specimens\` DROP FOREIGN KEY \`specimens_cable_fk\``);
    await runner.query(`DROP INDEX \`record_entries_session\` ON \`record_entries\``);
    await runner.query(`DROP TABLE \`record_entries\``);
    await runner.query(`DROP INDEX \`studies_code_holder\` ON \`studies\``);
    await runner.query(`DROP INDEX \`studies_organisation\` ON \`studies\``);
    await runner.query(`DROP TABLE \`studies\``);
    await runner.query(`DROP INDEX \`web_sessions_expires\` ON \`web_sessions\``);
    await runner.query(`DROP INDEX \`web_sessions_user\` ON \`web_sessions\``);
    await runner.query(`DROP TABLE \`web_sessions\``);
    await runner.query(`DROP INDEX \`sessions_number\` ON \`sessions\``);
    await runner.query(`DROP INDEX \`sessions_code\` ON \`sessions\``);
    await runner.query(`DROP INDEX \`sessions_organisation\` ON \`sessions\``);
    await runner.query(`DROP TABLE \`sessions\``);
    await runner.query(`DROP INDEX \`seats_label\` ON \`seats\``);
    await runner.query(`DROP INDEX \`seats_token\` ON \`seats\``);
    await runner.query(`DROP INDEX \`seats_session\` ON \`seats\``);
    await runner.query(`DROP TABLE \`seats\``);
    await runner.query(`DROP INDEX \`answers_trial\` ON \`answers\``);
    await runner.query(`DROP TABLE \`answers\``);
    await runner.query(`DROP TABLE \`memberships\``);
    await runner.query(`DROP INDEX \`users_email\` ON \`users\``);
    await runner.query(`DROP TABLE \`users\``);
    await runner.query(`DROP INDEX \`cables_organisation\` ON \`cables\``);
    await runner.query(`DROP TABLE \`cables\``);
    await runner.query(`DROP INDEX \`specimens_cable\` ON \`specimens\``);
    await runner.query(`DROP TABLE \`specimens\``);
    await runner.query(`DROP TABLE \`organisations\``);
    await runner.query(`DROP TABLE \`draw_secrets\``);
    await runner.query(`DROP TABLE \`code_keys\``);
  }
}
