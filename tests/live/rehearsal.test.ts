import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { begin, presentTrial } from '../support/run-session.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

const ofSignIn = ['web_sessions', 'sign_in_attempts'];

describe('a rehearsal', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  let server: TestServer;
  let people: TestOrganisation;
  let study: Awaited<ReturnType<typeof readyStudy>>;
  let rehearsalId: string;

  beforeAll(async () => {
    server = await testServer({ clock });
    people = await makeOrganisation(server, 'Harbour');
    study = await readyStudy(server, people);
    const proctor = await signedIn(server, people.proctor.email);
    const begun = await proctor.post(`${study.base}/rehearsals`).send({ sessionId: study.sessionId }).expect(200);
    rehearsalId = begun.body.id;
  });
  afterAll(() => server.stop());

  /** Every row of every table but those of sign-in, which the test itself writes. */
  async function everyTable(): Promise<Map<string, string>> {
    const { db } = server.deps;
    const tables: Record<string, string>[] = await db.query('show tables');
    const names = tables.flatMap((row) => Object.values(row)).filter((name) => !ofSignIn.includes(name));
    const read = async (name: string) => [name, JSON.stringify(await db.query(`select * from \`${name}\``))] as const;
    return new Map(await Promise.all(names.map(read)));
  }

  it('runs by the session’s own plan to its end and leaves nothing in the database [S16]', async () => {
    const before = await everyTable();
    const desk = await Console.open(server.address, people.proctor.email, rehearsalId);
    expect(desk.now).toMatchObject({ rehearsal: true, title: 'Study Plover' });
    const code = await desk.openSeating();
    const phones = [await Phone.join(server.address, code, 'left'), await Phone.join(server.address, code, 'right')];
    expect(phones.map(({ view, seat }) => [seat, view?.rehearsal])).toEqual([
      ['L01', true],
      ['L02', true],
    ]);
    await begin(desk, phones, clock);
    for (let trial = 1; trial <= 5; trial += 1) {
      const [a, b, x] = await presentTrial(desk, clock);
      expect(a).toMatch(/^[1-9]\d\d$/);
      expect([a, b]).toContain(x);
      for (const phone of phones) await phone.answer(trial, 'A');
      await desk.act({ kind: 'lock-trial' });
    }
    await desk.act({ kind: 'finish' });
    expect(desk.now.phase).toBe('finished');
    for (const page of [desk, ...phones]) page.close();
    const after = await everyTable();
    expect(after.size).toBeGreaterThan(10);
    expect([...after].filter(([name, rows]) => rows !== before.get(name)).map(([name]) => name)).toEqual([]);
  });

  it('leaves the session as it was: planned, with its own codes [S16]', async () => {
    const desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    expect(desk.now).toMatchObject({ rehearsal: false, phase: 'planned' });
    desk.close();
  });

  it('opens for its own leader alone', async () => {
    await expect(Console.open(server.address, people.manager.email, rehearsalId)).rejects.toThrow('a first view');
  });

  it('is refused for a session that is not the proctor’s to see', async () => {
    const proctor = await signedIn(server, people.proctor.email);
    await proctor.post(`${study.base}/rehearsals`).send({ sessionId: server.deps.random.id() }).expect(404);
  });
});
