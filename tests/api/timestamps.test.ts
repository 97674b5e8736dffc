import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { statementBytes } from '#shared/ledger/signed-head.ts';
import { readTimestampReply } from '#shared/ledger/timestamp-token.ts';
import { readConfig } from '../../server/config.ts';
import { signatureOf } from '../../server/ledger/head-signatures.ts';
import { httpAuthority, type TimestampAuthority } from '../../server/timestamps/authority.ts';
import { localAuthority } from '../../server/timestamps/local-authority.ts';
import { tokenDelaysMs } from '../../server/timestamps/timekeeper.ts';
import { timestampAuthority } from '../../server/timestamps/timestamp-authority.ts';
import { TimestampToken } from '../../server/timestamps/timestamp-token.entity.ts';
import { TokenRequest } from '../../server/timestamps/token-request.entity.ts';
import { makeOrganisation, readyStudy } from '../support/people.ts';
import { PostmansClock } from '../support/postmans-clock.ts';
import { type TestServer, testServer } from '../support/test-server.ts';
import { TimeAuthority, type TimeFault } from '../support/time-authority.ts';
import { untilAsked } from '../support/until.ts';

const secondMs = 1000;

/** A server with a sealed study, whose timekeeper waits for its clock to be moved. */
async function sealed(timestamps: TimestampAuthority) {
  const clock = new PostmansClock(Date.now());
  const server = await testServer({ clock, timestamps });
  const people = await makeOrganisation(server, 'Harbour');
  const ready = await readyStudy(server, people);
  const { manager } = server.deps.db;
  const ofStudy = (studyId: string) => ({
    server,
    clock,
    studyId,
    manager,
    attempted: (attempts: number) =>
      untilAsked('an attempt', async () => {
        const request = await manager.findOneBy(TokenRequest, { studyId });
        return request?.attempts === attempts && request.lastError !== null ? request : null;
      }),
    token: () => untilAsked('a token', () => manager.findOneBy(TimestampToken, { studyId, sequence: 1 })),
    /** The same with another study, just sealed. */
    another: async () => {
      const { draft } = (await ready.manager.get(ready.at).expect(200)).body;
      const { id } = (await ready.manager.post(`${ready.base}/studies`).send(draft).expect(200)).body;
      await ready.manager.post(`${ready.base}/studies/${id}/seal`).send({}).expect(200);
      return ofStudy(id);
    },
  });
  return ofStudy(ready.studyId);
}
type Sealed = Awaited<ReturnType<typeof sealed>>;

/** Confirms a stored token with openssl and nothing of this program. */
async function opensslSays(server: TestServer, token: TimestampToken, ...more: string[]): Promise<string> {
  const folder = mkdtempSync(join(tmpdir(), 'fairlead-token-'));
  const signature = await signatureOf(server.deps.db.manager, token.studyId, token.sequence);
  writeFileSync(join(folder, 'head.json'), statementBytes(signature));
  writeFileSync(join(folder, 'token.tsr'), token.reply);
  writeFileSync(join(folder, 'certificates.pem'), token.certificates);
  const args = [
    'ts',
    '-verify',
    '-data',
    'head.json',
    '-in',
    'token.tsr',
    '-CAfile',
    'certificates.pem',
    '-partial_chain',
  ];
  try {
    return execFileSync('openssl', [...args, ...more], { cwd: folder, stdio: 'pipe' }).toString();
  } catch (error) {
    return String((error as { stderr: Buffer }).stderr);
  } finally {
    rmSync(folder, { recursive: true });
  }
}

