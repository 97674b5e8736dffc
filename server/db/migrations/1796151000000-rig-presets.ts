import type { MigrationInterface, QueryRunner } from 'typeorm';

export class RigPresets1796151000000 implements MigrationInterface {
  name = 'RigPresets1796151000000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      `CREATE TABLE \`rig_presets\` (\`id\` uuid NOT NULL, \`organisation_id\` uuid NOT NULL, \`name\` varchar(60) NOT NULL, \`kind\` varchar(16) NOT NULL, \`preset\` json NOT NULL, \`shipped\` varchar(16) NULL, \`archived\` tinyint NOT NULL, \`updated_at\` datetime(3) NOT NULL, INDEX \`rig_presets_organisation\` (\`organisation_id\`), UNIQUE INDEX \`rig_presets_shipped\` (\`organisation_id\`, \`shipped\`), PRIMARY KEY (\`id\`)) ENGINE=InnoDB`,
    );
    await runner.query(
      `ALTER TABLE \`rig_presets\` ADD CONSTRAINT \`rig_presets_organisation_fk\` FOREIGN KEY (\`organisation_id\`) REFERENCES \`organisations\`(\`id\`) ON DELETE NO ACTION ON UPDATE NO ACTION`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `rig_presets`');
  }
}
