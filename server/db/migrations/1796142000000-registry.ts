import type { MigrationInterface, QueryRunner } from 'typeorm';

const tables = ['registry_leaves', 'registry_heads'];

export class Registry1796142000000 implements MigrationInterface {
  name = 'Registry1796142000000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      `CREATE TABLE \`registry_leaves\` (\`organisation_id\` uuid NOT NULL, \`leaf_index\` int NOT NULL, \`study_id\` uuid NOT NULL, \`version\` int NOT NULL, \`digest\` char(64) NOT NULL, \`sealed_at\` char(24) NOT NULL, \`hash\` char(64) NOT NULL, UNIQUE INDEX \`registry_leaves_version\` (\`study_id\`, \`version\`), PRIMARY KEY (\`organisation_id\`, \`leaf_index\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `CREATE TABLE \`registry_heads\` (\`organisation_id\` uuid NOT NULL, \`size\` int NOT NULL, \`root\` char(64) NOT NULL, \`at\` char(24) NOT NULL, \`key_fingerprint\` char(64) NOT NULL, \`public_key\` char(64) NOT NULL, \`signature\` char(128) NOT NULL, PRIMARY KEY (\`organisation_id\`, \`size\`)) ENGINE=InnoDB`,
    );
    for (const table of tables)
      for (const act of ['update', 'delete'])
        await runner.query(
          `CREATE TRIGGER ${table}_no_${act} BEFORE ${act} ON ${table} FOR EACH ROW SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'The registry is only added to; nothing in it changes.'`,
        );
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const table of tables) await runner.query(`DROP TABLE \`${table}\``);
  }
}
