import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { StudyDraft } from '#shared/contracts/studies.ts';
import { type MethodId, methodIds } from '#shared/methods/methods.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { linkTokenOf } from '../../server/features/attendances/personal-link.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, readyStudy } from '../support/people.ts';
import { repeatableRandom } from '../support/random.ts';
import { begin, presentTrial } from '../support/run-session.ts';
import { testServer } from '../support/test-server.ts';

// Non-interference: the same session, with the same clock, ids, phones and answers, but with other code keys and other
// server secrets. Whatever reaches a listener or a manager before closing must be the same, byte for byte.

type Seeds = { codeKey: string; drawSecret: string };
type Asked = {
  study: Partial<StudyDraft>;
  choices: readonly string[];
  /** What the draw decided, trial by trial, read from the codes that were fitted. */
  drawn: (codes: readonly string[], trials: readonly string[][]) => string;
};
type Run = { phones: string[][]; manager: string[]; mails: string[]; proctor: string[]; codes: string[][] };

// Commitments, and the digests chained from them, are random by design.
const withoutDigests = (text: string) => text.replace(/[0-9a-f]{64}/g, '#').replace(/urn:uuid:[0-9a-f-]{36}/g, 'urn');

async function run({ study: change, choices }: Asked, { codeKey, drawSecret }: Seeds): Promise<Run> {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  const random = repeatableRandom({ 'code-key': codeKey, 'draw-secret': drawSecret });
  const server = await testServer({ clock, random });
  const people = await makeOrganisation(server, 'Harbour');
  const study = await readyStudy(server, people, change);
  const manager: string[] = [];
  const look = async () => {
    for (const path of [
      study.at,
      `${study.base}/studies`,
      `${study.base}/sessions`,
      `${study.base}/sessions/${study.sessionId}`,
      `${study.base}/sessions/${study.sessionId}/attendances`,
      `${study.at}/codes`,
      `${study.base}/waiting`,
      `${study.base}/reports`,
      `${study.at}/publication`,
      '/api/publications',
      '/p',
      '/sitemap.xml',
      `/registry/${people.organisationId}`,
      `/api/registry/${people.organisationId}`,
      `/api/registry/${people.organisationId}/registry-head.json`,
      `/api/registry/${people.organisationId}/entries/0/inclusion.json`,
    ]) {
      const reply = await study.manager.get(path);
      manager.push(`${reply.status} ${reply.headers['content-length']} ${reply.text}`);
    }
    for (const token of links) {
      const reply = await request(server.address).post('/api/personal-link/look').send({ token });
      manager.push(`${reply.status} ${reply.text}`);
    }
  };
  const links: string[] = [];
  const invited = `${study.base}/sessions/${study.sessionId}/attendances`;
  await study.manager.post(invited).send({ addresses: 'ada@listeners.example' }).expect(200);
  for (const { id } of (await study.manager.get(invited)).body.rows) links.push(linkTokenOf(server.deps.config, id));
  await look();
  const desk = await Console.open(server.address, people.proctor.email, study.sessionId);
  const code = await desk.openSeating();
  const phones: Phone[] = [];
  phones.push(await Phone.joinByLink(server.address, links[0] ?? '', 'left'));
  phones.push(await Phone.join(server.address, code, 'right'));
  await begin(desk, phones, clock);
  const codes: string[][] = [];
  for (const [index, choice] of choices.entries()) {
    codes.push(await presentTrial(desk, clock));
    for (const phone of phones) await phone.answer(index + 1, choice);
    await desk.sees('all in', (view) => view.trial?.answered === phones.length);
    await desk.act({ kind: 'lock-trial' });
    for (const phone of phones) await phone.sees('the lock', ({ lastLock }) => lastLock?.trial === index + 1);
    await look();
  }
  await desk.act({ kind: 'finish' });
  for (const phone of phones) await phone.sees('the end', ({ phase }) => phase === 'finished');
  await look();
  const mails: object[] = await server.deps.db.query('select * from outbox order by created_at, recipient, subject');
  const seen: Run = {
    phones: phones.map(({ received }) => received.map(withoutDigests)),
    manager: manager.map(withoutDigests),
    mails: mails.map((mail) => withoutDigests(JSON.stringify(mail))),
    proctor: desk.received.map(withoutDigests),
    codes,
  };
  for (const page of [desk, ...phones]) page.close();
  await server.stop();
  return seen;
}