describe('the token of a signed head', () => {
  let authority: TimeAuthority;
  let first: Sealed;
  let made: Sealed;
  beforeAll(async () => {
    authority = await TimeAuthority.open();
    first = await sealed(httpAuthority(authority.url, null));
    await first.clock.pass(secondMs);
    await first.token();
  });
  beforeEach(async () => {
    authority.fault = null;
    made = await first.another();
  });
  afterAll(async () => {
    await first.server.stop();
    await authority.close();
  });

  it('is fetched after the commit, kept with its certificates, and confirmed by openssl alone [X1] [X2]', async () => {
    expect(await made.manager.countBy(TimestampToken, { studyId: made.studyId })).toBe(0);
    expect(await made.manager.countBy(TokenRequest, { studyId: made.studyId })).toBe(1);
    await made.clock.pass(secondMs);
    const token = await made.token();
    expect(await made.manager.countBy(TokenRequest, { studyId: made.studyId })).toBe(0);
    expect(token).toMatchObject({ isLocal: false, authority: `127.0.0.1:${authority.port}`, attempts: 1 });
    const signature = await signatureOf(made.manager, made.studyId, 1);
    expect(token.gapMs).toBe(Date.parse(token.time) - Date.parse(signature.at));
    expect(Math.abs(token.gapMs)).toBeLessThan(60_000);
    expect(await opensslSays(made.server, token)).toContain('Verification: OK');
    const read = readTimestampReply(token.reply).token;
    expect(read?.time).toBe(token.time);
    expect(read?.policy).toBe('2.25.1');
    expect(read?.certificates).toHaveLength(2);
  });

  it.each<[TimeFault, string]>([
    ['error page', 'answered with 503'],
    ['garbage', 'cannot be read'],
    ['cut short', 'cannot be read'],
    ['wrong imprint', 'for something else'],
    ['wrong nonce', 'does not carry the number'],
    ['forged signature', 'signature does not hold'],
    ['refused', 'the authority refused (status 2): No.'],
    ['no certificate', 'without the certificate'],
    ['endless', 'larger than a reply'],
  ])('is not taken from a service with %s; a good one comes with the next attempt [X3]', async (fault, why) => {
    authority.fault = fault;
    await made.clock.pass(secondMs);
    const request = await made.attempted(1);
    expect(request.lastError).toContain(why);
    expect(await made.manager.countBy(TimestampToken, { studyId: made.studyId })).toBe(0);
    authority.fault = null;
    await made.clock.pass(tokenDelaysMs[0]);
    const token = await made.token();
    expect(token.attempts).toBe(2);
    expect(await opensslSays(made.server, token)).toContain('Verification: OK');
  });

  it('is fetched later where the service is down, after growing waits without an end, and delays nothing [X4]', async () => {
    const { port } = authority;
    await authority.down();
    await made.clock.pass(secondMs);
    let request = await made.attempted(1);
    expect(request.lastError).toContain('ECONNREFUSED');
    for (const [index, delayMs] of [...tokenDelaysMs, tokenDelaysMs.at(-1) ?? 0].entries()) {
      expect(request.nextAttemptAt.getTime()).toBe(made.clock.now() + delayMs);
      await made.manager.update(TokenRequest, { studyId: made.studyId }, { lastError: null });
      await made.clock.pass(delayMs);
      request = await made.attempted(index + 2);
    }
    await authority.listen(port);
    await made.clock.pass(tokenDelaysMs.at(-1) ?? 0);
    expect((await made.token()).attempts).toBe(tokenDelaysMs.length + 3);
  });

  it('is fetched after the next start where the server was killed in an attempt [X4]', async () => {
    const lease = { attempts: 1, nextAttemptAt: new Date(made.clock.now() + 120 * secondMs) };
    await made.manager.update(TokenRequest, { studyId: made.studyId }, lease);
    await made.clock.pass(119 * secondMs);
    await new Promise((resolve) => setTimeout(resolve, 200));
    expect(await made.manager.countBy(TimestampToken, { studyId: made.studyId })).toBe(0);
    await made.clock.pass(2 * secondMs);
    expect((await made.token()).attempts).toBe(2);
  });
});

