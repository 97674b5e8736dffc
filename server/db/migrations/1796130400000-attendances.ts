import type { MigrationInterface, QueryRunner } from 'typeorm';

export class Attendances1796130400000 implements MigrationInterface {
  name = 'Attendances1796130400000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      `CREATE TABLE \`listeners\` (\`id\` uuid NOT NULL, \`organisation_id\` uuid NOT NULL, \`study_id\` uuid NOT NULL, \`email\` varchar(200) NULL, \`label\` varchar(8) NULL, UNIQUE INDEX \`listeners_label\` (\`study_id\`, \`label\`), UNIQUE INDEX \`listeners_email\` (\`study_id\`, \`email\`), PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`attendances\` (\`id\` uuid NOT NULL, \`organisation_id\` uuid NOT NULL, \`session_id\` uuid NOT NULL, \`listener_id\` uuid NOT NULL, \`state\` varchar(16) NOT NULL, \`position\` int NOT NULL, \`sequence\` int NULL, \`in_calendar\` tinyint NOT NULL, \`seated\` tinyint NOT NULL, \`reminder_id\` uuid NULL, \`invited_by\` uuid NOT NULL, \`invited_at\` datetime(3) NOT NULL, \`answered_at\` datetime(3) NULL, INDEX \`attendances_session\` (\`session_id\`, \`position\`), UNIQUE INDEX \`attendances_listener\` (\`session_id\`, \`listener_id\`), PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
    await runner.query(`ALTER TABLE \`sessions\` ADD \`time_zone\` varchar(64) NOT NULL DEFAULT 'UTC'`);
    await runner.query(`ALTER TABLE \`sessions\` ALTER \`time_zone\` DROP DEFAULT`);
    await runner.query(
      `ALTER TABLE \`outbox\` ADD \`calendar\` mediumtext NULL, ADD \`calendar_method\` varchar(16) NULL, ADD \`listener_id\` uuid NULL, ADD INDEX \`outbox_listener\` (\`listener_id\`)`,
    );
    await runner.query(
      `ALTER TABLE \`seats\` DROP INDEX \`seats_label\`, ADD UNIQUE INDEX \`seats_label\` (\`session_id\`, \`label\`), ADD INDEX \`seats_study\` (\`study_id\`)`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(
      `ALTER TABLE \`seats\` DROP INDEX \`seats_study\`, DROP INDEX \`seats_label\`, ADD UNIQUE INDEX \`seats_label\` (\`study_id\`, \`label\`)`,
    );
    await runner.query(
      `ALTER TABLE \`outbox\` DROP INDEX \`outbox_listener\`, DROP COLUMN \`listener_id\`, DROP COLUMN \`calendar_method\`, DROP COLUMN \`calendar\``,
    );
    await runner.query(`ALTER TABLE \`sessions\` DROP COLUMN \`time_zone\``);
    for (const table of ['attendances', 'listeners']) await runner.query(`DROP TABLE \`${table}\``);
  }
}
