import jsQR from 'jsqr';
import sharp from 'sharp';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { codeSheet } from '#shared/contracts/codes.ts';
import type { Report } from '#shared/contracts/reports.ts';
import { shippedPresets } from '#shared/protocol/shipped-presets.ts';
import { labelText, studyMark } from '#shared/session/label-text.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, readyStudy, type TestOrganisation } from '../support/people.ts';
import { begin, presentTrial, type Scan } from '../support/run-session.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

describe('a session whose labels are scanned', () => {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  let server: TestServer;
  let people: TestOrganisation;
  let study: Awaited<ReturnType<typeof readyStudy>>;
  let desk: Console;
  let phone: Phone;
  let codes: string[];

  const scanLabel = (text: string) => desk.act({ kind: 'scan-label', text, by: 'scanner' });
  const bothEnds: Scan = async (_, code) => {
    for (const end of [2, 1] as const) await scanLabel(labelText(studyMark(study.studyId), code, end));
  };

  beforeAll(async () => {
    server = await testServer({ clock });
    people = await makeOrganisation(server, 'Harbour');
    const rigPreset = shippedPresets.loudspeaker;
    study = await readyStudy(server, people, { rigPreset, changeS: 30, trials: 5, spares: 0, listenersPerSession: 1 });
    const sheet = codeSheet.parse((await study.holder.post(`${study.at}/codes/open`).send({ purpose: 'check' })).body);
    codes = sheet.rows.map(({ code }) => code).sort();
    desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    const code = await desk.openSeating();
    phone = await Phone.join(server.address, code, 'sofa');
    await begin(desk, [phone], clock, bothEnds);
  });
  afterAll(async () => {
    for (const page of [desk, phone]) page.close();
    await server.stop();
  });

  it('has a label for either end of every specimen that reads as its code [S25]', async () => {
    const reply = await study.holder.post(`${study.at}/codes/open`).send({ purpose: 'check' }).expect(200);
    const { rows, mark } = codeSheet.parse(reply.body);
    expect(mark).toBe(studyMark(study.studyId));
    for (const { code, labels } of rows)
      expect(labels.map(({ scanText }) => scanText)).toEqual([labelText(mark, code, 1), labelText(mark, code, 2)]);
    // What a camera makes of the printed picture.
    for (const { scanText, qrSvg } of rows.flatMap(({ labels }) => labels)) {
      const { data, info } = await sharp(Buffer.from(qrSvg), { density: 400 })
        .ensureAlpha()
        .raw()
        .toBuffer({ resolveWithObject: true });
      expect(jsQR(new Uint8ClampedArray(data), info.width, info.height)?.data).toBe(scanText);
    }
  });

  it('refuses the other cable and another study’s label by name, and the record holds both [S27]', async () => {
    const wanted = () => desk.now.trial?.code ?? '';
    await desk.act({ kind: 'begin-trial' });
    for (const step of ['mute', 'unplug', 'fit']) await desk.act({ kind: 'confirm-step', step });
    const other = codes.find((code) => code !== wanted()) ?? '';
    await expect(scanLabel(other)).rejects.toThrow(`${other} is in hand, and ${wanted()} is wanted`);
    const second = await readyStudy(server, people, { title: 'Study Godwit' });
    const foreign = labelText(studyMark(second.studyId), wanted(), 1);
    await expect(scanLabel(foreign)).rejects.toThrow('is of Study Godwit');
    await expect(scanLabel('Godwit')).rejects.toThrow('no label');
    await desk.sees('two wrong ones', ({ scans }) => scans.wrong === 2);
    expect(desk.now.trial?.step).toBe('scan');
    await bothEnds(desk, wanted());
    await desk.sees('the check', ({ trial }) => trial?.step === 'check');
    await desk.act({ kind: 'void-trial', reason: 'noise', note: '' });
  });

  it('takes a label that is scanned while the screen is a view behind [S26]', async () => {
    await desk.act({ kind: 'begin-trial' });
    for (const step of ['mute', 'unplug', 'fit']) await desk.act({ kind: 'confirm-step', step });
    const { version, trial } = desk.now;
    const scan = (end: 1 | 2) =>
      desk.send({
        kind: 'scan-label',
        expectVersion: version,
        text: labelText(studyMark(study.studyId), trial?.code ?? '', end),
        by: 'scanner',
      });
    expect(await Promise.all([scan(1), scan(2)])).toEqual([{ ok: true }, { ok: true }]);
    await desk.sees('the check', (view) => view.trial?.step === 'check');
    await desk.act({ kind: 'undo-step' });
    await desk.act({ kind: 'confirm-by-hand', reason: 'label torn' });
    await desk.act({ kind: 'void-trial', reason: 'noise', note: '' });
  });

  it('ends with an inventory that names what is missing, and the report tells what came of it all [S29] [S30] [S33]', async () => {
    await presentTrial(desk, clock, bothEnds);
    await phone.answer(3, 'A');
    await desk.sees('the answer', ({ trial }) => trial?.answered === 1);
    await desk.act({ kind: 'lock-trial' });
    for (let trial = 4; trial <= 5; trial += 1) {
      await desk.act({ kind: 'begin-trial' });
      await desk.act({ kind: 'void-trial', reason: 'noise', note: '' });
    }
    const early = await desk.send({ kind: 'finish', expectVersion: desk.now.version });
    expect(early).toMatchObject({ ok: false, problem: { type: 'urn:fairlead:problem:wrong-phase' } });
    const [first = '', second = ''] = codes;
    await scanLabel(labelText(studyMark(study.studyId), first, 2));
    const bare = await desk.send({ kind: 'end-inventory', reason: '', expectVersion: desk.now.version });
    expect(bare).toMatchObject({ ok: false, problem: { detail: expect.stringContaining(`Not found: ${second}`) } });
    await expect(scanLabel('999')).rejects.toThrow('none of this study’s codes');
    await desk.act({ kind: 'end-inventory', reason: 'left in the other room' });
    expect(desk.now.inventory).toEqual({
      of: 2,
      found: [{ code: first }],
      foreign: [{ code: '999' }],
      isEnded: true,
      missing: [{ code: second }],
    });
    await desk.act({ kind: 'finish' });
    await study.manager.post(`${study.at}/close`).send({ reason: 'Enough for a test.' }).expect(200);
    const report: Report = (await study.manager.get(`${study.at}/report`).expect(200)).body;
    expect(report.record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
    expect(report.sessions[0]?.handling).toEqual({
      scanned: 14,
      byHand: 1,
      wrong: 2,
      undone: 1,
      inventory: { codes: 2, missing: [second], foreign: ['999'], reason: 'left in the other room' },
    });
    expect(report.deviations.map(({ text }) => text)).toEqual([
      'The inventory was ended with 1 of 2 codes not found: left in the other room',
    ]);
  });
});
