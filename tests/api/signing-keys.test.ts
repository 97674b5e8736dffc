import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { SigningKey as KeyReply } from '#shared/contracts/signing-keys.ts';
import { type HeadSignature, publicKeyPem, signatureFault, statementBytes } from '#shared/ledger/signed-head.ts';
import { withTransaction } from '../../server/db/transaction.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { signaturesOf } from '../../server/ledger/head-signatures.ts';
import { readRecord } from '../../server/ledger/ledger.ts';
import { SigningKey } from '../../server/ledger/signing-key.entity.ts';
import { currentKey, keysOf, publicKeyView, requireOpenableKeys, signWith } from '../../server/ledger/signing-keys.ts';
import { type Agent, makeOrganisation, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';
import { wholeStudy } from '../support/whole-study.ts';

const confirmed = Object.fromEntries(
  ['complete', 'deviations', 'specimens', 'privacy', 'claims', 'evidence', 'permanent'].map((name) => [name, true]),
);

describe('signatures of a record', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  let server: TestServer;
  let people: TestOrganisation;
  let owner: Agent;
  let study: Awaited<ReturnType<typeof readyStudy>>;
  beforeAll(async () => {
    server = await testServer({ clock });
    people = await makeOrganisation(server, 'Harbour');
    owner = await signedIn(server, people.owner.email);
    study = await wholeStudy(server, people, clock, 'Study Plover');
    await study.manager
      .post(`${study.at}/publication`)
      .send({ paid: 'The makers', supplied: 'The makers, from stock', ties: 'none', confirmations: confirmed })
      .expect(200);
  });
  afterAll(() => server.stop());

  const list = async (query = '') => {
    const { body } = await owner.get(`${study.base}/signing-keys${query}`).expect(200);
    return body as { rows: KeyReply[]; total: number; current: KeyReply | null };
  };
  const signatures = (id = study.studyId) => withTransaction(server.deps.db, (tx) => signaturesOf(tx, id));
  async function faults(id = study.studyId) {
    return withTransaction(server.deps.db, async (tx) => {
      const entries = await readRecord(tx, id);
      const keys = (await keysOf(tx, people.organisationId)).map(publicKeyView);
      return (await signaturesOf(tx, id)).map((signature) =>
        signatureFault(
          signature,
          entries[signature.sequence - 1],
          keys.find(({ fingerprint }) => fingerprint === signature.key),
        ),
      );
    });
  }

  it('are made at the five moments, and hold [K1]', async () => {
    const made = await signatures();
    expect(made.map(({ moment }) => moment)).toEqual([
      'sealing',
      'draw-fixed',
      'session-end',
      'closing',
      'publication',
    ]);
    expect(await faults()).toEqual([null, null, null, null, null]);
    const entries = await withTransaction(server.deps.db, (tx) => readRecord(tx, study.studyId));
    const kindOf = ({ sequence }: HeadSignature) => entries[sequence - 1]?.kind;
    expect(made.map(kindOf)).toEqual([
      'protocol-sealed',
      'draw-fixed',
      'session-finished',
      'result-recorded',
      'study-published',
    ]);
  });

  it('are undone with the entry that they sign [K1]', async () => {
    const { deps } = server;
    const before = (await signatures()).length;
    const { append } = await import('../../server/ledger/ledger.ts');
    const undone = withTransaction(deps.db, async (tx) => {
      const payload = { session: 1, reason: 'x', openTrial: null, answersHeld: 0 };
      await append(tx, deps, study.studyId, [{ kind: 'session-abandoned', at: clock.now(), payload, session: 1 }]);
      expect(await signaturesOf(tx, study.studyId)).toHaveLength(before + 1);
      throw new Error('undone');
    });
    await expect(undone).rejects.toThrow('undone');
    expect(await signatures()).toHaveLength(before);
  });

  it('are confirmed by openssl alone [K3]', async () => {
    const { current } = await list();
    const folder = mkdtempSync(join(tmpdir(), 'fairlead-signature-'));
    const [signature] = await signatures();
    if (signature === undefined || current === null) throw new Error('nothing is signed');
    writeFileSync(join(folder, 'key.pem'), publicKeyPem(current.publicKey));
    writeFileSync(join(folder, 'head.sig'), Buffer.from(signature.signature, 'hex'));
    const check = (statement: Uint8Array) => {
      writeFileSync(join(folder, 'head.json'), statement);
      const files = ['-inkey', 'key.pem', '-rawin', '-in', 'head.json', '-sigfile', 'head.sig'];
      return execFileSync('openssl', ['pkeyutl', '-verify', '-pubin', ...files], { cwd: folder, stdio: 'pipe' });
    };
    expect(check(statementBytes(signature)).toString()).toContain('Verified Successfully');
    expect(() => check(statementBytes({ ...signature, sequence: 2 }))).toThrow();
    const der = execFileSync('openssl', ['pkey', '-pubin', '-in', 'key.pem', '-outform', 'DER', '-out', 'key.der'], {
      cwd: folder,
    });
    expect(der.length).toBe(0);
    expect(execFileSync('sha256sum', ['key.der'], { cwd: folder }).toString().slice(0, 64)).toBe(current.fingerprint);
    rmSync(folder, { recursive: true });
  });

  it('come from a key whose private part no row, reply or other secret opens [K4]', async () => {
    const { deps } = server;
    const key = await withTransaction(deps.db, (tx) => currentKey(tx, deps, people.organisationId));
    expect(key.privatePart).toMatch(/^1\.[A-Za-z0-9+/=]+$/);
    const message = new Uint8Array([1]);
    expect(signWith(deps, key, message)).toMatch(/^[0-9a-f]{128}$/);
    const otherSecret = { config: { ...deps.config, signingSecret: 'x'.repeat(32) } };
    expect(() => signWith(otherSecret, key, message)).toThrow();
    expect(() => signWith(deps, { ...key, organisationId: crypto.randomUUID() }, message)).toThrow();
    expect(() => signWith(deps, { ...key, fingerprint: '0'.repeat(64) }, message)).toThrow();
    const altered = {
      ...key,
      privatePart: `${key.privatePart.slice(0, 30)}${key.privatePart[30] === 'A' ? 'B' : 'A'}${key.privatePart.slice(31)}`,
    };
    expect(() => signWith(deps, altered, message)).toThrow();
    const reply = JSON.stringify(await list());
    expect(reply).toContain(key.fingerprint);
    expect(reply).not.toContain(key.privatePart);
    expect(reply).not.toContain('private');
  });

  it('are seen and replaced by an owner alone [K6]', async () => {
    for (const agent of [study.manager, study.holder]) {
      await agent.get(`${study.base}/signing-keys`).expect(403);
      await agent.post(`${study.base}/signing-keys/rotation`).send({ retire: null, reason: '' }).expect(403);
    }
  });

  it('still hold once their key is retired, and the next ones come from the new key [K5]', async () => {
    const { current: old } = await list();
    const rotate = (body: object) => owner.post(`${study.base}/signing-keys/rotation`).send(body);
    const unsaid = await rotate({ retire: old?.fingerprint, reason: ' ' }).expect(400);
    expect(unsaid.body.errors).toEqual([{ pointer: '/reason', detail: 'Say why; it stays in the list of keys' }]);
    clock.advance(1000);
    await rotate({ retire: old?.fingerprint, reason: 'The yearly change' }).expect(200);
    await rotate({ retire: old?.fingerprint, reason: 'Clicked twice' }).expect(409);
    const { current, rows, total } = await list();
    expect(total).toBe(1);
    expect(current?.fingerprint).not.toBe(old?.fingerprint);
    expect(current?.createdBy).toContain('owner');
    expect(rows[0]).toMatchObject({ fingerprint: old?.fingerprint, retiredReason: 'The yearly change', heads: 5 });
    expect(rows[0]?.retiredAt).toBe(new Date(clock.now()).toISOString());
    expect(await faults()).toEqual([null, null, null, null, null]);
    clock.advance(1000);
    const next = await readyStudy(server, people, { title: 'Study Knot' });
    expect((await signatures(next.studyId)).map(({ key }) => key)).toEqual([current?.fingerprint]);
    expect(await faults(next.studyId)).toEqual([null]);
    const found = await list(
      `?q=${encodeURIComponent(rows[0]?.fingerprint.slice(0, 8).replace(/(.{4})/, '$1 ') ?? '')}`,
    );
    expect(found.total).toBe(1);
    expect((await list('?q=nothing')).total).toBe(0);
  });

  it('stop a start on a secret that does not open their keys, unless it is said to be lost [K7]', async () => {
    const { deps } = server;
    const other = { ...deps, config: { ...deps.config, signingSecret: 'x'.repeat(32) } };
    const started = (given: typeof deps, isLost: boolean) =>
      withTransaction(deps.db, (tx) => requireOpenableKeys(tx, given, isLost));
    expect(await started(deps, true)).toBe(0);
    await expect(started(other, false)).rejects.toThrow('SIGNING_SECRET does not open the signing key');
    const before = await list();
    expect(await started(other, true)).toBe(1);
    const after = await list();
    expect(after.current?.fingerprint).not.toBe(before.current?.fingerprint);
    const lost = after.rows.find(({ fingerprint }) => fingerprint === before.current?.fingerprint);
    expect(lost?.retiredReason).toContain('lost');
    expect(await faults()).toEqual([null, null, null, null, null]);
    expect(await started(other, false)).toBe(0);
  });

  it('come from one key, however many studies are sealed at once for the first time [K1]', async () => {
    const elsewhere = await makeOrganisation(server, 'Elsewhere');
    const { deps } = server;
    const made = await Promise.all(
      Array.from({ length: 6 }, () => withTransaction(deps.db, (tx) => currentKey(tx, deps, elsewhere.organisationId))),
    );
    expect(new Set(made.map(({ fingerprint }) => fingerprint)).size).toBe(1);
    expect(await deps.db.manager.countBy(SigningKey, { organisationId: elsewhere.organisationId })).toBe(1);
  });
});
