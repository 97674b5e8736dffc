import request from 'supertest';
import { expect } from 'vitest';
import type { StudyDraft } from '#shared/contracts/studies.ts';
import { CodeKey } from '../../server/blind/code-key.entity.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { linkTokenOf } from '../../server/features/attendances/personal-link.ts';
import type { Ladder } from './check-cables.ts';
import { Console, Phone } from './live.ts';
import { makeOrganisation, readyStudy } from './people.ts';
import { repeatableRandom } from './random.ts';
import { begin, presentTrial, type Scan, scanBothEnds } from './run-session.ts';
import { type TestServer, testServer } from './test-server.ts';

// Non-interference: the same session, with the same clock, ids, phones and answers, but with other code keys and other
// server secrets. Whatever reaches a listener or a manager before closing must be the same, byte for byte.

export type Seeds = {
  codeKey: string;
  drawSecret: string;
  /** Whether one specimen of each cable has the other's sleeve. */
  isExchanged?: boolean;
};
export type Asked = {
  study: Partial<StudyDraft>;
  /** Check trials among the others. */
  ladder?: Ladder;
  choices: readonly string[];
  /** What the draw decided, trial by trial, read from the codes that were fitted. */
  drawn: (codes: readonly string[], trials: readonly string[][]) => string;
};
export type Run = { phones: string[][]; manager: string[]; mails: string[]; proctor: string[]; codes: string[][] };

/** What every listener says of their own, for nobody to read before closing. */
export const secretRemark = 'The bass was drier.';

// Commitments, and the digests chained from them, are random by design.
const withoutDigests = (text: string) => text.replace(/[0-9a-f]{64}/g, '#').replace(/urn:uuid:[0-9a-f-]{36}/g, 'urn');

/** The codes of the second specimens, exchanged: what was one cable's under a code is the other's. */
async function exchangeSleeves({ deps }: TestServer, studyId: string): Promise<void> {
  const key = await deps.db.manager.findOneByOrFail(CodeKey, { studyId });
  const rows: { code: string; cable: number }[] = JSON.parse(key.rows);
  const [one, other] = [0, 1].map((cable) => rows.filter((row) => row.cable === cable)[1]);
  if (one === undefined || other === undefined) throw new Error('no second specimens');
  [one.code, other.code] = [other.code, one.code];
  await deps.db.manager.update(CodeKey, { studyId }, { rows: JSON.stringify(rows) });
}

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

/** Goes through the sleeves: with another study's label, too early, and with all of them. */
async function takeInventory(desk: Console, codes: Iterable<string>): Promise<void> {
  const foreign = { kind: 'scan-label', text: 'FLBBBB9991', by: 'camera' };
  await expect(desk.act(foreign)).rejects.toThrow('not of this study');
  await expect(desk.act({ kind: 'end-inventory', reason: '' })).rejects.toThrow('Not found');
  for (const text of codes) await desk.act({ kind: 'scan-label', text, by: 'typed' });
  await desk.act({ kind: 'end-inventory', reason: '' });
}

/** One session with two phones from the sealed plan to its end, and every byte that left the server meanwhile. */
export async function blindRun(
  { study: change, ladder, choices }: Asked,
  { codeKey, drawSecret, isExchanged }: Seeds,
): Promise<Run> {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  const random = repeatableRandom({ 'code-key': codeKey, 'draw-secret': drawSecret });
  const server = await testServer({ clock, random });
  const people = await makeOrganisation(server, 'Harbour');
  const study = await readyStudy(
    server,
    people,
    { ...change, breaks: { trials: 4, leastMinutes: 1, blocksPerDay: 2 } },
    ladder,
  );
  if (isExchanged) await exchangeSleeves(server, study.studyId);
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
    if (desk.now.block?.break) {
      for (const phone of phones) await phone.sayFatigue(1, 'tired');
      clock.advance(60_000);
      await desk.sees('what was said', ({ block }) => block?.break?.said === phones.length);
      await desk.act({ kind: 'resume' });
    }
    await look();
  }
  if (desk.now.inventory !== null) await takeInventory(desk, fitted);
  await desk.act({ kind: 'finish' });
  for (const phone of phones) await phone.sees('the end', ({ phase }) => phase === 'finished');
  for (const phone of phones) await phone.sayAtExit({ wentBy: secretRemark, noticed: 'yes', what: secretRemark });
  await desk.sees('what was said', ({ exit }) => exit?.said === phones.length);
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
