import request from 'supertest';
import type { Role } from '#shared/contracts/endpoint.ts';
import type { StudyDraft } from '#shared/contracts/studies.ts';
import { Membership } from '../../server/features/organisations/membership.entity.ts';
import { Organisation } from '../../server/features/organisations/organisation.entity.ts';
import { hashPassword } from '../../server/features/users/passwords.ts';
import { User } from '../../server/features/users/user.entity.ts';
import { addLadder, type Ladder } from './check-cables.ts';
import type { TestServer } from './test-server.ts';

export const password = 'a-long-test-password';

let hash: Promise<string> | undefined;

/** The password is the same everywhere; one hash of it serves a whole file, at the cost that the program asks. */
function hashOnce(): Promise<string> {
  hash ??= hashPassword(password);
  return hash;
}

/** An organisation with one person per role and a code holder (a second reviewer). */
export async function makeOrganisation({ deps }: TestServer, name: string) {
  const { db, random, clock } = deps;
  const createdAt = new Date(clock.now());
  const passwordHash = await hashOnce();
  const organisationId = random.id();
  await db.manager.insert(Organisation, { id: organisationId, name, demo: false, createdAt });
  const add = async (key: string, role: Role) => {
    const id = random.id();
    const email = `${key}@${name.toLowerCase()}.example`;
    await db.manager.insert(User, { id, email, name: `${key} of ${name}`, passwordHash, createdAt });
    await db.manager.insert(Membership, { organisationId, userId: id, role });
    return { id, email };
  };
  return {
    organisationId,
    owner: await add('owner', 'owner'),
    manager: await add('manager', 'manager'),
    proctor: await add('proctor', 'proctor'),
    reviewer: await add('reviewer', 'reviewer'),
    codeHolder: await add('codes', 'reviewer'),
  };
}
export type TestOrganisation = Awaited<ReturnType<typeof makeOrganisation>>;

/** A signed-in browser of supertest. */
export async function signedIn({ address }: TestServer, email: string) {
  const agent = request.agent(address);
  await agent.post('/api/sign-in').send({ email, password }).expect(200);
  return agent;
}
export type Agent = Awaited<ReturnType<typeof signedIn>>;

export const plainStudy: Omit<StudyDraft, 'cables' | 'codeHolderId'> = {
  title: 'Study Plover',
  question: 'Can these listeners tell the two cables apart?',
  method: 'abx',
  sessions: 1,
  listenersPerSession: 3,
  trials: 5,
  spares: 2,
  alphaPerMille: 50,
  programme: [
    { title: 'Piano', lengthS: 2, start: '0:10' },
    { title: 'Noise', lengthS: 3, start: '' },
  ],
  rig: 'loudspeaker',
  chain: 'Player, amplifier, loudspeakers',
  changeS: 3,
  answerS: 20,
  confidence: false,
};

/** Stands in the construction of every cable of a study, so that a test can look for it where it must not be. */
export const secretTreatment = 'cooled in the northern shed';

/** Two cables, a sealed study with confirmed codes, and one planned session: all over the API, as people do it. */
export async function readyStudy(
  server: TestServer,
  people: TestOrganisation,
  change: Partial<StudyDraft> = {},
  ladder?: Ladder,
) {
  const base = `/api/organisations/${people.organisationId}`;
  const manager = await signedIn(server, people.manager.email);
  const holder = await signedIn(server, people.codeHolder.email);
  const cables: StudyDraft['cables'][number][] = [];
  for (const name of ['Northern run', 'Southern run']) {
    const cable = await manager
      .post(`${base}/cables`)
      .send({
        name,
        kind: 'loudspeaker',
        lengthMm: 3000,
        description: '',
        construction: { treatments: secretTreatment },
      })
      .expect(200);
    const specimenIds: string[] = [];
    for (const number of change.separateSpecimens ? [1, 2] : [1]) {
      const full = await manager
        .post(`${base}/cables/${cable.body.id}/specimens`)
        .send({ serial: `${name[0]}-${number}`, note: '' })
        .expect(200);
      specimenIds.splice(0, specimenIds.length, ...full.body.specimens.map(({ id }: { id: string }) => id));
    }
    cables.push({ cableId: cable.body.id, specimenIds });
  }
  const checks = ladder && (await addLadder(manager, base, ladder));
  const draft = { ...plainStudy, cables, codeHolderId: people.codeHolder.id, ...(checks && { checks }), ...change };
  const study = await manager.post(`${base}/studies`).send(draft).expect(200);
  const at = `${base}/studies/${study.body.id}`;
  await manager.post(`${at}/seal`).send({}).expect(200);
  await holder.post(`${at}/codes/draw`).send({}).expect(200);
  await holder.post(`${at}/codes/confirm`).send({}).expect(200);
  const session = await manager
    .post(`${at}/sessions`)
    .send({ plannedAt: '2026-12-05T18:00:00.000Z', room: 'Room B', proctorId: people.proctor.id })
    .expect(200);
  return { base, at, studyId: study.body.id as string, sessionId: session.body.id as string, manager, holder };
}
