import { expect, type Page } from '@playwright/test';
import type { StudyDraft } from '#shared/contracts/studies.ts';

// A study ready for its session, made over the API by the people who would make it: for journeys about what comes after.
// Planning, sealing and coding by hand are walked through in journey.spec.ts.

type Named = { id: string; name: string };

const plain: Omit<StudyDraft, 'cables' | 'codeHolderId'> = {
  title: 'Study Dunlin',
  question: 'Can these listeners tell the two cables apart?',
  method: 'abx',
  sessions: 1,
  listenersPerSession: 1,
  trials: 5,
  spares: 2,
  alphaPerMille: 50,
  programme: [{ title: 'Piano', lengthS: 2, start: '' }],
  rig: 'loudspeaker',
  chain: 'Player, amplifier, loudspeakers',
  changeS: 3,
  answerS: 60,
  confidence: true,
};

/** The API of the organisation whose page is open, as this person may use it. */
function apiOf(page: Page) {
  const { origin, pathname } = new URL(page.url());
  const base = `${origin}/api/organisations/${/organisations\/([^/]+)/.exec(pathname)?.[1] ?? ''}`;
  return async (method: 'get' | 'post', path: string, data?: object) => {
    const reply = await page.request[method](`${base}${path}`, { data });
    expect(reply.ok(), `${method} ${path}: ${await reply.text()}`).toBe(true);
    return reply.json();
  };
}

/** A known difference with a check cable of its own. */
export async function checkStep(
  manager: Page,
  { milliDb, trials }: { milliDb: number; trials: number },
): Promise<NonNullable<StudyDraft['checks']>['steps'][number]> {
  const ask = apiOf(manager);
  const name = `Series resistor, ${milliDb / 1000} dB`;
  const { id }: Named = await ask('post', '/cables', { name, kind: 'check', lengthMm: 3000, description: '' });
  const { specimens } = await ask('post', `/cables/${id}/specimens`, { serial: `R-${milliDb}`, note: '' });
  return { milliDb, trials, cableId: id, specimenIds: [specimens[0].id] };
}

/**
 * Plans a study of the demo's cables "0.5 twin" and "4.0 twin", seals it, codes its specimens and plans its session.
 * Returns the address of the study's page.
 */
export async function readyStudy(manager: Page, holder: Page, change: Partial<StudyDraft> = {}): Promise<string> {
  const asManager = apiOf(manager);
  const asHolder = apiOf(holder);
  const { members }: { members: Named[] } = await asManager('get', '/members');
  const idOf = (name: string) => members.find((member) => member.name === name)?.id ?? '';
  const cables: StudyDraft['cables'][number][] = [];
  for (const [name, serial] of [
    ['0.5 twin', 'ST-0412'],
    ['4.0 twin', 'SF-0077'],
  ] as const) {
    const { rows }: { rows: Named[] } = await asManager('get', `/cables?q=${encodeURIComponent(name)}`);
    // A description may name the other cable, and a check cable is named after the one that it is made of.
    const cableId = rows.find((row) => row.name.endsWith(name))?.id ?? '';
    const { specimens }: { specimens: { id: string; serial: string }[] } = await asManager('get', `/cables/${cableId}`);
    cables.push({
      cableId,
      specimenIds: specimens.filter((one) => change.separateSpecimens || one.serial === serial).map(({ id }) => id),
    });
  }
  const [first, second] = cables;
  if (first === undefined || second === undefined) throw new Error('the demo has no such cables');
  const draft: StudyDraft = { ...plain, cables: [first, second], codeHolderId: idOf('Ines Halloran'), ...change };
  const { id }: Named = await asManager('post', '/studies', draft);
  await asManager('post', `/studies/${id}/seal`, {});
  await asHolder('post', `/studies/${id}/codes/draw`, {});
  await asHolder('post', `/studies/${id}/codes/confirm`, {});
  const session = { plannedAt: '2027-01-15T18:30:00.000Z', room: 'Room B', proctorId: idOf('Tomas Brandt') };
  await asManager('post', `/studies/${id}/sessions`, session);
  return manager.url().replace(/(organisations\/[^/]+).*/, `$1/studies/${id}`);
}
