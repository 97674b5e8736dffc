import type { MigrationInterface, QueryRunner } from 'typeorm';

const refuse = (message: string) => `SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = '${message}'`;

/** What single listeners asked to hear. A request is on the record at once, so its row never changes. */
export class PresentationRequests1796152400000 implements MigrationInterface {
  name = 'PresentationRequests1796152400000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      'CREATE TABLE `presentation_requests` (`session_id` uuid NOT NULL, `trial` int NOT NULL, `presentation` int NOT NULL, `seat` varchar(8) NOT NULL, `label` varchar(16) NOT NULL, `salt` char(32) NOT NULL, `leaf` char(64) NOT NULL, PRIMARY KEY (`session_id`, `trial`, `presentation`)) ENGINE=InnoDB',
    );
    for (const act of ['update', 'delete'])
      await runner.query(
        `CREATE TRIGGER presentation_requests_no_${act} BEFORE ${act} ON presentation_requests FOR EACH ROW ${refuse('What was asked for is on the record; it does not change.')}`,
      );
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const act of ['update', 'delete']) await runner.query(`DROP TRIGGER presentation_requests_no_${act}`);
    await runner.query('DROP TABLE `presentation_requests`');
  }
}
