import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { confirmationIds } from '#shared/contracts/publications.ts';
import { gapWords, localTimeWords, type SignedHead, type TimeState } from '#shared/contracts/signed-heads.ts';
import { type HeadProofs, headProofs, headProofsFault } from '#shared/ledger/head-proofs.ts';
import { readableFingerprint } from '#shared/ledger/readable-fingerprint.ts';
import { withTransaction } from '../../server/db/transaction.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { readRecord } from '../../server/ledger/ledger.ts';
import { localAuthority } from '../../server/timestamps/local-authority.ts';
import { makeOrganisation, signedIn, type TestOrganisation } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';
import { untilAsked } from '../support/until.ts';
import { wholeStudy } from '../support/whole-study.ts';

type Head = HeadProofs['heads'][number];
const bend = (proofs: HeadProofs, place: number, change: Partial<Head>): HeadProofs => ({
  ...proofs,
  heads: proofs.heads.map((head, index) => (index === place ? { ...head, ...change } : head)),
});
const tokenWith = (proofs: HeadProofs, change: Partial<NonNullable<Head['token']>>): Head['token'] => {
  const token = proofs.heads[0]?.token ?? null;
  return token === null ? null : { ...token, ...change };
};

describe('where signatures and times show', () => {
  // A moment ago, so that the token's real time lies after the signature's.
  const clock = new HandClock(Date.now() - 3 * 3_600_000);
  const folder = mkdtempSync(join(tmpdir(), 'fairlead-data-'));
  let server: TestServer;
  let people: TestOrganisation;
  let study: Awaited<ReturnType<typeof wholeStudy>>;
  let isDown = true;

  beforeAll(async () => {
    const authority = await localAuthority(folder);
    const ask: typeof authority.ask = (question) =>
      isDown ? Promise.reject(new Error('nobody answers')) : authority.ask(question);
    server = await testServer({ clock, timestamps: { ...authority, ask } });
    people = await makeOrganisation(server, 'Harbour');
    study = await wholeStudy(server, people, clock, 'Study Plover');
  });
  afterAll(async () => {
    await server.stop();
    rmSync(folder, { recursive: true });
  });

  const sealed = async () => (await study.manager.get(study.at).expect(200)).body.sealed;
  const heads = async (): Promise<SignedHead[]> =>
    (await study.manager.get(`${study.at}/report`).expect(200)).body.record.heads;
  const time = async (): Promise<TimeState> => {
    const owner = await signedIn(server, people.owner.email);
    return (await owner.get(`${study.base}/timestamps`).expect(200)).body;
  };

  it('a head without a token says so, and the owner sees how many wait and why [X10]', async () => {
    const failed = await untilAsked('a failed attempt', async () => {
      clock.advance(1000);
      const state = await time();
      return state.lastError === null ? null : state;
    });
    expect(failed).toMatchObject({ authority: { name: 'local authority', isLocal: true }, waiting: 4 });
    expect(failed.lastError).toBe('nobody answers');
    expect((await sealed()).signed).toMatchObject({ sequence: 1, moment: 'sealing', token: null });
    expect((await heads()).map(({ token }) => token)).toEqual([null, null, null, null]);
    await study.manager.get(`${study.base}/timestamps`).expect(403);
  });

  it('the sealed protocol and the report show key, authority, time and distance [X10] [X5]', async () => {
    isDown = false;
    await untilAsked('every token', async () => {
      clock.advance(60_000);
      return (await time()).waiting === 0;
    });
    const { signed, sealedBy, digest } = await sealed();
    expect(sealedBy).toContain('manager of Harbour');
    expect(digest).toMatch(/^[0-9a-f]{64}$/);
    expect(signed.key).toMatch(/^[0-9a-f]{64}$/);
    expect(signed.token).toMatchObject({ authority: 'local authority', isLocal: true });
    expect(signed.token.gapMs).toBe(Date.parse(signed.token.time) - Date.parse(signed.at));
    expect((await heads()).map(({ moment, session }) => [moment, session])).toEqual([
      ['sealing', null],
      ['draw-fixed', 1],
      ['session-end', 1],
      ['closing', null],
    ]);
  });

  it('the publication lists every head for anybody, also without JavaScript [X10] [X5]', async () => {
    const confirmations = Object.fromEntries(confirmationIds.map((id) => [id, true]));
    const { body } = await study.manager
      .post(`${study.at}/publication`)
      .send({ paid: 'The makers', supplied: 'The makers, from stock', ties: 'none', confirmations })
      .expect(200);
    const publication = await request(server.address).get(`/api/publications/${body.id}`).expect(200);
    const shown: SignedHead[] = publication.body.report.record.heads;
    expect(shown.map(({ moment, token }) => [moment, token?.isLocal ?? null])).toEqual([
      ['sealing', true],
      ['draw-fixed', true],
      ['session-end', true],
      ['closing', true],
      ['publication', null],
    ]);
    await untilAsked('the last token', async () => {
      clock.advance(1000);
      return (await time()).waiting === 0;
    });
    const later = await request(server.address).get(`/api/publications/${body.id}`).expect(200);
    expect(later.body.report.record.heads.at(-1).token.isLocal).toBe(true);
    expect(later.body.file).toEqual(publication.body.file);
    const page = (await request(server.address).get(`/p/${body.id}`).expect(200)).text;
    expect(page).toContain('Session ended, session 1: entry');
    expect(page).toMatch(/time-stamped \d+ \w+ \d{4}, \d\d:\d\d UTC \(local, \d+ \w+ (after|before) the signature/);
    expect(page).toContain(localTimeWords);
    expect(page).toContain(readableFingerprint(shown[0]?.key ?? ''));
  });

  it('keys, signatures and tokens can be downloaded by anybody, and openssl alone confirms each [X11] [K3] [X2]', async () => {
    const { body: publication } = await study.manager.get(`${study.at}/publication`).expect(200);
    const address = `/api/publications/${publication.publication.id}/signed-heads`;
    const proofs = headProofs.parse((await request(server.address).get(address).expect(200)).body);
    expect(proofs.heads.map(({ moment }) => moment)).toEqual([
      'sealing',
      'draw-fixed',
      'session-end',
      'closing',
      'publication',
    ]);
    const entries = await withTransaction(server.deps.db, (tx) => readRecord(tx, study.studyId));
    expect(headProofsFault(entries, proofs, bytesOf)).toBeNull();
    const openssl = (args: string[]) => execFileSync('openssl', args, { cwd: folder, stdio: 'pipe' }).toString();
    const write = (name: string, content: string | Uint8Array) => writeFileSync(join(folder, name), content);
    for (const { study: of, sequence, head, moment, at, key, signature, token } of proofs.heads) {
      // As the guide says: this text, made of what stands in the file.
      const format = 'fairlead-signed-head/1';
      write('head.json', JSON.stringify({ at, format, head, key, moment, sequence, study: of }));
      write('head.sig', Buffer.from(signature, 'hex'));
      const publicKey = proofs.keys.find(({ fingerprint }) => fingerprint === key)?.publicKey ?? '';
      write('key.der', Buffer.from(`302a300506032b6570032100${publicKey}`, 'hex'));
      const files = ['-keyform', 'DER', '-inkey', 'key.der', '-rawin', '-in', 'head.json', '-sigfile', 'head.sig'];
      expect(openssl(['pkeyutl', '-verify', '-pubin', ...files])).toContain('Verified Successfully');
      write('head.tsr', Buffer.from(token?.reply ?? '', 'base64'));
      write('certificates.pem', token?.certificates ?? '');
      const time = String(Math.floor(Date.parse(token?.time ?? '') / 1000));
      const trusted = ['-CAfile', 'certificates.pem', '-partial_chain', '-attime', time];
      expect(openssl(['ts', '-verify', '-data', 'head.json', '-in', 'head.tsr', ...trusted])).toContain('OK');
    }
    const own = await study.manager.get(`${study.at}/signed-heads`).expect(200);
    expect(own.body).toEqual(proofs);
    await request(server.address).get('/api/publications/00000000/signed-heads').expect(404);
  });

  const bytesOf = (base64: string) => new Uint8Array(Buffer.from(base64, 'base64'));
  it.each<[string, (proofs: HeadProofs) => HeadProofs, number, string]>([
    ['a head left out', (all) => ({ ...all, heads: all.heads.slice(1) }), 1, 'signature is missing'],
    ['another key', (all) => ({ ...all, keys: [] }), 1, 'no key'],
    ['another time signed', (all) => bend(all, 0, { at: '2026-12-01T00:00:00.000Z' }), 1, 'does not hold'],
    [
      'the token of another head',
      (all) => bend(all, 0, { token: all.heads[1]?.token ?? null }),
      1,
      'another statement',
    ],
    [
      'a token that is none',
      (all) => bend(all, 0, { token: tokenWith(all, { reply: 'bm9uZQ==' }) }),
      1,
      'cannot be read',
    ],
    [
      'another time stamped',
      (all) => bend(all, 0, { token: tokenWith(all, { time: '2026-12-01T00:00:00.000Z' }) }),
      1,
      'another time',
    ],
  ])('%s in what was downloaded is found [X11]', async (_what, change, sequence, why) => {
    const proofs = headProofs.parse((await study.manager.get(`${study.at}/signed-heads`).expect(200)).body);
    const entries = await withTransaction(server.deps.db, (tx) => readRecord(tx, study.studyId));
    const fault = headProofsFault(entries, change(proofs), bytesOf);
    expect(fault?.sequence).toBe(sequence);
    expect(fault?.why).toContain(why);
  });

  it.each([
    [0, 'within a second of the signature'],
    [999, 'within a second of the signature'],
    [-400, 'within a second of the signature'],
    [1000, '1 second after the signature'],
    [100_000, '100 seconds after the signature'],
    [600_000, '10 minutes after the signature'],
    [9 * 86_400_000, '9 days after the signature'],
    [-7_200_000, '2 hours before the signature: the two clocks disagree'],
  ])('a distance of %i ms is said as “%s” [X10]', (gapMs, words) => {
    expect(gapWords(gapMs)).toBe(words);
  });
});
