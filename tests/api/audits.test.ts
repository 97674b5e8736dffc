import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { AuditFault, AuditOutcome } from '#shared/contracts/audits.ts';
import { confirmationIds } from '#shared/contracts/publications.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { auditAll, auditWhenDue } from '../../server/features/audits/audits.service.ts';
import { OutgoingMail } from '../../server/mail/outgoing-mail.entity.ts';
import { localAuthority } from '../../server/timestamps/local-authority.ts';
import { pastTriggers } from '../support/past-triggers.ts';
import { makeOrganisation, signedIn, type TestOrganisation } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';
import { untilAsked } from '../support/until.ts';
import { wholeStudy } from '../support/whole-study.ts';

const dayMs = 24 * 3_600_000;

describe('the audit', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  const folder = mkdtempSync(join(tmpdir(), 'fairlead-data-'));
  let server: TestServer;
  let people: TestOrganisation;
  let study: Awaited<ReturnType<typeof wholeStudy>>;
  beforeAll(async () => {
    server = await testServer({ clock, timestamps: await localAuthority(folder) });
    people = await makeOrganisation(server, 'Harbour');
    await makeOrganisation(server, 'Elsewhere');
    study = await wholeStudy(server, people, clock, 'Study Plover');
    const confirmations = Object.fromEntries(confirmationIds.map((id) => [id, true]));
    const statements = { paid: 'The makers', supplied: 'The makers, from stock', ties: 'none' };
    await study.manager
      .post(`${study.at}/publication`)
      .send({ ...statements, confirmations })
      .expect(200);
    await untilAsked('every token', async () => {
      clock.advance(1000);
      return Number((await ask('select count(*) as n from token_requests'))[0].n) === 0;
    });
  });
  afterAll(async () => {
    await server.stop();
    rmSync(folder, { recursive: true });
  });

  const ask = (sql: string) => server.deps.db.query(sql);
  const rowsOf = async (sql: string): Promise<Record<string, string>[]> => ask(sql);

  async function audited(): Promise<AuditFault[]> {
    const faults: AuditFault[] = [];
    for await (const audit of auditAll(server.deps)) faults.push(...audit.faults);
    return faults;
  }

  const past = (...statements: string[]) => pastTriggers(server.deps.db, ...statements);

  it('finds that every record of the database holds [X8]', async () => {
    expect(await audited()).toEqual([]);
    const sums = [];
    for await (const { organisationId, studies, signatures, tokens, entries } of auditAll(server.deps))
      sums.push({ own: organisationId === people.organisationId, studies, signatures, tokens, some: entries > 50 });
    expect(sums.sort((a, b) => b.studies - a.studies)).toEqual([
      { own: true, studies: 1, signatures: 5, tokens: 5, some: true },
      { own: false, studies: 0, signatures: 0, tokens: 0, some: false },
    ]);
  });

  const keep = (table: string) => `create table kept as select * from ${table}`;
  const putBack = (table: string) => [
    `delete from ${table}`,
    `insert into ${table} select * from kept`,
    'drop table kept',
  ];
  const ofFirst = 'where sequence = 1';

  it.each<[string, string, string, number | null, string]>([
    [
      'a payload',
      'record_entries',
      `update record_entries set payload = replace(payload, '"protocolVersion":1', '"protocolVersion":2') ${ofFirst}`,
      1,
      'does not match its digest',
    ],
    [
      'a time',
      'record_entries',
      "update record_entries set at = '2026-12-04T00:00:00.000Z' where sequence = 7",
      7,
      'does not match its digest',
    ],
    [
      'a link',
      'record_entries',
      "update record_entries set previous = repeat('0', 64) where sequence = 9",
      9,
      'does not link',
    ],
    ['a missing entry', 'record_entries', 'delete from record_entries where sequence = 12', 12, 'found entry 13'],
    [
      'a missing end',
      'record_entries',
      "delete from record_entries where kind in ('study-published')",
      null,
      'should end with entry',
    ],
    [
      'another document',
      'publications',
      "update publications set document = replace(document, 'Piano', 'Organ')",
      null,
      'not the one that was published',
    ],
    ['a document gone', 'publications', 'delete from publications', null, 'that was published is gone'],
    ['a whole record gone', 'record_entries', 'delete from record_entries', 1, 'and there is none'],
    [
      'another head kept',
      'studies',
      "update studies set head_digest = repeat('0', 64)",
      null,
      'not the head that the study keeps',
    ],
    [
      'another protocol',
      'studies',
      "update studies set protocol = replace(protocol, 'Player', 'Another player')",
      1,
      'not the one that was sealed',
    ],
    [
      'a bent signature',
      'head_signatures',
      `update head_signatures set signature = repeat('0', 128) ${ofFirst}`,
      1,
      'signature does not hold',
    ],
    [
      'another time signed',
      'head_signatures',
      `update head_signatures set at = '2026-12-06T00:00:00.000Z' ${ofFirst}`,
      1,
      'signature does not hold',
    ],
    ['a missing signature', 'head_signatures', `delete from head_signatures ${ofFirst}`, 1, 'its signature is missing'],
    ['another public key', 'signing_keys', "update signing_keys set public_key = repeat('1', 64)", 1, 'fingerprint'],
    [
      'a bent token',
      'timestamp_tokens',
      `update timestamp_tokens set reply = concat(left(reply, length(reply) - 1), x'00') ${ofFirst}`,
      1,
      'signature does not hold',
    ],
    [
      'a garbled token',
      'timestamp_tokens',
      `update timestamp_tokens set reply = 'none' ${ofFirst}`,
      1,
      'cannot be read',
    ],
    [
      'another time of a token',
      'timestamp_tokens',
      `update timestamp_tokens set time = '2026-11-01T00:00:00.000Z' ${ofFirst}`,
      1,
      'does not say',
    ],
    [
      'other certificates',
      'timestamp_tokens',
      `update timestamp_tokens set certificates = '' ${ofFirst}`,
      1,
      'signature does not hold',
    ],
    [
      'another answer',
      'answers',
      "update answers set choice = if(choice = 'A', 'B', 'A') where trial = 3 and seat = 'L01'",
      null,
      'L01 to trial 3 of session 1 is not the one',
    ],
    [
      'an answer gone',
      'answers',
      "delete from answers where trial = 4 and seat = 'L02'",
      null,
      'L02 to trial 4 of session 1 is gone',
    ],
  ])('finds what was bent (%s) and says where [X8]', async (_what, table, bend, sequence, why) => {
    await past(keep(table), bend);
    const faults = await audited();
    await past(...putBack(table));
    expect(faults).toHaveLength(1);
    expect(faults[0]).toMatchObject({ studyId: study.studyId, title: 'Study Plover' });
    expect(faults[0]?.why).toContain(why);
    if (sequence !== null) expect(faults[0]?.sequence).toBe(sequence);
    else expect(faults[0]?.sequence).toBeGreaterThan(1);
    expect(await audited()).toEqual([]);
  });

  it('finds that the database no longer refuses to change records [X8]', async () => {
    const [row] = await rowsOf('show create trigger answers_no_update');
    await ask('drop trigger answers_no_update');
    const faults = await audited();
    await ask(row?.['SQL Original Statement'] ?? '');
    // Told to each of the two organisations.
    expect(faults).toHaveLength(2);
    expect(faults[0]).toMatchObject({ studyId: null, sequence: null });
    expect(faults[0]?.why).toContain('answers_no_update');
  });

  it('runs once a day, and its outcome is kept for the owner, with its date, and for nobody else [X9]', async () => {
    const owner = await signedIn(server, people.owner.email);
    const path = `/api/organisations/${people.organisationId}/audit`;
    const latest = async () => (await owner.get(path).expect(200)).body.latest as AuditOutcome | null;
    expect(await latest()).toBeNull();
    await auditWhenDue(server.deps);
    const first = await latest();
    expect(first).toMatchObject({ at: new Date(clock.now()).toISOString(), studies: 1, signatures: 5, faults: [] });
    clock.advance(dayMs - 1);
    await auditWhenDue(server.deps);
    expect(await latest()).toEqual(first);
    clock.advance(1);
    await past(keep('head_signatures'), `delete from head_signatures ${ofFirst}`);
    await auditWhenDue(server.deps);
    const second = await latest();
    expect(second?.at).toBe(new Date(clock.now()).toISOString());
    expect(second?.faults.map(({ title, sequence }) => [title, sequence])).toEqual([['Study Plover', 1]]);
    const mails = () =>
      server.deps.db.manager.findBy(OutgoingMail, { recipient: people.owner.email, subject: 'A record does not hold' });
    const [mail, ...others] = await mails();
    expect(others).toEqual([]);
    expect(mail?.text).toContain('Study Plover, at entry 1.');
    expect(mail?.text).toContain(`/organisations/${people.organisationId}/proof`);
    // The next day it is still so, and nobody is told again.
    clock.advance(dayMs);
    await auditWhenDue(server.deps);
    expect((await latest())?.faults).toEqual(second?.faults);
    expect(await mails()).toHaveLength(1);
    await past(...putBack('head_signatures'));
    await study.manager.get(path).expect(403);
  });

  it('ends as a command with status 0 only when every record holds [X8]', async () => {
    const { socketPath = '', user, password, name } = server.deps.config.database;
    const run = (database: string) =>
      spawnSync('node', ['--import', 'tsx', 'server/bin/audit.ts'], {
        encoding: 'utf8',
        env: {
          PATH: process.env.PATH,
          TSX_TSCONFIG_PATH: 'server/tsconfig.json',
          DATABASE_SOCKET: socketPath,
          DATABASE_USER: user,
          DATABASE_PASSWORD: password,
          DATABASE_NAME: database,
        },
      });
    const good = run(name);
    expect(good.stdout).toMatch(
      /2 organisations, 1 studies: \d+ entries, 5 signatures, 5 tokens\.\nEvery record holds\./,
    );
    expect(good.status).toBe(0);
    await past(keep('record_entries'), 'delete from record_entries where sequence = 12');
    const broken = run(name);
    await past(...putBack('record_entries'));
    expect(broken.stdout).toContain(
      `BROKEN  Study Plover (${study.studyId}), entry 12: expected entry 12, found entry 13.`,
    );
    expect(broken.status).toBe(1);
    const none = run('fairlead_none');
    expect(none.status).toBe(2);
    expect(none.stderr).toContain('could not be audited');
  }, 90_000);
});
