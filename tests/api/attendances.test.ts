import request from 'supertest';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { AttendanceRow } from '#shared/contracts/attendances.ts';
import { linkTokenOf } from '../../server/features/attendances/personal-link.ts';
import { OutgoingMail } from '../../server/mail/outgoing-mail.entity.ts';
import { serve } from '../../server/serve.ts';
import { calendarIn, readCalendar } from '../support/calendar.ts';
import { type Agent, makeOrganisation, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { PostmansClock } from '../support/postmans-clock.ts';
import { SmtpReceiver, smtpEnvironment } from '../support/smtp-receiver.ts';
import { type TestServer, testServer } from '../support/test-server.ts';
import { untilAsked } from '../support/until.ts';

const hourMs = 3_600_000;
const dayMs = 24 * hourMs;
const start = '2026-12-05T18:00:00.000Z';

describe('listeners who are invited to a session', () => {
  let receiver: SmtpReceiver;
  let clock: PostmansClock;
  let server: TestServer;
  let people: TestOrganisation;
  let manager: Agent;
  let study: Awaited<ReturnType<typeof readyStudy>>;
  let session: string;

  beforeEach(async () => {
    receiver = await SmtpReceiver.open();
    clock = new PostmansClock(Date.parse('2026-12-01T09:00:00.000Z'));
    server = await testServer({ clock, environment: smtpEnvironment(receiver) });
    people = await makeOrganisation(server, 'Harbour');
    study = await readyStudy(server, people, { listenersPerSession: 2 });
    manager = study.manager;
    session = `${study.base}/sessions/${study.sessionId}`;
    await manager.put(session).send({ plannedAt: start, timeZone: 'Europe/Paris', room: 'Room B' }).expect(200);
  });
  afterEach(async () => {
    await server.stop();
    await receiver.close();
  });

  const invite = (addresses: string) => manager.post(`${session}/attendances`).send({ addresses });
  const rows = async (): Promise<AttendanceRow[]> =>
    (await manager.get(`${session}/attendances`).expect(200)).body.rows;
  const states = async () => Object.fromEntries((await rows()).map(({ email, state }) => [email, state]));
  const idOf = async (email: string) => (await rows()).find((row) => row.email === email)?.id;
  /** The next mail to somebody about something, taken out of the receiver. */
  const mailTo = async (recipient: string, words: string) => {
    await clock.pass(1000);
    const mail = await receiver.to(recipient, words);
    receiver.mails.splice(receiver.mails.indexOf(mail), 1);
    return mail;
  };
  const tokenIn = ({ text }: { text?: string }) => /listen\/invitation#([\w-]{64})/.exec(text ?? '')?.[1] ?? '';
  const link = (what: string, body: object) => request(server.address).post(`/api/personal-link/${what}`).send(body);

  it('get a mail with a calendar file that another reader understands, in the session’s own time zone [G1]', async () => {
    await invite('ada@listeners.example').expect(200, { invited: 1, waiting: 0, already: 0 });
    const mail = await mailTo('ada@listeners.example', 'you are invited to listen');
    const file = calendarIn(mail);
    expect(file).toMatchObject({
      method: 'REQUEST',
      mimeMethod: 'REQUEST',
      version: '2.0',
      sequence: 0,
      status: 'CONFIRMED',
      summary: 'Study Plover: listening session',
      location: 'Room B',
      organizer: 'mailto:fairlead@fairlead.test',
      attendee: 'mailto:ada@listeners.example',
      zones: ['Europe/Paris'],
      start,
      uid: await idOf('ada@listeners.example'),
    });
    expect(file.text).toContain('DTSTART;TZID=Europe/Paris:20261205T190000');
    // RFC 5545, 3.8.7.2: in UTC.
    expect(file.text).toMatch(/^DTSTAMP:20261201T0900\d\dZ\r?$/m);
    expect(file.longestLine).toBeLessThanOrEqual(75);
    expect(Date.parse(file.end)).toBeGreaterThan(Date.parse(start));
    expect(mail.text).toContain('Saturday, 5 December 2026 at 19:00 (Europe/Paris)');
    const sent = await untilAsked('the mail to be sent', () =>
      server.deps.db.manager.findOneBy(OutgoingMail, { recipient: 'ada@listeners.example', state: 'sent' }),
    );
    expect([sent.text, sent.calendar]).toEqual(['', null]);
    const { body } = await link('calendar', { token: tokenIn(mail) }).expect(200);
    expect(body.content.replaceAll('\r\n', '')).not.toContain('\n');
    expect(readCalendar(body.content)).toMatchObject({ method: 'PUBLISH', uid: file.uid, start, attendee: '' });
  });

  it('get a file that names one zone, also where their manager’s browser names it by an older name, or UTC [G1]', async () => {
    for (const [timeZone, zones] of [
      ['Asia/Calcutta', ['Asia/Kolkata']],
      ['US/Eastern', ['America/New_York']],
      ['UTC', []],
    ] as const) {
      await manager.put(session).send({ plannedAt: start, timeZone, room: 'Room B' }).expect(200);
      const email = `${timeZone.toLowerCase().replace('/', '.')}@listeners.example`;
      await invite(email).expect(200);
      const { rows: invited } = (await manager.get(`${session}/attendances`)).body;
      const { id } = invited.find((row: AttendanceRow) => row.email === email);
      const token = linkTokenOf(server.deps.config, id);
      const { content } = (await link('calendar', { token }).expect(200)).body;
      expect(readCalendar(content)).toMatchObject({ zones, start });
    }
    const nowhere = await manager
      .put(session)
      .send({ plannedAt: start, timeZone: 'Mars/Olympus', room: 'B' })
      .expect(400);
    expect(nowhere.body.errors).toEqual([{ pointer: '/timeZone', detail: 'There is no such time zone' }]);
  });

  it('learn the neutral title and nothing of a cable, a maker or the organisation [G2]', async () => {
    await invite('ada@listeners.example').expect(200);
    const { text, html, subject, attachments } = await mailTo('ada@listeners.example', 'invited');
    const all = `${subject} ${text} ${html} ${calendarIn({ attachments } as never).text}`
      // The inviter's own name, which in these tests holds the organisation's; and the calendar's folded lines.
      .replaceAll('\r\n ', '')
      .replaceAll('manager of Harbour', '');
    for (const word of ['Northern run', 'Southern run', 'N-1', 'S-1', 'Harbour', 'cable'])
      expect(all).not.toContain(word);
    expect(all).toContain('Study Plover');
  });

  it('are told of another time or room with a higher sequence of the same entry, and asked again [G3]', async () => {
    await invite('ada@listeners.example').expect(200);
    const first = await mailTo('ada@listeners.example', 'invited');
    const token = tokenIn(first);
    await link('answer', { token, coming: true }).expect(200);
    const later = '2026-12-06T18:30:00.000Z';
    await manager.put(session).send({ plannedAt: later, timeZone: 'Europe/Paris', room: 'Room B' }).expect(200);
    const moved = await mailTo('ada@listeners.example', 'the session has moved');
    expect(calendarIn(moved)).toMatchObject({
      method: 'REQUEST',
      uid: calendarIn(first).uid,
      sequence: 1,
      start: later,
    });
    expect(tokenIn(moved)).toBe(token);
    expect(await states()).toEqual({ 'ada@listeners.example': 'invited' });
    await link('answer', { token, coming: true }).expect(200);
    await manager.put(session).send({ plannedAt: later, timeZone: 'Europe/Paris', room: 'Room C' }).expect(200);
    const other = await mailTo('ada@listeners.example', 'another room');
    expect(calendarIn(other)).toMatchObject({ sequence: 2, location: 'Room C', start: later });
    expect(await states()).toEqual({ 'ada@listeners.example': 'accepted' });
    await mailTo(people.proctor.email, 'session 1 is moved');
  });

  it('are told when it is cancelled, which the record keeps with its reason [G3]', async () => {
    await invite('ada@listeners.example, bo@listeners.example\ncy@listeners.example').expect(200);
    const first = await mailTo('ada@listeners.example', 'invited');
    await manager.post(`${session}/cancel`).send({ reason: 'The room is flooded.' }).expect(200);
    const cancelled = await mailTo('ada@listeners.example', 'the session is cancelled');
    expect(calendarIn(cancelled)).toMatchObject({
      method: 'CANCEL',
      mimeMethod: 'CANCEL',
      uid: calendarIn(first).uid,
      sequence: 1,
      status: 'CANCELLED',
      attendee: 'mailto:ada@listeners.example',
    });
    expect((await mailTo('cy@listeners.example', 'the session is cancelled')).attachments).toEqual([]);
    expect((await manager.get(session)).body.phase).toBe('abandoned');
    expect((await link('look', { token: tokenIn(first) })).body.phase).toBe('cancelled');
    await manager.post(`${session}/cancel`).send({ reason: 'Again.' }).expect(409);
    clock.advance(5 * dayMs);
    await clock.pass(1000);
    expect(receiver.mails.filter(({ subject }) => subject?.includes('a reminder'))).toEqual([]);
  });

  it('are invited by pasted addresses, each checked, and nobody when one is wrong [G4]', async () => {
    const bad = await invite('ada@listeners.example\nnobody\nBo <bo@listeners.example>, also wrong').expect(400);
    expect(bad.body.errors).toEqual([
      {
        pointer: '/addresses',
        detail: 'Line 2: “nobody” is no e-mail address. Line 3: “also wrong” is no e-mail address.',
      },
    ]);
    expect(await rows()).toEqual([]);
    await invite('Bo <bo@listeners.example>; BO@listeners.example\n\nada@listeners.example,').expect(200, {
      invited: 2,
      waiting: 0,
      already: 0,
    });
    await invite('bo@listeners.example').expect(200, { invited: 0, waiting: 0, already: 1 });
    const involved = await invite(`${people.codeHolder.email}\n${people.proctor.email}`).expect(400);
    expect(involved.body.errors[0].detail).toContain('holds the study’s codes');
    expect(involved.body.errors[0].detail).toContain('is the session’s proctor');
  });

  it('wait beyond the registered seats, and move up in order when somebody declines [G5]', async () => {
    await invite('ada@listeners.example\nbo@listeners.example\ncy@listeners.example\ndi@listeners.example').expect(
      200,
      {
        invited: 2,
        waiting: 2,
        already: 0,
      },
    );
    const ada = tokenIn(await mailTo('ada@listeners.example', 'invited'));
    const cy = await mailTo('cy@listeners.example', 'waiting list');
    expect(cy.attachments).toEqual([]);
    expect((await link('look', { token: tokenIn(cy) })).body).toMatchObject({ state: 'waiting', waitingPlace: 1 });
    await link('answer', { token: ada, coming: false }).expect(200);
    expect(calendarIn(await mailTo('ada@listeners.example', 'you do not come'))).toMatchObject({
      method: 'CANCEL',
      sequence: 1,
    });
    expect(calendarIn(await mailTo('cy@listeners.example', 'a seat is yours'))).toMatchObject({
      method: 'REQUEST',
      sequence: 0,
    });
    expect(await states()).toMatchObject({
      'ada@listeners.example': 'declined',
      'cy@listeners.example': 'invited',
      'di@listeners.example': 'waiting',
    });
    // A change of mind goes behind whoever waits already.
    const back = await link('answer', { token: ada, coming: true }).expect(200);
    expect(back.body).toMatchObject({ state: 'waiting', waitingPlace: 2 });
    await manager
      .delete(`${study.base}/attendances/${await idOf('bo@listeners.example')}`)
      .send({})
      .expect(200);
    await mailTo('bo@listeners.example', 'withdrawn');
    await mailTo('di@listeners.example', 'a seat is yours');
    expect((await link('look', { token: ada })).body).toMatchObject({ state: 'waiting', waitingPlace: 1 });
  });

  it('never get one seat twice, however many answer at once [G5]', async () => {
    await invite('ada@listeners.example\nbo@listeners.example\ncy@listeners.example\ndi@listeners.example').expect(200);
    const tokens = [];
    for (const name of ['ada', 'bo']) tokens.push(tokenIn(await mailTo(`${name}@listeners.example`, 'invited')));
    await Promise.all(tokens.map((token) => link('answer', { token, coming: false }).expect(200)));
    const { counts } = (await manager.get(`${session}/attendances`)).body;
    expect(counts).toEqual({ seats: 2, invited: 2, accepted: 0, waiting: 0, declined: 2 });
  });

  it('are reminded a day before, also by a server that was restarted meanwhile [G6] [M9]', async () => {
    await invite('ada@listeners.example\nbo@listeners.example\ncy@listeners.example').expect(200);
    const bo = tokenIn(await mailTo('bo@listeners.example', 'invited'));
    await mailTo('ada@listeners.example', 'invited');
    await link('answer', { token: bo, coming: false }).expect(200);
    await mailTo('cy@listeners.example', 'a seat is yours');
    await server.server.stop();
    clock.advance(Date.parse(start) - dayMs - 5_000 - clock.now());
    server = { ...server, server: await serve(server.deps) };
    await clock.pass(1000);
    expect(receiver.mails.filter(({ subject }) => subject?.includes('a reminder'))).toEqual([]);
    await clock.pass(5000);
    await receiver.to('ada@listeners.example', 'a reminder of your session');
    await receiver.to('cy@listeners.example', 'a reminder of your session');
    await clock.pass(1000);
    const reminded = receiver.mails.filter(({ subject }) => subject?.includes('a reminder'));
    expect(reminded.map(({ to }) => to?.[0]?.address).sort()).toEqual([
      'ada@listeners.example',
      'cy@listeners.example',
    ]);
  });

  it('are reminded by the new time alone when the session moves [G6] [M9]', async () => {
    await invite('ada@listeners.example').expect(200);
    await mailTo('ada@listeners.example', 'invited');
    const later = new Date(Date.parse(start) + 3 * dayMs).toISOString();
    await manager.put(session).send({ plannedAt: later, timeZone: 'Europe/Paris', room: 'Room B' }).expect(200);
    await mailTo('ada@listeners.example', 'has moved');
    clock.advance(Date.parse(start) - clock.now());
    await clock.pass(1000);
    expect(receiver.mails.filter(({ subject }) => subject?.includes('a reminder'))).toEqual([]);
    clock.advance(2 * dayMs);
    await clock.pass(1000);
    expect((await receiver.to('ada@listeners.example', 'a reminder of your session')).text).toContain('8 December');
  });

  it('have their address erased when they or a manager ask, and every link of it ends [G9]', async () => {
    await invite('ada@listeners.example\nbo@listeners.example\ncy@listeners.example').expect(200);
    const ada = tokenIn(await mailTo('ada@listeners.example', 'invited'));
    await link('erase', { token: ada }).expect(200, { ok: true });
    await link('look', { token: ada }).expect(404);
    await mailTo('cy@listeners.example', 'a seat is yours');
    await manager
      .post(`${study.base}/attendances/${await idOf('bo@listeners.example')}/erase`)
      .send({})
      .expect(200);
    expect((await rows()).map(({ email }) => email)).toEqual([null, null, 'cy@listeners.example']);
    const owner = await signedIn(server, people.owner.email);
    const mails = (await owner.get(`${study.base}/mail`)).body.rows.map(
      ({ recipient }: { recipient: string }) => recipient,
    );
    expect(mails).not.toContain('ada@listeners.example');
    expect(mails).not.toContain('bo@listeners.example');
    clock.advance(Date.parse(start) - clock.now());
    await clock.pass(1000);
    await receiver.to('cy@listeners.example', 'a reminder');
    expect(receiver.mails.filter(({ subject }) => subject?.includes('a reminder'))).toHaveLength(1);
  });

  it('are known to the session’s own proctor and to managers, and to no other member [G8]', async () => {
    await invite('ada@listeners.example').expect(200);
    const proctor = await signedIn(server, people.proctor.email);
    expect((await proctor.get(`${session}/attendances`).expect(200)).body.rows[0]).not.toHaveProperty('label');
    await proctor.post(`${session}/attendances`).send({ addresses: 'bo@listeners.example' }).expect(403);
    const reviewer = await signedIn(server, people.reviewer.email);
    await reviewer.get(`${session}/attendances`).expect(403);
  });

  it('cannot be guessed, and may change their minds twelve times in ten minutes [G10]', async () => {
    await link('look', { token: 'x'.repeat(64) }).expect(404);
    await link('look', { token: 'short' }).expect(400);
    await invite('ada@listeners.example').expect(200);
    const token = tokenIn(await mailTo('ada@listeners.example', 'invited'));
    for (let count = 0; count < 12; count += 1) await link('answer', { token, coming: true }).expect(200);
    await link('answer', { token, coming: false }).expect(429);
  });
});
