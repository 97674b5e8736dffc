import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { LevelsDraft } from '#shared/contracts/levels.ts';
import type { StudyDraft } from '#shared/contracts/studies.ts';
import type { MeasuredLevels } from '#shared/levels/measured-levels.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { measured, registered } from '../support/levels.ts';
import { Console, Phone } from '../support/live.ts';
import { type Agent, makeOrganisation, readyStudy, signedIn } from '../support/people.ts';
import { repeatableRandom } from '../support/random.ts';
import { begin, presentTrial } from '../support/run-session.ts';
import { testServer } from '../support/test-server.ts';

const draftOf = (taken: MeasuredLevels, change: Partial<LevelsDraft> = {}): LevelsDraft => ({
  ...taken,
  asProctor: false,
  answered: [],
  ...change,
});

/** The second code above the first by so many thousandths of a decibel. */
const apart = (codes: readonly string[], milliDb: number, check: MeasuredLevels['check'] = 'before') =>
  measured(Object.fromEntries(codes.map((code, index) => [code, [0, index * milliDb] as const])), {
    check,
    unit: 'dBV',
  });

async function levelledStudy(levels: StudyDraft['levels'], seed: string) {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  const server = await testServer({ clock, random: repeatableRandom({ 'code-key': seed, 'draw-secret': seed }) });
  const people = await makeOrganisation(server, 'Harbour');
  const study = await readyStudy(server, people, { listenersPerSession: 1, levels });
  const at = `${study.base}/sessions/${study.sessionId}/levels`;
  const codes: string[] = (await study.holder.get(at).expect(200)).body.codes;
  return { clock, server, people, study, at, codes };
}
type Levelled = Awaited<ReturnType<typeof levelledStudy>>;

describe('levels of a session', () => {
  let all: Levelled;
  let proctor: Agent;
  let desk: Console;
  beforeAll(async () => {
    all = await levelledStudy(registered(), 'gate');
    proctor = await signedIn(all.server, all.people.proctor.email);
    desk = await Console.open(all.server.address, all.people.proctor.email, all.study.sessionId);
  });
  afterAll(async () => {
    desk.close();
    await all.server.stop();
  });

  it('are measured by the code holder, whom nobody else replaces unasked [S66]', async () => {
    const { study, at, people, codes } = all;
    expect(codes).toHaveLength(2);
    const forManager = await study.manager.get(at).expect(200);
    expect(forManager.body).toMatchObject({ duty: 'manager', codes: [], measurer: { id: people.codeHolder.id } });
    await study.manager
      .post(at)
      .send(draftOf(apart(codes, 0)))
      .expect(403);
    const reviewer = await signedIn(all.server, people.reviewer.email);
    await reviewer.get(at).expect(404);
    const proctors = await proctor.get(at).expect(200);
    expect(proctors.body).toMatchObject({ duty: 'proctor', codes: [], due: 'before' });
    const refused = await study.manager.put(`${at}/measurer`).send({ userId: people.proctor.id }).expect(400);
    expect(refused.body.errors[0]).toMatchObject({ pointer: '/userId' });
  });

  it('name every fault at its line, and ask before they take what is rarely so [S61]', async () => {
    const { study, at, codes } = all;
    const whole = apart(codes, 20);
    const short = await study.holder.post(at).send(draftOf({ ...whole, rows: whole.rows.slice(0, 3) }));
    expect([short.status, short.body.errors]).toEqual([
      400,
      [{ pointer: '/rows', detail: `${codes[1]}, right, 1 kHz is missing.` }],
    ]);
    const strange = whole.rows.map((row, index) => (index === 1 ? { ...row, code: '000' } : row));
    const unknown = await study.holder.post(at).send(draftOf({ ...whole, rows: strange }));
    expect(unknown.body.errors[0]).toEqual({ pointer: '/rows/1', detail: '000 is no blind code of this study.' });
    const asked = await study.holder.post(at).send(draftOf(apart(codes, 5000)));
    expect([asked.status, asked.body.errors[0].pointer]).toEqual([400, '/answered/large']);
    expect((await study.holder.get(at)).body.taken).toEqual([]);
  });

  it('keep a level-compensated session from opening until they are within 0.2 dB [S64]', async () => {
    const { study, at, codes } = all;
    await desk.act({ kind: 'confirm-cautions', items: ['amplifier', 'shorts', 'mains', 'hearing', 'local-rules'] });
    const open = () => desk.send({ kind: 'open-seating', expectVersion: desk.now.version });
    expect(await open()).toMatchObject({ ok: false, problem: { detail: expect.stringContaining('not measured yet') } });
    await study.holder
      .post(at)
      .send(draftOf(apart(codes, 250)))
      .expect(200);
    await desk.sees('the levels out', ({ levels }) => levels?.checks.at(-1)?.isIn === false);
    expect(await open()).toMatchObject({ ok: false, problem: { detail: expect.stringContaining('0.2 dB') } });
    const own = await study.holder
      .post(at)
      .send(draftOf(apart(codes, 40)))
      .expect(200);
    expect(own.body.taken.map(({ isIn }: { isIn: boolean }) => isIn)).toEqual([false, true]);
    expect(own.body.taken[1].measured.rows).toHaveLength(4);
    await desk.sees('the levels in', ({ levels }) => levels?.checks.at(-1)?.isIn === true && levels.bar === null);
    expect(await open()).toMatchObject({ ok: true });
    expect((await proctor.get(at)).body.taken.map(({ measured: figures }: { measured: unknown }) => figures)).toEqual([
      null,
      null,
    ]);
  });

  it('are taken by the proctor alone only once that is confirmed [S67]', async () => {
    const { at, codes } = all;
    const refused = await proctor.post(at).send(draftOf(apart(codes, 10)));
    expect([refused.status, refused.body.errors[0].pointer]).toEqual([400, '/asProctor']);
    const alone = await proctor.get(`${at}?asProctor=yes`).expect(200);
    expect(alone.body.codes).toEqual(codes);
    const taken = await proctor
      .post(at)
      .send(draftOf(apart(codes, 10), { asProctor: true }))
      .expect(200);
    expect(taken.body.taken[2].measured).not.toBeNull();
    expect(taken.body.taken.slice(0, 2).map(({ measured: m }: { measured: unknown }) => m)).toEqual([null, null]);
  });

  it('and the sound level, with what it uses of the proctor’s week, are told to proctor and manager alone [S71]', async () => {
    const { study, people } = all;
    const at = `${study.base}/sessions/${study.sessionId}/exposure`;
    expect((await proctor.get(at).expect(200)).body).toMatchObject({ session: null, week: { sessions: 0 } });
    const sound = { tenthsDba: 780, response: 'leq', instrument: 'Class 2 meter', place: 'Sofa', reason: '' };
    await desk.act({ kind: 'record-sound-level', ...sound });
    await desk.sees('the sound level', (view) => view.sound?.advice === 'recommended');
    const { session, week } = (await study.manager.get(at).expect(200)).body;
    // Five trials of three presentations and a familiarisation of two, 3 s each, against 40 h at 80 dBA.
    expect(session).toMatchObject({ tenthsDba: 780, isPlanned: true, minutes: (17 * 3) / 60 });
    expect(session.ofWeek).toBeCloseTo((10 ** -0.2 * 17 * 3) / 3600 / 40, 9);
    expect(week).toMatchObject({ sessions: 1, unrecorded: 0, ofWeek: session.ofWeek });
    const holder = await signedIn(all.server, people.codeHolder.email);
    await holder.get(at).expect(403);
  });
});

