import request from 'supertest';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { demoPeople } from '../../server/demo/demo-people.ts';
import { PasswordReset } from '../../server/features/account/password-reset.entity.ts';
import { hashPassword } from '../../server/features/users/passwords.ts';
import { User } from '../../server/features/users/user.entity.ts';
import { tokenInMail } from '../support/links.ts';
import { Console } from '../support/live.ts';
import { makeOrganisation, password, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { SmtpReceiver, smtpEnvironment } from '../support/smtp-receiver.ts';
import { type TestServer, testServer } from '../support/test-server.ts';
import { until } from '../support/until.ts';

let receiver: SmtpReceiver;
let server: TestServer;
beforeAll(async () => {
  receiver = await SmtpReceiver.open();
  server = await testServer({ environment: smtpEnvironment(receiver) });
});
afterAll(async () => {
  await server.stop();
  await receiver.close();
});

let count = 0;
let people: TestOrganisation;
beforeEach(async () => {
  count += 1;
  people = await makeOrganisation(server, `Harbour${count}`);
});

const ask = (email: string) => request(server.address).post('/api/password-resets').send({ email });
const use = (token: string, chosen: string) =>
  request(server.address).post('/api/password-resets/use').send({ token, password: chosen });

describe('a forgotten password', () => {
  it('is answered alike, and after the same time, for an address without an account [P7]', async () => {
    const timed = async (email: string) => {
      const begun = performance.now();
      const { status, text } = await ask(email);
      return { answer: { status, text }, ms: performance.now() - begun };
    };
    const known = await timed(people.manager.email.toUpperCase());
    const unknown = await timed(`nobody@harbour${count}.example`);
    expect(unknown.answer).toEqual(known.answer);
    expect(known.answer.status).toBe(200);
    for (const { ms } of [known, unknown]) expect(ms).toBeGreaterThan(245);
    await receiver.to(people.manager.email, 'new password');
    expect(receiver.mails.filter(({ to }) => to?.[0]?.address?.startsWith('nobody'))).toEqual([]);
  });

  it('is set anew once, and every sign-in and console of the person ends [P8]', async () => {
    const study = await readyStudy(server, people);
    const desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    const phone = await signedIn(server, people.proctor.email);
    await ask(people.proctor.email).expect(200);
    const first = await tokenInMail(receiver, people.proctor.email, 'new password');
    await ask(people.proctor.email).expect(200);
    const second = await tokenInMail(receiver, people.proctor.email, 'new password');
    const stored = await server.deps.db.manager.findBy(PasswordReset, { userId: people.proctor.id });
    expect(stored).toHaveLength(2);
    expect(JSON.stringify(stored)).not.toContain(first);
    const looked = await request(server.address).post('/api/password-resets/look').send({ token: first }).expect(200);
    expect(looked.body.email).toBe(people.proctor.email);

    expect((await use(first, 'short')).body.errors[0]).toEqual({
      pointer: '/password',
      detail: 'At least 12 characters',
    });
    await use(first, 'another long passphrase').expect(200);
    for (const token of [first, second]) expect((await use(token, 'yet another passphrase')).status).toBe(409);
    expect((await phone.get('/api/me')).body.person).toBeNull();
    await until('the console to end', () => !desk.socket.connected);
    desk.close();
    const signIn = (chosen: string) =>
      request(server.address).post('/api/sign-in').send({ email: people.proctor.email, password: chosen });
    expect([(await signIn(password)).status, (await signIn('another long passphrase')).status]).toEqual([401, 200]);
    const told = await receiver.to(people.proctor.email, 'was changed');
    expect(told.text).toContain('/forgotten-password');
  });

  it('has a link that ends after an hour [P8]', async () => {
    await ask(people.manager.email).expect(200);
    const token = await tokenInMail(receiver, people.manager.email, 'new password');
    const [reset] = await server.deps.db.manager.findBy(PasswordReset, { userId: people.manager.id });
    const minutes = ((reset?.expiresAt.getTime() ?? 0) - Date.now()) / 60_000;
    expect(minutes).toBeGreaterThan(59);
    expect(minutes).toBeLessThanOrEqual(60);
    await server.deps.db.manager.update(PasswordReset, { userId: people.manager.id }, { expiresAt: new Date() });
    expect((await use(token, 'another long passphrase')).status).toBe(409);
  });

  it('is asked for at most five times an hour for one address [P13]', async () => {
    const statuses: number[] = [];
    for (let sent = 0; sent < 6; sent += 1) statuses.push((await ask(people.reviewer.email)).status);
    expect(statuses).toEqual([200, 200, 200, 200, 200, 429]);
  });
});

describe('one’s own sign-ins', () => {
  it('are listed with who tried, and end one by one or all others, consoles too [P9]', async () => {
    const study = await readyStudy(server, people);
    const { email } = people.proctor;
    const here = await signedIn(server, email);
    const there = request.agent(server.address).set('user-agent', 'Reading room browser');
    await there.post('/api/sign-in').send({ email, password }).expect(200);
    const desk = await Console.open(server.address, email, study.sessionId);
    await request(server.address).post('/api/sign-in').send({ email, password: 'wrong' }).expect(401);

    const { body } = await here.get('/api/account/places').expect(200);
    expect(body.places).toHaveLength(3);
    expect(body.places.filter((place: { here: boolean }) => place.here)).toHaveLength(1);
    const other = body.places.find((place: { browser: string }) => place.browser === 'Reading room browser');
    expect(other).toMatchObject({ here: false, address: '127.0.0.1' });
    const attempts = await here.get('/api/account/sign-in-attempts').expect(200);
    expect(attempts.body.rows.map((row: { succeeded: boolean }) => row.succeeded)).toEqual([false, true, true, true]);

    const stranger = await signedIn(server, people.manager.email);
    await stranger.delete(`/api/account/places/${other.id}`).send({}).expect(404);
    await here.delete(`/api/account/places/${other.id}`).send({}).expect(200);
    expect((await there.get('/api/me')).body.person).toBeNull();
    expect((await here.get('/api/me')).body.person.email).toBe(email);
    expect(desk.socket.connected).toBe(true);
    await here.post('/api/account/places/end-others').send({}).expect(200);
    await until('the console to end', () => !desk.socket.connected);
    desk.close();
    expect((await here.get('/api/account/places').expect(200)).body.places).toHaveLength(1);
  });

  it('stay ended when a request was under way [P9]', async () => {
    const here = await signedIn(server, people.manager.email);
    const there = await signedIn(server, people.manager.email);
    const base = `/api/organisations/${people.organisationId}`;
    const underWay = Array.from({ length: 10 }, () => there.get(`${base}/cables`));
    const ended = here.post('/api/account/places/end-others').send({});
    await Promise.all([...underWay, ended]);
    expect((await there.get('/api/me')).body.person).toBeNull();
    expect((await here.get('/api/account/places')).body.places).toHaveLength(1);
  });
});

describe('without the demo', () => {
  it('a link creates organisation and owner, once, and none is offered after it [P12]', async () => {
    const empty = await testServer();
    const token = await empty.server.firstOwner.offer();
    const draft = {
      token: token ?? '',
      organisation: 'Harbour Audio Works',
      name: 'Runa Falk',
      email: 'Runa@harbour.example',
      password: 'a very long passphrase',
    };
    const browser = request.agent(empty.address);
    const guessed = await browser.post('/api/first-owner').send({ ...draft, token: 'x'.repeat(43) });
    expect(guessed.status).toBe(409);
    const faulty = await browser.post('/api/first-owner').send({ ...draft, organisation: '', password: 'short' });
    expect(faulty.body.errors.map(({ pointer }: { pointer: string }) => pointer)).toEqual([
      '/organisation',
      '/password',
    ]);
    const both = await Promise.all([
      browser.post('/api/first-owner').send(draft),
      request(empty.address)
        .post('/api/first-owner')
        .send({ ...draft, email: 'other@harbour.example' }),
    ]);
    expect(both.map(({ status }) => status).sort()).toEqual([200, 409]);
    const made = both.find(({ status }) => status === 200);
    expect(made?.body.memberships).toMatchObject([{ organisation: 'Harbour Audio Works', role: 'owner' }]);
    expect(await empty.server.firstOwner.offer()).toBeNull();
    await empty.stop();
  });

  it('nobody signs in as one of its people, whatever an earlier start left behind [P12]', async () => {
    const [person] = demoPeople;
    if (person === undefined) throw new Error('the demo has nobody');
    const passwordHash = await hashPassword(person.password);
    const { email, name } = person;
    const id = crypto.randomUUID();
    await server.deps.db.manager.insert(User, { id, email, name, passwordHash, createdAt: new Date() });
    const reply = await request(server.address).post('/api/sign-in').send({ email, password: person.password });
    expect(reply.status).toBe(401);
  });
});

describe('guessing links', () => {
  it.each(['/api/invitations/look', '/api/password-resets/look', '/api/first-owner'])(
    'at %s soon comes to an end [P13]',
    async (path) => {
      const fresh = await testServer();
      const token = 'x'.repeat(43);
      const body =
        path === '/api/first-owner'
          ? {
              token,
              organisation: 'Harbour',
              name: 'Runa Falk',
              email: 'runa@harbour.example',
              password: 'x'.repeat(12),
            }
          : { token };
      const statuses = new Set<number>();
      for (let guess = 0; guess < 61; guess += 1)
        statuses.add((await request(fresh.address).post(path).send(body)).status);
      expect([...statuses]).toEqual([409, 429]);
      await fresh.stop();
    },
  );
});
