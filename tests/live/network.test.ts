import { mkdtemp, rm, stat } from 'node:fs/promises';
import { request as httpsRequest } from 'node:https';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { io } from 'socket.io-client';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { isFromThisMachine } from '../../server/http/this-machine.ts';
import { type OwnCertificate, ownCertificate } from '../../server/network/own-certificate.ts';
import { makeOrganisation, password, readyStudy, type TestOrganisation } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';
import { until } from '../support/until.ts';

const dayMs = 24 * 60 * 60 * 1000;
let folder: string;
let certificate: OwnCertificate;

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fairlead-tls-'));
  certificate = await ownCertificate(folder, ['192.0.2.20'], Date.now());
});
afterAll(() => rm(folder, { recursive: true }));

describe('the certificate of this machine', () => {
  it('is kept while it names the addresses and lasts [N4]', async () => {
    expect((await ownCertificate(folder, ['192.0.2.20'], Date.now())).fingerprint).toBe(certificate.fingerprint);
    expect((await stat(join(folder, 'key.pem'))).mode & 0o777).toBe(0o600);
  });

  it('is made again for a new address, and when less than 30 days are left [N4]', async () => {
    const elsewhere = await mkdtemp(join(tmpdir(), 'fairlead-tls-'));
    const first = await ownCertificate(elsewhere, ['192.0.2.20'], Date.now());
    const second = await ownCertificate(elsewhere, ['192.0.2.20', '198.51.100.4'], Date.now());
    expect(second.fingerprint).not.toBe(first.fingerprint);
    const late = await ownCertificate(elsewhere, ['192.0.2.20'], Date.now() + 368 * dayMs);
    expect(late.fingerprint).not.toBe(second.fingerprint);
    await rm(elsewhere, { recursive: true });
  });
});

describe('a server on the local network', () => {
  let server: TestServer;
  let people: TestOrganisation;

  beforeAll(async () => {
    server = await testServer({ certificate });
    people = await makeOrganisation(server, 'Harbour');
  });
  afterAll(() => server.stop());

  const secureAddress = () => `https://127.0.0.1:${server.server.tlsPort}`;

  /** Signs in under TLS, trusting this machine's certificate and no other. */
  function signInUnderTls(email: string): Promise<string> {
    return new Promise((resolve, reject) => {
      const headers = { 'content-type': 'application/json' };
      const asked = httpsRequest(`${secureAddress()}/api/sign-in`, { method: 'POST', ca: certificate.cert, headers });
      asked.on('response', (reply) => {
        reply.resume();
        resolve(String(reply.headers['set-cookie']?.[0]));
      });
      asked.on('error', reject);
      asked.end(JSON.stringify({ email, password }));
    });
  }

  it('marks the cookie secure under TLS, under another name than the plain one [N1] [N3]', async () => {
    const secure = await signInUnderTls(people.manager.email);
    expect(secure).toMatch(/^__Host-fairlead=/);
    expect(secure).toContain('Secure');
    const reply = await request(server.address)
      .post('/api/sign-in')
      .set('cookie', secure.split(';')[0] ?? '')
      .send({ email: people.manager.email, password })
      .expect(200);
    expect(reply.headers['set-cookie']?.[0]).toMatch(/^fairlead=/);
    expect(reply.headers['set-cookie']?.[0]).not.toContain('Secure');
  });

  it('serves the live console under TLS [N1]', async () => {
    const { sessionId } = await readyStudy(server, people);
    const cookie = (await signInUnderTls(people.proctor.email)).split(';')[0] ?? '';
    const socket = io(secureAddress(), {
      auth: { audience: 'proctor', sessionId },
      extraHeaders: { cookie },
      transports: ['websocket'],
      ca: certificate.cert.toString(),
    });
    let seen: ProctorView | null = null;
    socket.on('view', (view: ProctorView) => {
      seen = view;
    });
    const view = await until('a view', () => seen);
    expect(view).toMatchObject({ audience: 'proctor', phase: 'planned' });
    socket.close();
  });

  it('takes a request as its own machine only over loopback, or from an address to itself [N2]', () => {
    const from = (remoteAddress: string, localAddress: string, headers = {}) =>
      isFromThisMachine({ socket: { remoteAddress, localAddress }, headers } as Parameters<
        typeof isFromThisMachine
      >[0]);
    expect(from('127.0.0.1', '127.0.0.1')).toBe(true);
    expect(from('192.0.2.2', '192.0.2.2')).toBe(true);
    expect(from('192.0.2.7', '192.0.2.2')).toBe(false);
    expect(from('127.0.0.1', '127.0.0.1', { 'x-forwarded-for': '192.0.2.7' })).toBe(false);
  });
});