const firstCodes = ([first]: readonly string[], trials: readonly string[][]) =>
  first === trials[0]?.[0] ? 'as in trial 1' : 'the other way';
const likeTheFirst = ([first, ...others]: readonly string[]) =>
  others.map((code) => (code === first ? 'again' : 'other')).join(' ');

// In ABX the draw is what X is, elsewhere what is heard first, and what is heard again.
const methods: Record<MethodId, Asked> = {
  abx: {
    study: { method: 'abx' },
    choices: ['A', 'B', 'B', 'A', 'A'],
    drawn: ([a, , x]) => (a === x ? 'A' : 'B'),
  },
  triangle: {
    study: { method: 'triangle' },
    choices: ['first', 'third', 'second', 'first', 'second'],
    drawn: likeTheFirst,
  },
  'duo-trio': {
    study: { method: 'duo-trio' },
    choices: ['first', 'second', 'second', 'first', 'second'],
    drawn: likeTheFirst,
  },
  'same-different': {
    study: { method: 'same-different' },
    choices: ['same', 'different', 'different', 'same', 'same'],
    drawn: likeTheFirst,
  },
  'directional-comparison': {
    study: { method: 'directional-comparison', attribute: 'bass' },
    choices: ['first', 'second', 'second', 'first', 'second'],
    drawn: firstCodes,
  },
  'paired-preference': {
    study: { method: 'paired-preference', methodSettings: ['no-preference'] },
    choices: ['first', 'second', 'none', 'first', 'second'],
    drawn: firstCodes,
  },
};

describe.each(methodIds)('what leaves the server before closing, %s', (id) => {
  const asked = methods[id];
  const seeds: Seeds[] = [
    { codeKey: 'key one', drawSecret: 'draw one' },
    { codeKey: 'key two', drawSecret: 'draw one' },
    { codeKey: 'key one', drawSecret: 'draw two' },
    { codeKey: 'key three', drawSecret: 'draw three' },
  ];
  let runs: Run[] = [];
  beforeAll(async () => {
    runs = [];
    for (const seed of seeds) runs.push(await run(asked, seed));
  }, 120_000);
  afterAll(() => {
    runs = [];
  });

  const other = (index: number): Run => {
    const found = runs[index];
    if (found === undefined) throw new Error(`no run ${index}`);
    return found;
  };

  it('differs in code key and in the draw between the runs, so that the comparison means something [B1]', () => {
    const draws = runs.map(({ codes }) => codes.map((trial) => asked.drawn(trial, codes)).join());
    expect(new Set(draws).size).toBeGreaterThan(1);
    expect(new Set(runs.map(({ codes }) => [...new Set(codes.flat())].sort().join())).size).toBeGreaterThan(1);
  });

  it.each([1, 2, 3])('is the same for listeners, whatever the secrets (run %i) [B1]', (index) => {
    expect(other(index).phones).toEqual(other(0).phones);
    expect(other(0).phones[0]?.length).toBeGreaterThan(40);
  });

  it.each([1, 2, 3])('is the same for managers, whatever the secrets (run %i) [B1]', (index) => {
    expect(other(index).manager).toEqual(other(0).manager);
  });

  it.each([1, 2, 3])('is the same in every mail and calendar file, whatever the secrets (run %i) [B1]', (index) => {
    expect(other(index).mails).toEqual(other(0).mails);
    expect(other(0).mails.some((mail) => mail.includes('BEGIN:VCALENDAR'))).toBe(true);
  });

  it.each([1, 2, 3])('is the same for the proctor but for the code to be fitted (run %i) [B2]', (index) => {
    const withoutCode = (texts: readonly string[]) => texts.map((text) => text.replace(/"code":"\d{3}"/g, '"code":""'));
    expect(withoutCode(other(index).proctor)).toEqual(withoutCode(other(0).proctor));
    expect(other(0).proctor.some((text) => /"code":"\d{3}"/.test(text))).toBe(true);
  });
});
