import request from 'supertest';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { Invitation } from '../../server/features/invitations/invitation.entity.ts';
import { tokenInMail } from '../support/links.ts';
import { Console, Phone } from '../support/live.ts';
import {
  type Agent,
  makeOrganisation,
  password,
  readyStudy,
  signedIn,
  type TestOrganisation,
} from '../support/people.ts';
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
let owner: Agent;
let base: string;
beforeEach(async () => {
  count += 1;
  people = await makeOrganisation(server, `Harbour${count}`);
  owner = await signedIn(server, people.owner.email);
  base = `/api/organisations/${people.organisationId}`;
});

const stranger = () => request.agent(server.address);
const newcomer = () => `newcomer@harbour${count}.example`;

async function invited(email: string, role = 'proctor'): Promise<{ id: string; token: string }> {
  const { body } = await owner.post(`${base}/invitations`).send({ email, role }).expect(200);
  return { id: body.id, token: await tokenInMail(receiver, email.toLowerCase(), 'invites you') };
}

describe('an invitation', () => {
  it('makes an account with name and password, once, and its token is stored as a digest [P1] [P2]', async () => {
    const { id, token } = await invited(`NewComer@harbour${count}.example`);
    const stored = await server.deps.db.manager.findOneByOrFail(Invitation, { id });
    expect(JSON.stringify(stored)).not.toContain(token);

    const browser = stranger();
    const offer = await browser.post('/api/invitations/look').send({ token }).expect(200);
    expect(offer.body).toMatchObject({ organisation: `Harbour${count}`, role: 'proctor', hasAccount: false });
    const answer = { token, name: 'Runa Falk', password: 'a very long passphrase' };
    const short = await browser.post('/api/invitations/accept').send({ ...answer, password: 'short' });
    expect(short.body.errors).toEqual([{ pointer: '/password', detail: 'At least 12 characters' }]);
    await browser.post('/api/invitations/accept').send(answer).expect(200);
    const me = await browser.get('/api/me').expect(200);
    expect(me.body.person).toMatchObject({
      name: 'Runa Falk',
      email: newcomer(),
      memberships: [{ organisationId: people.organisationId, role: 'proctor' }],
    });

    for (const path of ['look', 'accept', 'join']) {
      const again = await browser.post(`/api/invitations/${path}`).send(path === 'accept' ? answer : { token });
      expect([path, again.status]).toEqual([path, 409]);
    }
    const open = await owner.get(`${base}/invitations`).expect(200);
    expect(open.body.total).toBe(0);
  });

  it('used twice at once makes one account [P1]', async () => {
    const { token } = await invited(newcomer());
    const accept = () =>
      stranger().post('/api/invitations/accept').send({ token, name: 'Runa Falk', password: 'a very long passphrase' });
    const replies = await Promise.all([accept(), accept(), accept()]);
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409, 409]);
  });

  it('to an address with an account is accepted by signing in with it, and by no other account [P2] [P11]', async () => {
    const other = await makeOrganisation(server, `Quay${count}`);
    const { token } = await invited(other.manager.email, 'reviewer');
    const offer = await stranger().post('/api/invitations/look').send({ token }).expect(200);
    expect(offer.body.hasAccount).toBe(true);
    const taken = await stranger()
      .post('/api/invitations/accept')
      .send({ token, name: 'Somebody else', password: 'a very long passphrase' });
    expect([taken.status, taken.body.type]).toEqual([409, 'urn:fairlead:problem:already-taken']);

    const wrong = await signedIn(server, other.proctor.email);
    const refused = await wrong.post('/api/invitations/join').send({ token });
    expect([refused.status, refused.body.detail]).toEqual([
      403,
      `This invitation is for ${other.manager.email}. Sign in with that address.`,
    ]);
    const right = await signedIn(server, other.manager.email);
    await right.post('/api/invitations/join').send({ token }).expect(200);
    const { body } = await right.get('/api/me').expect(200);
    const roleIn = Object.fromEntries(
      body.person.memberships.map((m: { organisationId: string; role: string }) => [m.organisationId, m.role]),
    );
    expect(roleIn).toEqual({ [other.organisationId]: 'manager', [people.organisationId]: 'reviewer' });
    await right.get(`/api/organisations/${other.organisationId}/cables`).expect(200);
    await right.get(`${base}/cables`).expect(403);
  });

  it('ends when it is sent anew, replaced, withdrawn or a week old [P1]', async () => {
    const look = async (token: string) => (await stranger().post('/api/invitations/look').send({ token })).status;
    const first = await invited(newcomer());
    await owner.post(`${base}/invitations/${first.id}/again`).send({}).expect(200);
    const second = await tokenInMail(receiver, newcomer(), 'invites you');
    expect([await look(first.token), await look(second)]).toEqual([409, 200]);
    const third = await invited(newcomer(), 'manager');
    expect([await look(second), await look(third.token)]).toEqual([409, 200]);
    await server.deps.db.manager.update(Invitation, { id: third.id }, { expiresAt: new Date(Date.now() - 1) });
    expect(await look(third.token)).toBe(409);
    const list = await owner.get(`${base}/invitations?q=newcomer`).expect(200);
    expect(list.body.rows).toMatchObject([{ id: third.id, expired: true, role: 'manager' }]);
    const fourth = await invited(newcomer());
    const days =
      (Date.parse((await owner.get(`${base}/invitations`)).body.rows[0].expiresAt) - Date.now()) / 86_400_000;
    expect(days).toBeGreaterThan(6.99);
    expect(days).toBeLessThanOrEqual(7);
    await owner.delete(`${base}/invitations/${fourth.id}`).send({}).expect(200);
    expect(await look(fourth.token)).toBe(409);
  });

  it('is not sent to somebody who is a member already', async () => {
    const reply = await owner.post(`${base}/invitations`).send({ email: people.manager.email, role: 'proctor' });
    expect(reply.status).toBe(400);
    expect(reply.body.errors[0].pointer).toBe('/email');
  });
});

