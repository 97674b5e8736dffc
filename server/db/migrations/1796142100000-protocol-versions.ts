import type { MigrationInterface, QueryRunner } from 'typeorm';

export class ProtocolVersions1796142100000 implements MigrationInterface {
  name = 'ProtocolVersions1796142100000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      `CREATE TABLE \`protocol_versions\` (\`study_id\` uuid NOT NULL, \`version\` int NOT NULL, \`protocol\` mediumtext NOT NULL, PRIMARY KEY (\`study_id\`, \`version\`)) ENGINE=InnoDB`,
    );
    // Until now every sealed protocol was its study's first and only version.
    await runner.query(
      `INSERT INTO \`protocol_versions\` SELECT \`id\`, 1, \`protocol\` FROM \`studies\` WHERE \`protocol\` IS NOT NULL`,
    );
    for (const act of ['update', 'delete'])
      await runner.query(
        `CREATE TRIGGER protocol_versions_no_${act} BEFORE ${act} ON protocol_versions FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'A sealed protocol is never edited.'`,
      );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE \`protocol_versions\``);
  }
}
