import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { localAuthority } from '../../server/timestamps/local-authority.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, readyStudy } from '../support/people.ts';
import { begin, presentTrial } from '../support/run-session.ts';
import { type TestServer, testServer } from '../support/test-server.ts';
import { untilAsked } from '../support/until.ts';

// Asked by the account that the application itself uses, past all of its code.

describe('the database', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  const folder = mkdtempSync(join(tmpdir(), 'fairlead-data-'));
  let server: TestServer;
  let desk: Console;
  let phone: Phone;

  beforeAll(async () => {
    server = await testServer({ clock, timestamps: await localAuthority(folder) });
    const people = await makeOrganisation(server, 'Harbour');
    const study = await readyStudy(server, people, { listenersPerSession: 1 });
    desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    phone = await Phone.join(server.address, await desk.openSeating(), 'sofa');
    await begin(desk, [phone], clock);
    await presentTrial(desk, clock);
    await phone.answer(1, 'A');
    await desk.sees('all in', (view) => view.trial?.answered === 1);
  });
  afterAll(async () => {
    desk.close();
    phone.close();
    await server.stop();
    rmSync(folder, { recursive: true });
  });

  const ask = (sql: string) => server.deps.db.query(sql);
  const count = async (table: string) => Number((await ask(`select count(*) as rows_ from ${table}`))[0].rows_);

  it('lets an answer be changed until its trial locks, and not from then on [X7]', async () => {
    await phone.answer(1, 'B');
    expect(
      (await ask('select choice from answers where late = 0')).map(({ choice }: { choice: string }) => choice),
    ).toEqual(['B']);
    await desk.act({ kind: 'lock-trial' });
    await expect(ask("update answers set choice = 'A' where trial = 1")).rejects.toThrow('The trial is locked');
    await expect(ask('update answers set late = 1 where trial = 1')).rejects.toThrow('The trial is locked');
    const again =
      "insert into answers select session_id, trial, seat, late, 9, 'A', confidence, salt, leaf, held_at from answers where trial = 1 on duplicate key update choice = 'A'";
    await expect(ask(again)).rejects.toThrow('The trial is locked');
    await presentTrial(desk, clock);
    await phone.answer(2, 'A');
    await phone.answer(2, 'B');
    expect((await ask('select choice from answers where trial = 2'))[0].choice).toBe('B');
    await desk.act({ kind: 'lock-trial' });
  });

  it('lets answers be erased until the session ends, and keeps them afterwards [X7]', async () => {
    await ask('delete from answers where trial = 2');
    await desk.act({ kind: 'abandon', reason: 'A test of the database' });
    await expect(ask('delete from answers where trial = 1')).rejects.toThrow('The session has ended');
    expect(await count('answers')).toBe(1);
  });

  it.each([
    ['record_entries', "payload = '{}'"],
    ['record_entries', 'session_number = null'],
    ['head_signatures', "at = '2026-01-01T00:00:00.000Z'"],
    ['timestamp_tokens', 'gap_ms = 0'],
  ])('refuses to change or delete rows of %s (%s) [X6]', async (table, change) => {
    await untilAsked('a row', async () => {
      clock.advance(1000);
      return (await count(table)) > 2;
    });
    const before = await count(table);
    await expect(ask(`update ${table} set ${change}`)).rejects.toThrow('The record is only added to');
    await expect(ask(`delete from ${table}`)).rejects.toThrow('The record is only added to');
    await expect(ask(`replace into ${table} select * from ${table} limit 1`)).rejects.toThrow('only added to');
    expect(await count(table)).toBe(before);
  });

  it('lets a publication be withdrawn once, and nothing else be done to it [X12]', async () => {
    await ask(
      "insert into publications select substr(md5(rand()), 1, 8), id, organisation_id, title, 'A finding', 'Harbour', repeat('0', 64), '{}', 2, now(), null, null from studies",
    );
    for (const change of [
      "document = '[]'",
      "digest = repeat('1', 64)",
      "headline = 'Another'",
      'published_at = now() + interval 1 day',
    ])
      await expect(ask(`update publications set ${change}`)).rejects.toThrow('frozen');
    await expect(ask('delete from publications')).rejects.toThrow('stays at its address');
    await ask("update publications set withdrawn_at = now(), withdrawn_reason = 'The chain was wrong'");
    await expect(ask('update publications set withdrawn_at = null')).rejects.toThrow('frozen');
  });

  it('lets a key be retired once, and nothing else be done to it [X6]', async () => {
    for (const change of [
      "public_key = repeat('0', 64)",
      "fingerprint = repeat('0', 64)",
      'organisation_id = uuid()',
      'created_at = now()',
    ])
      await expect(ask(`update signing_keys set ${change}`)).rejects.toThrow('otherwise kept');
    await expect(ask('delete from signing_keys')).rejects.toThrow('never deleted');
    await ask('update signing_keys set retired_at = now()');
    await expect(ask('update signing_keys set retired_at = null')).rejects.toThrow('otherwise kept');
  });
});