describe('whatever the levels are', () => {
  type Seen = Record<'phone' | 'proctor' | 'manager', string[]>;
  const withoutDigests = (text: string) => text.replace(/[0-9a-f]{64}/g, '#').replace(/urn:uuid:[0-9a-f-]{36}/g, 'urn');

  async function run(seed: string, milliDb: number): Promise<Seen> {
    const { clock, server, people, study, at, codes } = await levelledStudy(
      registered({ handling: 'as-supplied' }),
      seed,
    );
    const manager: string[] = [];
    const proctor = await signedIn(server, people.proctor.email);
    const proctorPages: string[] = [];
    const look = async () => {
      for (const path of [at, study.at, `${study.base}/sessions`, `${study.base}/waiting`, `${study.at}/codes`])
        manager.push((await study.manager.get(path)).text);
      proctorPages.push((await proctor.get(at)).text);
    };
    await look();
    await study.holder
      .post(at)
      .send(draftOf(apart(codes, milliDb)))
      .expect(200);
    await look();
    const desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    const phone = await Phone.join(server.address, await desk.openSeating(), 'window seat');
    await begin(desk, [phone], clock);
    for (let trial = 1; trial <= 5; trial += 1) {
      if (trial === 4) {
        await study.holder
          .post(at)
          .send(draftOf(apart(codes, milliDb + 20, 'half-time')))
          .expect(200);
        await desk.sees('half time measured', ({ levels }) => levels?.checks.length === 2);
        await look();
      }
      await presentTrial(desk, clock);
      await phone.answer(trial, 'A');
      await desk.sees('all in', (view) => view.trial?.answered === 1);
      await desk.act({ kind: 'lock-trial' });
      if (trial === 3)
        expect(await desk.send({ kind: 'begin-trial', expectVersion: desk.now.version })).toMatchObject({
          ok: false,
          problem: { detail: expect.stringContaining('the levels are due') },
        });
    }
    await desk.act({ kind: 'finish' });
    await phone.sees('the end', ({ phase }) => phase === 'finished');
    await study.holder
      .post(at)
      .send(draftOf(apart(codes, milliDb, 'after')))
      .expect(200);
    await look();
    const seen = {
      phone: phone.received.map(withoutDigests),
      proctor: [...desk.received.map((text) => text.replace(/"code":"\d{3}"/g, '')), ...proctorPages].map(
        withoutDigests,
      ),
      manager: manager.map(withoutDigests),
    };
    desk.close();
    phone.close();
    await server.stop();
    return seen;
  }

  it('the same bytes reach listener, proctor and manager, but for in and out [S66]', async () => {
    const small = await run('one key', 10);
    expect(await run('one key', 70)).toEqual(small);
    expect(await run('another key', 30)).toEqual(small);
    const out = await run('one key', 700);
    const withoutIn = (texts: readonly string[]) => texts.map((text) => text.replace(/"isIn":(true|false)/g, ''));
    expect(out.phone).toEqual(small.phone);
    expect(withoutIn(out.proctor)).toEqual(withoutIn(small.proctor));
    expect(withoutIn(out.manager)).toEqual(withoutIn(small.manager));
    expect(out.proctor).not.toEqual(small.proctor);
  }, 120_000);
});
