import type { StudyDraft } from '#shared/contracts/studies.ts';
import type { Deps } from '../deps.ts';
import { confirmCodes, drawCodes, openCodes } from '../features/codes/codes.service.ts';
import { planSession } from '../features/sessions/sessions.service.ts';
import { sealStudy } from '../features/studies/sealing.service.ts';
import { createStudy } from '../features/studies/studies.service.ts';
import type { DemoPersonKey } from './demo-people.ts';

/** Where the demo's workshop stands. */
export const demoTimeZone = 'Europe/Lisbon';

export type People = Record<DemoPersonKey, string>;

/** Draft, seal, codes and one planned session: a study ready to run, and for its simulated listeners the check cables' codes. */
export async function prepareStudy(deps: Deps, organisationId: string, people: People, draft: StudyDraft) {
  const study = await createStudy(deps, organisationId, people.manager, draft);
  const where = { organisationId, id: study.id };
  await sealStudy(deps, where, people.manager);
  const holder = { userId: people.codeHolder, role: 'reviewer' };
  await drawCodes(deps, where, holder);
  const sheet = await openCodes(deps, where, holder, 'labels');
  await confirmCodes(deps, where, holder);
  const plannedAt = new Date(Math.ceil((deps.clock.now() + 3_600_000) / 900_000) * 900_000).toISOString();
  const session = await planSession(deps, where, {
    plannedAt,
    timeZone: demoTimeZone,
    room: 'Listening room',
    proctorId: people.proctor,
  });
  const questioned = new Set(study.cableNames);
  const checkCodes = sheet.rows.filter(({ cable }) => !questioned.has(cable)).map(({ code }) => code);
  return { where, sessionId: session.id, checkCodes };
}