describe('a token and its certificate', () => {
  it('is confirmed after the certificate has expired [X2]', async () => {
    const authority = await TimeAuthority.open(6 * secondMs);
    const made = await sealed(httpAuthority(authority.url, null));
    await made.clock.pass(secondMs);
    const token = await made.token();
    const expired = await untilAsked(
      'the certificate to expire',
      async () => {
        const said = await opensslSays(made.server, token);
        return said.includes('certificate has expired') ? said : null;
      },
      15_000,
    );
    expect(expired).not.toContain('Verification: OK');
    const at = String(Math.floor(Date.parse(token.time) / 1000));
    expect(await opensslSays(made.server, token, '-attime', at)).toContain('Verification: OK');
    await made.server.stop();
    await authority.close();
  });

  it('is taken only from an authority that is trusted, where the settings name certificates [X3]', async () => {
    const authority = await TimeAuthority.open();
    const other = await TimeAuthority.open();
    const made = await sealed(httpAuthority(authority.url, other.root));
    await made.clock.pass(secondMs);
    expect((await made.attempted(1)).lastError).toContain('signature does not hold');
    await made.server.stop();
    const trusting = await sealed(httpAuthority(authority.url, authority.root));
    await trusting.clock.pass(secondMs);
    expect(await opensslSays(trusting.server, await trusting.token())).toContain('Verification: OK');
    await trusting.server.stop();
    await authority.close();
    await other.close();
  });
});

describe('the local authority', () => {
  it('stands in where none is set, keeps its certificate, and its tokens say that it is local [X5]', async () => {
    const folder = mkdtempSync(join(tmpdir(), 'fairlead-data-'));
    const config = readConfig({
      SESSION_SECRET: 'x'.repeat(32),
      SIGNING_SECRET: 'x'.repeat(32),
      DATA_DIR: folder,
    });
    const [first, second] = await Promise.all([timestampAuthority(config), timestampAuthority(config)]);
    expect([first.isLocal, first.name]).toEqual([true, 'local authority']);
    expect(second.trusted).toBe(first.trusted);
    const again = await localAuthority(folder);
    expect(again.trusted).toBe(first.trusted);
    const made = await sealed(again);
    await made.clock.pass(secondMs);
    const token = await made.token();
    expect(token).toMatchObject({ isLocal: true, authority: 'local authority' });
    expect(await opensslSays(made.server, token)).toContain('Verification: OK');
    const subject = execFileSync('openssl', ['x509', '-noout', '-subject'], { input: token.certificates }).toString();
    expect(subject).toContain('proves nothing about time');
    await made.server.stop();
    rmSync(folder, { recursive: true });
  });

  it('stamps many at once, each with a number of its own [X5]', async () => {
    const folder = mkdtempSync(join(tmpdir(), 'fairlead-data-'));
    const authority = await localAuthority(folder);
    const { timestampRequest } = await import('#shared/ledger/timestamp-token.ts');
    const replies = await Promise.all(
      Array.from({ length: 8 }, (_, index) => authority.ask(timestampRequest('a'.repeat(64), `f${index}`))),
    );
    const tokens = replies.map((reply) => readTimestampReply(reply).token);
    expect(new Set(tokens.map((token) => token?.serial)).size).toBe(8);
    expect(tokens.map((token) => token?.nonce)).toEqual(Array.from({ length: 8 }, (_, index) => `f${index}`));
    rmSync(folder, { recursive: true });
  });

  it('gives way to the authority that the settings name [X5]', async () => {
    const named = readConfig({
      SESSION_SECRET: 'x'.repeat(32),
      SIGNING_SECRET: 'x'.repeat(32),
      TSA_URL: 'https://time.example/tsr',
    });
    expect(await timestampAuthority(named)).toMatchObject({ isLocal: false, name: 'time.example', trusted: null });
    const wrong = () => readConfig({ SESSION_SECRET: 'x'.repeat(32), SIGNING_SECRET: 'x'.repeat(32), TSA_URL: 'time' });
    expect(wrong).toThrow(/TSA_URL: needs an address/);
  });
});
