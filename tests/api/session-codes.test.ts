import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { Console } from '../support/live.ts';
import { makeOrganisation, readyStudy } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

describe('a session code', () => {
  let server: TestServer;
  let code: string;
  let desk: Console;

  beforeAll(async () => {
    server = await testServer({ clock: new HandClock(Date.parse('2026-12-05T18:00:00.000Z')) });
    const people = await makeOrganisation(server, 'Harbour');
    const { sessionId } = await readyStudy(server, people);
    desk = await Console.open(server.address, people.proctor.email, sessionId);
    code = await desk.openSeating();
  });
  afterAll(async () => {
    desk.close();
    await server.stop();
  });

  const look = (tried: string) => request(server.address).post('/api/seats/look').send({ code: tried });

  it('has six characters of thirty bits, and is taken in lower case too [A8]', async () => {
    expect(code).toMatch(/^[2-9A-HJ-NP-Z]{6}$/);
    expect((await look(code.toLowerCase()).expect(200)).body.title).toBe('Study Plover');
  });

  it('ends with its session, and is then answered as one that never was [A8]', async () => {
    await desk.act({ kind: 'abandon', reason: 'Nobody came.' });
    const ended = await look(code);
    const never = await look(code === '222222' ? '333333' : '222222');
    const plain = ({ status, body }: typeof ended) => ({ status, title: body.title, detail: body.detail });
    expect(plain(ended)).toEqual(plain(never));
    expect(ended.status).toBe(404);
  });

  it('cannot be found by trying: sixty wrong ones in ten minutes, and no more are looked at [A8]', async () => {
    const statuses: number[] = [];
    for (let number = 0; number < 62; number += 1) statuses.push((await look(`22${String(number + 2222)}`)).status);
    expect(new Set(statuses)).toEqual(new Set([404, 400, 429]));
    expect(statuses.at(-1)).toBe(429);
  });
});
