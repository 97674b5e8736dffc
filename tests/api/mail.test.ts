import { once } from 'node:events';
import { createServer } from 'node:net';
import request from 'supertest';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { readConfig } from '../../server/config.ts';
import { withTransaction } from '../../server/db/transaction.ts';
import type { MailContent } from '../../server/mail/mails.ts';
import { postMail } from '../../server/mail/outbox.ts';
import { OutgoingMail } from '../../server/mail/outgoing-mail.entity.ts';
import { forgetOldTexts, retryDelaysMs } from '../../server/mail/postman.ts';
import { serve } from '../../server/serve.ts';
import { type Agent, makeOrganisation, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { PostmansClock } from '../support/postmans-clock.ts';
import { SmtpReceiver, smtpEnvironment } from '../support/smtp-receiver.ts';
import { type TestServer, testServer } from '../support/test-server.ts';
import { untilAsked } from '../support/until.ts';

const content: MailContent = {
  subject: 'Study Plover: something happened',
  paragraphs: ['First <b>this</b> & that.', 'Then the other.'],
  action: { label: 'Look at it', url: 'http://fairlead.test:4180/look' },
  footer: 'You get this because it is a test.',
};

const secondMs = 1000;

async function unusedPort(): Promise<number> {
  const probe = createServer().listen(0, '127.0.0.1');
  await once(probe, 'listening');
  const address = probe.address();
  probe.close();
  await once(probe, 'close');
  if (address === null || typeof address === 'string') throw new Error('no port');
  return address.port;
}

describe('mail through an SMTP server', () => {
  let receiver: SmtpReceiver;
  let clock: PostmansClock;
  let server: TestServer;
  let people: TestOrganisation;
  let owner: Agent;
  let base: string;

  beforeEach(async () => {
    receiver = await SmtpReceiver.open();
    clock = new PostmansClock(Date.parse('2026-12-05T18:00:00.000Z'));
    server = await testServer({ clock, environment: smtpEnvironment(receiver) });
    people = await makeOrganisation(server, 'Harbour');
    owner = await signedIn(server, people.owner.email);
    base = `/api/organisations/${people.organisationId}`;
  });
  afterEach(async () => {
    await server.stop();
    await receiver.close();
  });

  const post = (organisationId: string | null = people.organisationId) =>
    withTransaction(server.deps.db, (tx) =>
      postMail(tx, server.deps, { organisationId, recipient: 'someone@harbour.example' }, content),
    );
  const stored = async (): Promise<OutgoingMail> => server.deps.db.manager.findOneByOrFail(OutgoingMail, {});
  const attempt = (count: number) =>
    untilAsked(`attempt ${count}`, async () => {
      const mail = await stored();
      const isOver = mail.lastError !== null || mail.state !== 'waiting';
      return mail.attempts === count && isOver ? mail : null;
    });

  it('comes as plain text and as HTML with the same words, and the HTML loads nothing [M6]', async () => {
    await post();
    await clock.pass(secondMs);
    const mail = await receiver.to('someone@harbour.example', 'something happened');
    expect(mail.from?.address).toBe('fairlead@fairlead.test');
    for (const words of [...content.paragraphs, content.footer, 'Look at it', 'http://fairlead.test:4180/look'])
      expect(mail.text).toContain(words);
    const shown = (mail.html ?? '')
      .replace(/<[^>]*>/g, ' ')
      .replaceAll('&lt;', '<')
      .replaceAll('&gt;', '>')
      .replaceAll('&amp;', '&');
    for (const words of [...content.paragraphs, content.footer]) expect(shown).toContain(words);
    expect(mail.html).not.toMatch(/<(img|link|script|iframe|style)\b|url\(/i);
  });

  it('is not sent when its act is undone [M1]', async () => {
    const undone = withTransaction(server.deps.db, async (tx) => {
      const to = { organisationId: people.organisationId, recipient: 'nobody@harbour.example' };
      await postMail(tx, server.deps, to, content);
      throw new Error('undone');
    });
    await expect(undone).rejects.toThrow('undone');
    await post();
    await clock.pass(secondMs);
    await receiver.to('someone@harbour.example', 'something happened');
    expect(receiver.mails).toHaveLength(1);
    expect(await server.deps.db.manager.count(OutgoingMail)).toBe(1);
  });

  it('is erased from the outbox once it is sent [M8]', async () => {
    await post();
    await clock.pass(secondMs);
    await receiver.to('someone@harbour.example', 'something happened');
    const sent = await untilAsked('the mail to be sent', async () => {
      const mail = await stored();
      return mail.state === 'sent' ? mail : null;
    });
    expect([sent.text, sent.html, sent.lastError]).toEqual(['', '', null]);
    expect(sent.sentAt?.getTime()).toBe(clock.now());
  });

  it('that was given up is erased from the outbox after a week [M8]', async () => {
    receiver.refusal = { code: 550, words: 'No such mailbox here' };
    await post();
    await clock.pass(secondMs);
    const { id } = await attempt(1);
    clock.advance(7 * 24 * 3600 * secondMs - 2 * secondMs);
    await forgetOldTexts(server.deps);
    expect((await stored()).text).not.toBe('');
    clock.advance(2 * secondMs);
    await forgetOldTexts(server.deps);
    expect((await stored()).text).toBe('');
    const refused = await owner.post(`${base}/mail/${id}/again`).send({});
    expect(refused.body.detail).toContain('erased');
  });

  it('is tried again after growing delays, keeps the last error, and is then given up [M2]', async () => {
    receiver.refusal = { code: 451, words: 'Come back later' };
    await post();
    await clock.pass(secondMs);
    let mail = await attempt(1);
    for (const [index, delayMs] of retryDelaysMs.entries()) {
      expect(mail.lastError).toContain('Come back later');
      expect(mail.state).toBe('waiting');
      expect(mail.nextAttemptAt.getTime()).toBe(clock.now() + delayMs);
      await server.deps.db.manager.update(OutgoingMail, { id: mail.id }, { lastError: null });
      await clock.pass(delayMs);
      mail = await attempt(index + 2);
    }
    expect([mail.state, mail.attempts]).toEqual(['failed', retryDelaysMs.length + 1]);
    expect(receiver.mails).toEqual([]);
  });

  it('is given up at once where the address is refused for good; the owner sees why and has it tried again [M2] [M4]', async () => {
    receiver.refusal = { code: 550, words: 'No such mailbox here' };
    await post();
    await post(null);
    await clock.pass(secondMs);
    const list = await untilAsked('the mail to be given up', async () => {
      const { body } = await owner.get(`${base}/mail?state=failed`).expect(200);
      return body.total > 0 ? body : null;
    });
    // The other mail is between Fairlead and a person.
    expect(list.total).toBe(1);
    expect(list.server).toBe(new URL(receiver.url).host);
    const [row] = list.rows;
    expect(row).toMatchObject({ recipient: 'someone@harbour.example', state: 'failed', attempts: 1, sentAt: null });
    expect(row.lastError).toContain('No such mailbox here');
    expect(JSON.stringify(list)).not.toContain('First');

    receiver.refusal = null;
    await owner.post(`${base}/mail/${row.id}/again`).send({}).expect(200);
    await clock.pass(secondMs);
    await receiver.to('someone@harbour.example', 'something happened');
    const refused = await owner.post(`${base}/mail/${row.id}/again`).send({});
    expect(refused.status).toBe(409);
  });

  it('has an owner search, filter and page through it, and nobody else [M4]', async () => {
    await post();
    const manager = await signedIn(server, people.manager.email);
    await manager.get(`${base}/mail`).expect(403);
    const found = await owner.get(`${base}/mail?q=someone`).expect(200);
    expect(found.body).toMatchObject({ total: 1, page: 1, pages: 1 });
    const none = await owner.get(`${base}/mail?q=nowhere`).expect(200);
    expect(none.body.total).toBe(0);
  });

  it('says nothing of a cable, and names a study by its neutral title alone [M5]', async () => {
    await readyStudy(server, people);
    await clock.pass(secondMs);
    const planned = await receiver.to(people.proctor.email, 'session 1');
    const codes = await receiver.to(people.codeHolder.email, 'blind codes');
    for (const mail of [planned, codes]) {
      expect(mail.subject).toMatch(/^Study Plover: /);
      const raw = JSON.stringify(mail);
      for (const word of ['Northern', 'Southern', 'N-1', 'S-1', 'loudspeaker', 'Player, amplifier'])
        expect(raw).not.toContain(word);
    }
  });
});

describe('mail and restarts', () => {
  it('that waited while the server was down goes out after the next start [M3]', async () => {
    const port = await unusedPort();
    const clock = new PostmansClock(Date.parse('2026-12-05T18:00:00.000Z'));
    const server = await testServer({ clock, environment: smtpEnvironment({ url: `smtp://127.0.0.1:${port}` }) });
    const { deps } = server;
    await withTransaction(deps.db, (tx) =>
      postMail(tx, deps, { organisationId: null, recipient: 'someone@harbour.example' }, content),
    );
    await clock.pass(secondMs);
    await untilAsked('a failed attempt', async () => {
      const { lastError } = await deps.db.manager.findOneByOrFail(OutgoingMail, {});
      return lastError !== null;
    });
    await server.server.stop();

    const receiver = await SmtpReceiver.open(port);
    const { id } = await deps.db.manager.findOneByOrFail(OutgoingMail, {});
    // As a server leaves it that was killed between taking a mail and hearing what became of it.
    const killedAt = { attempts: 1, lastError: null, nextAttemptAt: new Date(clock.now() + 120_000) };
    await deps.db.manager.update(OutgoingMail, { id }, killedAt);
    const again = await serve(deps);
    await clock.pass(119_000);
    await new Promise((resolve) => setTimeout(resolve, 200));
    expect(receiver.mails).toEqual([]);
    await clock.pass(2_000);
    const mail = await receiver.to('someone@harbour.example', 'something happened');
    expect(mail.messageId).toBe(`<${id}@fairlead.test>`);
    await again.stop();
    await receiver.close();
    await server.stop();
  });
});

describe('mail without an SMTP server', () => {
  let server: TestServer;
  let people: TestOrganisation;
  beforeAll(async () => {
    server = await testServer();
    people = await makeOrganisation(server, 'Harbour');
    await readyStudy(server, people);
  });
  afterAll(() => server.stop());

  it('can be read in the mailbox on this machine [M7]', async () => {
    const list = await request(server.address).get('/api/mailbox').expect(200);
    expect(list.body.total).toBe(2);
    const { id } = list.body.rows.find(({ recipient }: { recipient: string }) => recipient === people.proctor.email);
    const mail = await request(server.address).get(`/api/mailbox/${id}`).expect(200);
    expect(mail.body.text).toContain('Room B');
    expect(mail.body.html).toContain('Room B');
    const searched = await request(server.address).get(`/api/mailbox?q=${people.codeHolder.email}`).expect(200);
    expect(searched.body.total).toBe(1);
    await request(server.address).get(`/api/mailbox/${crypto.randomUUID()}`).expect(404);
  });

  it.each([
    ['a proxy', { 'x-forwarded-for': '192.0.2.7' }],
    ['a page whose name was pointed at this machine', { host: 'rebound.example' }],
  ])('cannot be read through %s [M7]', async (_who, headers) => {
    await request(server.address).get('/api/mailbox').set(headers).expect(404);
  });

  it('has no mailbox once a mail server is set [M7]', async () => {
    const receiver = await SmtpReceiver.open();
    const other = await testServer({ environment: smtpEnvironment(receiver) });
    await request(other.address).get('/api/mailbox').expect(404);
    await other.stop();
    await receiver.close();
  });

  it('is refused a mail server without a sender, in words that name the setting', () => {
    const read = () =>
      readConfig({
        SESSION_SECRET: 'x'.repeat(32),
        SIGNING_SECRET: 'x'.repeat(32),
        SMTP_URL: 'smtp://mail.example:587',
      });
    expect(read).toThrow(/MAIL_FROM: is needed with SMTP_URL/);
  });
});
