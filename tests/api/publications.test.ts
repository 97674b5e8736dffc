import { createHash } from 'node:crypto';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { checksOfBundle } from '#shared/bundle/verify-bundle.ts';
import { confirmationIds, type OwnPublication, type Publication } from '#shared/contracts/publications.ts';
import type { Report } from '#shared/contracts/reports.ts';
import { bundleCheckNames } from '#shared/ledger/check-names.ts';
import { type Check, checksOfFile } from '#shared/ledger/verify.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { readRecord } from '../../server/ledger/ledger.ts';
import { pastTriggers } from '../support/past-triggers.ts';
import { makeOrganisation, password, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';
import { wholeStudy } from '../support/whole-study.ts';

const confirmations = Object.fromEntries(confirmationIds.map((name) => [name, true]));
const statements = {
  paid: 'The workshop <script>alert(1)</script> paid.',
  supplied: 'A shop in the next town; $& drawn by lot.',
  ties: 'none',
};
const draft = { ...statements, confirmations };

describe('a publication', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  let server: TestServer;
  let people: TestOrganisation;
  let study: Awaited<ReturnType<typeof readyStudy>>;
  let shelved: Awaited<ReturnType<typeof readyStudy>>;
  let published: OwnPublication;

  beforeAll(async () => {
    server = await testServer({ clock });
    people = await makeOrganisation(server, 'Harbour');
    study = await wholeStudy(server, people, clock, 'Study Plover');
    shelved = await wholeStudy(server, people, clock, 'Study Knot');
  }, 120_000);
  afterAll(() => server.stop());

  const anybody = () => request(server.address);
  const view = async (): Promise<Publication> =>
    (await anybody().get(`/api/publications/${published.id}`).expect(200)).body;
  const page = async () => (await anybody().get(`/p/${published.id}`).expect(200)).text;
  const record = (studyId: string) => readRecord(server.deps.db.manager, studyId);

  it('needs a closed study, all three statements and every confirmation [V5]', async () => {
    const open = await readyStudy(server, people, { title: 'Study Dotterel' });
    const early = await open.manager.post(`${open.at}/publication`).send(draft);
    expect([early.status, early.body.detail]).toEqual([409, 'A study is published once it is closed.']);
    for (const field of ['paid', 'supplied', 'ties']) {
      const empty = await study.manager.post(`${study.at}/publication`).send({ ...draft, [field]: '  ' });
      expect([empty.status, empty.body.errors[0].pointer]).toEqual([400, `/${field}`]);
    }
    for (const name of confirmationIds) {
      const left = { ...draft, confirmations: { ...confirmations, [name]: false } };
      const reply = await study.manager.post(`${study.at}/publication`).send(left);
      expect([reply.status, reply.body.errors[0].pointer]).toEqual([400, `/confirmations/${name}`]);
    }
    for (const person of [people.proctor, people.reviewer]) {
      const other = await signedIn(server, person.email);
      expect((await other.post(`${study.at}/publication`).send(draft)).status).toBe(403);
    }
    expect((await study.manager.get(`${study.at}/publication`).expect(200)).body).toEqual({ publication: null });
  });

  it('puts the statements on the record, and then the digest of the document that ends with them [V5] [V6]', async () => {
    published = (await study.manager.post(`${study.at}/publication`).send(draft).expect(200)).body;
    const [declared, done] = (await record(study.studyId)).slice(-2);
    expect(declared).toMatchObject({ kind: 'publication-declared', payload: { ...statements, publisher: 'Harbour' } });
    expect(declared?.payload.confirmations).toEqual(confirmationIds);
    expect(done).toMatchObject({ kind: 'study-published', payload: { id: published.id, digest: published.digest } });
    expect((await study.manager.get(study.at)).body.state).toBe('published');
    const again = await study.manager.post(`${study.at}/publication`).send(draft);
    expect([again.status, again.body.detail]).toEqual([409, 'The study is published already.']);
    const file = await anybody()
      .get((await view()).file.path)
      .expect(200);
    const parts = JSON.parse(file.text);
    expect(parts.record.at(-1)).toEqual(declared);
  });

  it('is one file, the same for good, that its digest names and every check passes [V1] [V6]', async () => {
    const { file } = await view();
    const download = await anybody().get(file.path).expect(200);
    expect(createHash('sha256').update(download.text).digest('hex')).toBe(published.digest);
    expect([file.digest, file.bytes]).toEqual([published.digest, Buffer.byteLength(download.text)]);
    expect([...checksOfFile(download.text)].filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
  });

  const timed = ['sealingTime', 'drawTime'];
  const bundle = async (): Promise<Check[]> => {
    const { body, headers } = await anybody()
      .get((await view()).bundle)
      .buffer(true)
      .parse((reply, done) => {
        const parts: Buffer[] = [];
        reply.on('data', (part: Buffer) => parts.push(part));
        reply.on('end', () => done(null, Buffer.concat(parts)));
      })
      .expect(200);
    expect(headers['content-type']).toContain('application/zip');
    const checks: Check[] = [];
    for await (const check of checksOfBundle(new Uint8Array(body), globalThis.crypto)) checks.push(check);
    return checks;
  };

  it('is a bundle for anybody, of which every line passes but those whose tokens have not come [Z1] [Z6]', async () => {
    expect((await view()).bundle).toBe(`/p/${published.id}/bundle.zip`);
    const checks = await bundle();
    expect(checks.map(({ id }) => id)).toEqual(bundleCheckNames.map(({ id }) => id));
    for (const { id, outcome, reason } of checks)
      expect(`${id} ${outcome}`, reason).toBe(`${id} ${timed.includes(id) ? 'not checkable' : 'pass'}`);
  });

  it('holds nobody’s name, address, room or place [V6]', async () => {
    const { text } = await anybody().get((await view()).file.path);
    const api = (await anybody().get(`/api/publications/${published.id}`)).text;
    for (const shown of [text, api, await page()])
      for (const word of ['.example', ' of Harbour', 'window seat', 'door seat', 'Room B', password])
        expect(shown.includes(word), word).toBe(false);
  });

  it('is readable without a script: what was found, how, and by whom it was paid [V7]', async () => {
    const text = await page();
    const { report } = await view();
    const { finding, result, record: kept } = report;
    const escaped = (words: string) => words.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;');
    const words = [
      finding.headline,
      finding.maySay ?? 'no claim',
      finding.scope,
      ...finding.mustNotSay,
      ...finding.modifiers,
      ...report.conditions,
      `${result.correct} / ${result.answers}`,
      `${result.p.numerator} / ${result.p.denominator}`,
      `Blinding: ${report.rung.name}.`,
      'Changes between presentations lasted 3 s, real or sham.',
      'Session 1, finished',
      'A lorry <b>passed</b> & hooted.',
      kept.head,
      published.digest,
      report.protocol.digest,
      statements.paid,
      statements.supplied,
      'Ties to the maker',
      'No software shows what was physically plugged in, that nobody told, or that whoever runs the server did not read the secrets early.',
    ];
    for (const part of words) expect(text, part).toContain(escaped(part));
    for (const [what, count] of [
      ['Sessions opened', 1],
      ['Sessions abandoned', 0],
      ['Trials opened', 6],
      ['Trials void', 1],
      ['Trials counted', 5],
    ])
      expect(text, String(what)).toMatch(new RegExp(`>${what}</th>\\s*<td[^>]*>${count}</td>`));
    expect(text).not.toContain('<script>alert');
  });

  it('tells machines its title, description, address and data [V7]', async () => {
    const text = await page();
    const publication = await view();
    expect(text).toContain(`<title>${publication.headline} · Fairlead</title>`);
    expect(text).toContain(`<link rel="canonical" href="http://fairlead.test:4180/p/${published.id}" />`);
    expect(text).toMatch(/<meta name="description" content="Northern run and Southern run, compared blind/);
    const data = /<script type="application\/ld\+json">(.*?)<\/script>/s.exec(text)?.[1] ?? '';
    expect(JSON.parse(data)).toMatchObject({
      '@type': 'Dataset',
      url: published.address,
      name: publication.headline,
      identifier: `sha256:${published.digest}`,
      creativeWorkStatus: 'Published',
      publisher: { name: 'Harbour' },
      distribution: { contentUrl: `${published.address}/${published.digest}.json`, sha256: published.digest },
    });
  });

  it('says the same as the report that its organisation reads [V1]', async () => {
    const inside: Report = (await study.manager.get(`${study.at}/report`).expect(200)).body;
    const { report } = await view();
    expect(report.result).toEqual(inside.result);
    expect(report.finding).toEqual(inside.finding);
    expect(report.flow).toEqual(inside.flow);
    expect(report.sessions.map(({ trials }) => trials)).toEqual(inside.sessions.map(({ trials }) => trials));
  });

  it('is listed for anybody, and for search engines [V8]', async () => {
    const rows = (await anybody().get('/api/publications').expect(200)).body.rows;
    expect(rows.map(({ id }: { id: string }) => id)).toEqual([published.id]);
    const found = await anybody().get('/api/publications?q=Northern').expect(200);
    expect(found.body.total).toBe(1);
    expect((await anybody().get('/api/publications?q=nothing-like-it')).body.total).toBe(0);
    const sitemap = await anybody().get('/sitemap.xml').expect(200);
    expect(sitemap.headers['content-type']).toContain('application/xml');
    expect(sitemap.text).toContain(`<loc>${published.address}</loc>`);
    const robots = await anybody().get('/robots.txt').expect(200);
    expect(robots.text).toContain('Sitemap: http://fairlead.test:4180/sitemap.xml');
    expect((await anybody().get('/p').expect(200)).text).toContain(`/p/${published.id}`);
  });

  it('is nothing at any other address', async () => {
    for (const path of [
      '/api/publications/zzzzzzzz',
      '/api/publications/..',
      `/p/zzzzzzzz/${published.digest}.json`,
      `/p/${published.id}/${'0'.repeat(64)}.json`,
      '/p/zzzzzzzz/bundle.zip',
      '/p/nope/bundle.zip',
      '/p/zzzzzzzz',
      '/p/nope',
    ])
      expect((await anybody().get(path)).status, path).toBe(404);
  });

  it('is withdrawn with a reason that its page says first, stays, and then licenses nothing [V9]', async () => {
    const without = await study.manager.post(`${study.at}/publication/withdrawal`).send({ reason: ' ' });
    expect([without.status, without.body.errors[0].pointer]).toEqual([400, '/reason']);
    const before = await view();
    await study.manager
      .post(`${study.at}/publication/withdrawal`)
      .send({ reason: 'The specimens were swapped.' })
      .expect(200);
    expect((await record(study.studyId)).at(-1)).toMatchObject({
      kind: 'publication-withdrawn',
      payload: { id: published.id, reason: 'The specimens were swapped.' },
    });
    const after = await view();
    expect(after).toEqual({ ...before, withdrawn: { at: after.withdrawn?.at, reason: 'The specimens were swapped.' } });
    const text = await page();
    expect(text.indexOf('The specimens were swapped.')).toBeLessThan(text.indexOf('<h1'));
    expect(text).toContain('Nothing: the publication is withdrawn.');
    expect(text).not.toContain('<blockquote');
    expect(text).toContain('"creativeWorkStatus":"Withdrawn"');
    await anybody().get(after.file.path).expect(200);
    const checks = await bundle();
    expect(checks.filter(({ outcome }) => outcome !== 'pass').map(({ id }) => id)).toEqual(timed);
    expect(checks.find(({ id }) => id === 'published')?.reason).toContain(
      'The publication was withdrawn: The specimens were swapped.',
    );
    expect((await anybody().get('/api/publications')).body.rows[0].isWithdrawn).toBe(true);
    const twice = await study.manager.post(`${study.at}/publication/withdrawal`).send({ reason: 'Once more.' });
    expect(twice.status).toBe(409);
  });

  it('is none for a study that is shelved, until it is published after all [V10]', async () => {
    await shelved.manager.post(`${shelved.at}/shelving`).send({ reason: 'Too few trials.' }).expect(200);
    expect((await record(shelved.studyId)).at(-1)).toMatchObject({
      kind: 'study-shelved',
      payload: { reason: 'Too few trials.' },
    });
    expect((await shelved.manager.get(shelved.at)).body.state).toBe('shelved');
    expect((await anybody().get('/api/publications')).body.total).toBe(1);
    const report: Report = (await shelved.manager.get(`${shelved.at}/report`).expect(200)).body;
    expect(report.record.checks.every(({ outcome }) => outcome === 'pass')).toBe(true);
    expect((await shelved.manager.post(`${shelved.at}/shelving`).send({ reason: 'Again.' })).status).toBe(409);
    expect((await shelved.manager.post(`${shelved.at}/publication/withdrawal`).send({ reason: 'None.' })).status).toBe(
      409,
    );
    await shelved.manager.post(`${shelved.at}/publication`).send(draft).expect(200);
    expect((await anybody().get('/api/publications')).body.total).toBe(2);
  });

  it('is refused where the record does not hold [V11]', async () => {
    const third = await wholeStudy(server, people, clock, 'Study Sanderling');
    await pastTriggers(server.deps.db, [
      'update answers set choice = if(choice = "A", "B", "A") where session_id = ? and trial = 1',
      [third.sessionId],
    ]);
    const report: Report = (await third.manager.get(`${third.at}/report`).expect(200)).body;
    expect(report.finding).toMatchObject({ row: '0', maySay: null });
    const refused = await third.manager.post(`${third.at}/publication`).send(draft);
    expect([refused.status, refused.body.detail]).toEqual([
      403,
      'The record does not hold and cannot be published. Answers match their leaves: Session 1, trial 1, L01: the answer does not match the record.',
    ]);
  });
});