describe('members', () => {
  it('are searched, filtered, sorted and paged on the server [P10]', async () => {
    const names = async (query: string) => {
      const { body } = await owner.get(`${base}/people?${query}`).expect(200);
      return body.rows.map(({ name }: { name: string }) => name.split(' ')[0]);
    };
    expect(await names('')).toEqual(['codes', 'manager', 'owner', 'proctor', 'reviewer']);
    expect(await names('sort=-name')).toEqual(['reviewer', 'proctor', 'owner', 'manager', 'codes']);
    const byRole = await names('sort=role');
    expect([byRole[0], byRole[1], byRole[2]]).toEqual(['manager', 'owner', 'proctor']);
    expect(await names('role=reviewer')).toEqual(['codes', 'reviewer']);
    expect(await names('q=manager%40')).toEqual(['manager']);
    const { body } = await owner.get(`${base}/people?page=9`).expect(200);
    expect(body).toMatchObject({ total: 5, page: 1, pages: 1 });
  });

  it('lose their access at once when removed, their console too, and keep their name on what they did [P4] [P5]', async () => {
    const study = await readyStudy(server, people);
    const desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    const proctor = await signedIn(server, people.proctor.email);
    await proctor.get(`${base}/sessions/${study.sessionId}`).expect(200);
    const before = await owner.get(`${base}/people?role=proctor`).expect(200);
    expect(before.body.rows).toMatchObject([{ id: people.proctor.id, sessionsToRun: 1, codesHeld: 0 }]);

    let closed: unknown = null;
    desk.socket.on('closed', (problem: unknown) => {
      closed = problem;
    });
    await owner.delete(`${base}/people/${people.proctor.id}`).send({}).expect(200);
    await proctor.get(`${base}/sessions/${study.sessionId}`).expect(404);
    await until('the console to end', () => closed !== null && !desk.socket.connected);
    await expect(desk.send({ kind: 'open-seating', expectVersion: 0 })).rejects.toThrow();
    desk.close();
    const again = new Console(
      server.address,
      { audience: 'proctor', sessionId: study.sessionId },
      String(
        (await proctor.post('/api/sign-in').send({ email: people.proctor.email, password })).headers['set-cookie'],
      ).split(';')[0],
    );
    let refused: { data?: { status: number } } | null = null;
    again.socket.on('connect_error', (error) => {
      refused = error as { data?: { status: number } };
    });
    await until('the refusal', () => refused !== null);
    expect(refused).toMatchObject({ data: { status: 404 } });
    again.close();

    const session = await owner.get(`${base}/sessions/${study.sessionId}`).expect(200);
    expect(session.body.proctor).toBe(`proctor of Harbour${count}`);
    const mail = await receiver.to(people.proctor.email, 'no longer a member');
    expect(mail.text).toContain('stays on its records');
  });

  it('who are given a role that runs no sessions lose their console [P4]', async () => {
    const study = await readyStudy(server, people);
    const desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    await owner.put(`${base}/people/${people.proctor.id}/role`).send({ role: 'manager' }).expect(200);
    expect(desk.socket.connected).toBe(true);
    await owner.put(`${base}/people/${people.proctor.id}/role`).send({ role: 'reviewer' }).expect(200);
    await until('the console to end', () => !desk.socket.connected);
    desk.close();
  });

  it('include an owner always: the last one is neither removed nor given another role [P3]', async () => {
    const me = `${base}/people/${people.owner.id}`;
    const demoted = await owner.put(`${me}/role`).send({ role: 'manager' });
    expect([demoted.status, demoted.body.detail]).toEqual([
      409,
      `owner of Harbour${count} is the only owner. Make somebody else an owner first.`,
    ]);
    expect((await owner.delete(me).send({})).status).toBe(409);

    await owner.put(`${base}/people/${people.manager.id}/role`).send({ role: 'owner' }).expect(200);
    const second = await signedIn(server, people.manager.email);
    const both = await Promise.all([
      owner.delete(`${base}/people/${people.manager.id}`).send({}),
      second.delete(me).send({}),
    ]);
    expect(both.filter(({ status }) => status === 200)).toHaveLength(1);
    const survivor = both[0].status === 200 ? owner : second;
    const left = await survivor.get(`${base}/people?role=owner`).expect(200);
    expect(left.body.total).toBe(1);
  });

  it('who once managed count as having seen the cables when a study is closed [P6]', async () => {
    const study = await readyStudy(server, people);
    await owner.put(`${base}/people/${people.reviewer.id}/role`).send({ role: 'manager' }).expect(200);
    await owner.put(`${base}/people/${people.reviewer.id}/role`).send({ role: 'proctor' }).expect(200);
    await owner.put(`${base}/people/${people.codeHolder.id}/role`).send({ role: 'owner' }).expect(200);
    await owner.delete(`${base}/people/${people.codeHolder.id}`).send({}).expect(200);
    const desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    const phone = await Phone.join(server.address, await desk.openSeating(), 'Sofa');
    await desk.act({ kind: 'abandon', reason: 'Ended for this test' });
    for (const page of [desk, phone]) page.close();
    await study.manager.post(`${study.at}/close`).send({ reason: 'Ended for this test' }).expect(200);
    const [entry] = await server.deps.db.query(
      "select payload from record_entries where study_id = ? and kind = 'study-closed'",
      [study.studyId],
    );
    const { owners, managers } = JSON.parse(entry.payload);
    expect(managers.sort()).toEqual([people.manager.id, people.reviewer.id].sort());
    expect(owners.sort()).toEqual([people.owner.id, people.codeHolder.id].sort());
  });
});
