import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { MeasurementDraft } from '#shared/contracts/measurements.ts';
import { type Agent, makeOrganisation, readyStudy, signedIn, type TestOrganisation } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

const german = 'f/kHz;R/mΩ\n1;41,3\n20;45,6\n';
const draft: MeasurementDraft = {
  quantity: 'resistance',
  text: german,
  columns: { frequency: 0, value: 1, frequencyUnit: 'kHz', valueUnit: 'mΩ' },
  instrument: 'Bridge 2, four wires',
  person: 'Una',
  takenOn: '2026-11-02',
  temperatureC: 21.5,
  moment: 'as-is',
  note: '',
};

describe('measurements of a piece', () => {
  let server: TestServer;
  let people: TestOrganisation;
  let manager: Agent;
  let cable: { id: string; specimens: { id: string }[] };
  let at: string;
  let add: string;

  beforeAll(async () => {
    server = await testServer();
    people = await makeOrganisation(server, 'Harbour');
    manager = await signedIn(server, people.manager.email);
    const base = `/api/organisations/${people.organisationId}/cables`;
    const plain = { name: 'Outer run', kind: 'loudspeaker', lengthMm: 5000, description: '' };
    const made = (await manager.post(base).send(plain).expect(200)).body;
    cable = (await manager.post(`${base}/${made.id}/specimens`).send({ serial: 'O-1', note: '' }).expect(200)).body;
    at = `${base}/${cable.id}`;
    add = `${at}/specimens/${cable.specimens[0]?.id}/measurements`;
  });
  afterAll(() => server.stop());

  const withFile = (body: MeasurementDraft, bytes: Buffer, name: string) =>
    manager.post(add).field('body', JSON.stringify(body)).attach('file', bytes, name);

  it('are kept with their text, their values, and their file as it came [Q17]', async () => {
    const original = Buffer.from(german.replace('41,3', '4l,3'));
    const { body } = await withFile(draft, original, '../Messung 1.csv').expect(200);
    expect(body).toMatchObject({
      specimen: { serial: 'O-1' },
      text: german,
      points: [
        { frequency: 1000, value: 0.0413 },
        { frequency: 20_000, value: 0.0456 },
      ],
      temperatureC: 21.5,
      takenOn: '2026-11-02',
      struck: null,
      file: {
        name: 'Messung 1.csv',
        digest: createHash('sha256').update(original).digest('hex'),
        isCorrected: true,
      },
    });
    const file = await manager.get(`${at}/measurements/${body.id}/file`).buffer().expect(200);
    expect(file.text).toBe(original.toString());
    expect(file.headers['content-disposition']).toContain('attachment; filename="Messung 1.csv"');
    const typed = await manager.post(add).send(draft).expect(200);
    expect(typed.body.file).toBeNull();
    await manager.get(`${at}/measurements/${typed.body.id}/file`).expect(404);
    const same = await withFile(draft, Buffer.from(`\ufeff${german.replaceAll('\n', '\r\n')}`), 'same.csv').expect(200);
    expect(same.body.file.isCorrected).toBe(false);
  });

  it('with broken lines are refused line by line, and nothing is kept [Q16]', async () => {
    const before = (await manager.get(`${at}/measurements`).expect(200)).body.total;
    const text = `${german}50;4l\n60;\n`;
    const { body } = await manager
      .post(add)
      .send({ ...draft, text })
      .expect(400);
    expect(body.errors).toEqual([
      { pointer: '/text', detail: 'Line 4: “4l” is not a number' },
      { pointer: '/text', detail: 'Line 5: 2 values are needed here, and there is 1' },
    ]);
    expect((await manager.get(`${at}/measurements`).expect(200)).body.total).toBe(before);
  });

  it('come from tables alone: pictures, programs and empty files are refused in plain words [Q17]', async () => {
    const png = Buffer.concat([
      Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]),
      Buffer.from('tEXtGPS 51.5'),
    ]);
    const program = Buffer.concat([Buffer.from('MZ'), Buffer.from([0, 3, 0, 0]), Buffer.from('This program')]);
    const wrong: [string, Buffer, string][] = [
      ['photo.png', png, 'This is no text. Save the table as CSV and choose that file'],
      ['values.csv', program, 'This is no text. Save the table as CSV and choose that file'],
      ['values.csv', Buffer.from('#!/bin/sh\nrm -rf x'), 'This is no text. Save the table as CSV and choose that file'],
      [
        'page.csv',
        Buffer.from('<html><script>x</script>'),
        'This is no text. Save the table as CSV and choose that file',
      ],
      ['empty.csv', Buffer.alloc(0), 'This file is empty'],
    ];
    for (const [name, bytes, detail] of wrong) {
      const { body } = await withFile(draft, bytes, name).expect(400);
      expect(body.errors, name).toEqual([{ pointer: '/file', detail }]);
    }
    const large = await withFile(draft, Buffer.alloc(1_200_000, '1;2\n'), 'large.csv').expect(413);
    expect(large.body.detail).toBe('A file may have at most 1 MB. Nothing was kept.');
  });

  it('are struck out with a reason, once, stay in the list, and leave the curves [Q18]', async () => {
    const curvesNow = async () => (await manager.get(`${at}/curves`).expect(200)).body.curves;
    const wrong = (
      await manager
        .post(add)
        .send({ ...draft, takenOn: '2026-11-03' })
        .expect(200)
    ).body;
    expect(await curvesNow()).toMatchObject([{ id: wrong.id, quantity: 'resistance' }]);
    const strike = `${at}/measurements/${wrong.id}/strike`;
    await manager.post(strike).send({ reason: '' }).expect(400);
    const { body } = await manager.post(strike).send({ reason: 'Leads were not taken off' }).expect(200);
    expect(body).toMatchObject({ text: german, struck: { reason: 'Leads were not taken off' } });
    await manager.post(strike).send({ reason: 'again' }).expect(409);
    expect((await curvesNow()).map(({ id }: { id: string }) => id)).not.toContain(wrong.id);
    const { rows } = (await manager.get(`${at}/measurements?q=bridge&quantity=resistance`).expect(200)).body;
    expect(rows.find(({ id }: { id: string }) => id === wrong.id).struck.reason).toBe('Leads were not taken off');
  });

  it('and the pages of a cable are closed to the proctor of its study, whatever their role, until it is closed [Q19]', async () => {
    const study = await readyStudy(server, people, { sessions: 2 });
    const asProctor = await signedIn(server, people.owner.email);
    const chosen = (await study.manager.get(study.at).expect(200)).body.draft.cables[0];
    const pages = `${study.base}/cables/${chosen.cableId}`;
    const measured = (
      await study.manager.post(`${pages}/specimens/${chosen.specimenIds[0]}/measurements`).send(draft).expect(200)
    ).body;
    const all = ['', '/measurements', '/curves', `/measurements/${measured.id}`, `/measurements/${measured.id}/file`];
    for (const page of all.slice(0, 4)) await asProctor.get(`${pages}${page}`).expect(200);
    await study.manager
      .post(`${study.at}/sessions`)
      .send({ plannedAt: '2026-12-06T18:00:00.000Z', room: 'Room C', proctorId: people.owner.id })
      .expect(200);
    for (const page of all) {
      const { body } = await asProctor.get(`${pages}${page}`).expect(403);
      expect(body.detail).toContain('You run a session that compares this cable.');
    }
    const listed = (await asProctor.get(`${study.base}/cables`).expect(200)).body.rows as { id: string }[];
    expect(listed.map(({ id }) => id)).not.toContain(chosen.cableId);
    const choices = (await asProctor.get(`${study.base}/cables/choices`).expect(200)).body.cables as { id: string }[];
    expect(choices.map(({ id }) => id)).not.toContain(chosen.cableId);
    for (const page of all.slice(0, 4)) await study.manager.get(`${pages}${page}`).expect(200);
    for (const role of ['proctor', 'reviewer', 'codeHolder'] as const) {
      const agent = await signedIn(server, people[role].email);
      for (const page of all) await agent.get(`${pages}${page}`).expect(403);
    }
  });
});
