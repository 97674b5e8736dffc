import sharp from 'sharp';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type Agent, makeOrganisation, signedIn, type TestOrganisation } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

describe('evidence for a statement', () => {
  let server: TestServer;
  let people: TestOrganisation;
  let manager: Agent;
  let at: string;

  beforeAll(async () => {
    server = await testServer();
    people = await makeOrganisation(server, 'Harbour');
    manager = await signedIn(server, people.manager.email);
    const base = `/api/organisations/${people.organisationId}/cables`;
    const plain = { name: 'Outer run', kind: 'loudspeaker', lengthMm: 5000, description: '' };
    at = `${base}/${(await manager.post(base).send(plain).expect(200)).body.id}/evidence`;
  });
  afterAll(() => server.stop());

  const answer = (bytes: Buffer, name: string) =>
    manager
      .post(at)
      .field('body', JSON.stringify({ rule: 'cold-treatment', note: 'Resistance before and after' }))
      .attach('file', bytes, name);

  it('is kept under its rule and given out to be saved [Q22]', async () => {
    const { body } = await answer(Buffer.from('before 41.3 after 41.3\n'), 'C:\\lab\\before & after.txt').expect(200);
    expect(body).toMatchObject({ rule: 'cold-treatment', file: { name: 'before _ after.txt' } });
    expect((await manager.get(at).expect(200)).body.evidence).toEqual([body]);
    const file = await manager.get(`${at}/${body.id}/file`).buffer().expect(200);
    expect([file.text, file.headers['x-content-type-options']]).toEqual(['before 41.3 after 41.3\n', 'nosniff']);
  });

  it('loses what a camera wrote into a picture [Q22]', async () => {
    const photo = await sharp({ create: { width: 40, height: 30, channels: 3, background: '#886644' } })
      .jpeg()
      .withExif({ IFD0: { Artist: 'Somebody at home', Software: 'Camera 9' } })
      .toBuffer();
    expect(photo.includes('Somebody at home')).toBe(true);
    const { body } = await answer(photo, 'photo.jpg').expect(200);
    const kept = (await manager.get(`${at}/${body.id}/file`).buffer().expect(200)).body as Buffer;
    expect(kept.includes('Somebody at home')).toBe(false);
    expect((await sharp(kept).metadata()).exif).toBeUndefined();
    expect(await sharp(kept).metadata()).toMatchObject({ width: 40, height: 30, format: 'jpeg' });
  });

  it('is refused where it is no text, PDF or picture, or a broken one, and needs a file [Q22]', async () => {
    const broken = Buffer.concat([Buffer.from([0xff, 0xd8, 0xff, 0xe0]), Buffer.alloc(40, 7)]);
    const wrong: [Buffer, string][] = [
      [Buffer.from([0x4d, 0x5a, 0, 3]), 'Send text, PDF, PNG, JPEG or WebP'],
      [Buffer.from('<svg onload="x()">'), 'Send text, PDF, PNG, JPEG or WebP'],
      [broken, 'This picture cannot be read; save it anew and send that'],
      [Buffer.alloc(0), 'This file is empty'],
    ];
    for (const [bytes, detail] of wrong)
      expect((await answer(bytes, 'report.pdf').expect(400)).body.errors).toEqual([{ pointer: '/file', detail }]);
    const none = await manager.post(at).send({ rule: 'cold-treatment', note: 'nothing' }).expect(400);
    expect(none.body.errors).toEqual([{ pointer: '/file', detail: 'Choose a file' }]);
  });
});
