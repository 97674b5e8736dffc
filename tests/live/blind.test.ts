import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { StudyDraft } from '#shared/contracts/studies.ts';
import { type MethodId, methodIds } from '#shared/methods/methods.ts';
import { shippedPresets } from '#shared/protocol/shipped-presets.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { linkTokenOf } from '../../server/features/attendances/personal-link.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, readyStudy, secretTreatment } from '../support/people.ts';
import { repeatableRandom } from '../support/random.ts';
import { begin, presentTrial, type Scan, scanBothEnds } from '../support/run-session.ts';
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

/** Holds up every cable that was fitted before and is another one now, takes the scan back once, and scans. */
function scanWithFaults(seen: Set<string>): Scan {
  return async (desk, code) => {
    for (const text of [...seen].filter((other) => other !== code))
      await expect(desk.act({ kind: 'scan-label', text, by: 'scanner' })).rejects.toThrow('in hand');
    if (!seen.has(code)) {
      await scanBothEnds(desk, code);
      await desk.act({ kind: 'undo-step' });
    }
    seen.add(code);
    await scanBothEnds(desk, code);
  };
}

/** Goes through the sleeves: too early, with another study's label, and with all of them. */
async function takeInventory(desk: Console, codes: Iterable<string>): Promise<void> {
  const foreign = { kind: 'scan-label', text: 'FLBBBB9991', by: 'camera' };
  await expect(desk.act(foreign)).rejects.toThrow('not of this study');
  await expect(desk.act({ kind: 'end-inventory', reason: '' })).rejects.toThrow('Not found');
  for (const text of codes) await desk.act({ kind: 'scan-label', text, by: 'typed' });
  await desk.act({ kind: 'end-inventory', reason: '' });
}

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
  const fitted = new Set<string>();
  const scan = scanWithFaults(fitted);
  await begin(desk, phones, clock, scan);
  const codes: string[][] = [];
  for (const [index, choice] of choices.entries()) {
    codes.push(await presentTrial(desk, clock, scan));
    for (const phone of phones) await phone.answer(index + 1, choice);
    await desk.sees('all in', (view) => view.trial?.answered === phones.length);
    await desk.act({ kind: 'lock-trial' });
    for (const phone of phones) await phone.sees('the lock', ({ lastLock }) => lastLock?.trial === index + 1);
    await look();
  }
  if (desk.now.inventory !== null) await takeInventory(desk, fitted);
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

// Where the proctor is told a code: the one to be fitted, and at the labels those in hand and those not found.
const codeAlone = [/"code":"\d{3}"/g, /\d{3} is in hand, and \d{3} is wanted[^"]*/, /Not found: \d{3}(, \d{3})*/];

const firstCodes = ([first]: readonly string[], trials: readonly string[][]) =>
  first === trials[0]?.[0] ? 'as in trial 1' : 'the other way';
const likeTheFirst = ([first, ...others]: readonly string[]) =>
  others.map((code) => (code === first ? 'again' : 'other')).join(' ');

// In ABX the draw is what X is, elsewhere what is heard first, and what is heard again.
const methods: Record<MethodId, Asked> = {
  abx: {
    // With labels scanned at every change: wrong ones, steps taken back, and the inventory.
    study: { method: 'abx', rigPreset: shippedPresets.loudspeaker, changeS: 30 },
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

  it('has nothing of a cable’s construction for a listener or the proctor, or in a mail [Q7]', () => {
    for (const { phones, proctor, mails } of runs)
      expect([...phones.flat(), ...proctor, ...mails].filter((text) => text.includes(secretTreatment))).toEqual([]);
  });

  it.each([1, 2, 3])('is the same for managers, whatever the secrets (run %i) [B1]', (index) => {
    expect(other(index).manager).toEqual(other(0).manager);
  });

  it.each([1, 2, 3])('is the same in every mail and calendar file, whatever the secrets (run %i) [B1]', (index) => {
    expect(other(index).mails).toEqual(other(0).mails);
    expect(other(0).mails.some((mail) => mail.includes('BEGIN:VCALENDAR'))).toBe(true);
  });

  it.each([1, 2, 3])('is the same for the proctor but for the code to be fitted (run %i) [B2]', (index) => {
    const withoutCode = (texts: readonly string[]) =>
      texts.map((text) => codeAlone.reduce((left, pattern) => left.replace(pattern, '#'), text));
    expect(withoutCode(other(index).proctor)).toEqual(withoutCode(other(0).proctor));
    expect(other(0).proctor.some((text) => /"code":"\d{3}"/.test(text))).toBe(true);
  });
});
