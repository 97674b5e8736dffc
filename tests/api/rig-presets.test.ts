import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { KeptPreset } from '#shared/contracts/rig-presets.ts';
import type { RigPreset } from '#shared/protocol/rig-preset.ts';
import { shippedPresets } from '#shared/protocol/shipped-presets.ts';
import { Console } from '../support/live.ts';
import {
  type Agent,
  makeOrganisation,
  plainStudy,
  readyStudy,
  signedIn,
  type TestOrganisation,
} from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';

describe('rig presets', () => {
  let server: TestServer;
  let people: TestOrganisation;
  let manager: Agent;
  let at: string;

  beforeAll(async () => {
    server = await testServer();
    people = await makeOrganisation(server, 'Harbour');
    manager = await signedIn(server, people.manager.email);
    at = `/api/organisations/${people.organisationId}/rig-presets`;
  });
  afterAll(() => server.stop());

  const list = async (query = ''): Promise<KeptPreset[]> => (await manager.get(`${at}${query}`).expect(200)).body.rows;
  const short: RigPreset = { ...shippedPresets.loudspeaker, name: 'Bench', levelsAt: 'At the dummy load.' };

  it('are three from the start, however many ask at once [S21]', async () => {
    await Promise.all([list(), list(), manager.get(`${at}/choices`)]);
    expect((await list()).map(({ preset }) => preset)).toEqual([
      shippedPresets.headphone,
      shippedPresets.line,
      shippedPresets.loudspeaker,
    ]);
  });

  it('are changed, copied, searched and archived [S21]', async () => {
    const [headphones] = await list('?q=headph');
    const changed = { ...shippedPresets.headphone, name: 'Headphones, booth 2' };
    await manager.put(`${at}/${headphones?.id}`).send(changed).expect(200);
    const copy = await manager.post(at).send(short).expect(200);
    expect((await list()).map(({ preset }) => preset.name)).toEqual([
      'Bench',
      'Headphones, booth 2',
      'Line level',
      'Loudspeakers',
    ]);
    await manager.put(`${at}/${copy.body.id}/archived`).send({ archived: true }).expect(200);
    expect((await list('?q=bench')).length).toBe(0);
    expect((await list('?q=bench&archived=yes')).length).toBe(1);
    const { presets } = (await manager.get(`${at}/choices`).expect(200)).body;
    expect(presets.map(({ preset }: KeptPreset) => preset.name)).not.toContain('Bench');
  });

  it('say at the field what is wrong with their steps [S20]', async () => {
    const steps = short.steps.filter(({ kind }) => kind !== 'unplug');
    const refused = await manager
      .post(at)
      .send({ ...short, steps })
      .expect(400);
    expect(refused.body.errors).toEqual([{ pointer: '/steps', detail: expect.stringContaining('Unplugging') }]);
  });

  it('of another organisation are as absent ones [A2]', async () => {
    const others = await makeOrganisation(server, 'Elsewhere');
    const stranger = await signedIn(server, others.manager.email);
    const [own] = await list();
    await stranger.get(`/api/organisations/${others.organisationId}/rig-presets/${own?.id}`).expect(404);
  });

  it('refuse a change that is shorter than the waits of their steps [S23]', async () => {
    const cables = [0, 1].map(() => ({ cableId: crypto.randomUUID(), specimenIds: [crypto.randomUUID()] }));
    const draft = { ...plainStudy, cables, codeHolderId: people.codeHolder.id, rigPreset: short, changeS: 7 };
    const refused = await manager.post(`/api/organisations/${people.organisationId}/studies`).send(draft).expect(400);
    expect(refused.body.errors).toContainEqual({ pointer: '/changeS', detail: expect.stringContaining('8 s') });
  });

  it('are frozen into the protocol and the session’s plan, whatever becomes of them [S21]', async () => {
    const kept = await manager
      .post(at)
      .send({ ...short, name: 'Attic', cautions: ['amplifier'] })
      .expect(200);
    const study = await readyStudy(server, people, { rigPreset: kept.body.preset, changeS: 9 });
    await manager
      .put(`${at}/${kept.body.id}`)
      .send({ ...short, name: 'Cellar' })
      .expect(200);
    await manager.put(`${at}/${kept.body.id}/archived`).send({ archived: true }).expect(200);
    const desk = await Console.open(server.address, people.proctor.email, study.sessionId);
    expect(desk.now.steps.map(({ kind, leastS }) => `${kind} ${leastS}`)).toEqual([
      'mute 0',
      'unplug 0',
      'fit 0',
      'scan 0',
      'check 0',
      'unmute 0',
      'settle 8',
    ]);
    expect(desk.now.cautions).toEqual(['amplifier']);
    desk.close();
    const { draft } = (await study.manager.get(study.at).expect(200)).body;
    expect(draft.rigPreset.name).toBe('Attic');
  });
});
