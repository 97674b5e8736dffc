import type { StudyDraft } from '#shared/contracts/studies.ts';
import type { LevelCheckName } from '#shared/levels/measured-levels.ts';
import { withTransaction } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import { addSpecimen, createCable, getCable } from '../features/cables/cables.service.ts';
import { addMeasurement } from '../features/measurements/measurements.service.ts';
import { Membership } from '../features/organisations/membership.entity.ts';
import { Organisation } from '../features/organisations/organisation.entity.ts';
import { createPreset } from '../features/rig-presets/rig-presets.service.ts';
import { planSession } from '../features/sessions/sessions.service.ts';
import { closeStudy } from '../features/studies/closing.service.ts';
import { createStudy } from '../features/studies/studies.service.ts';
import { studiesOf } from '../features/studies/studies.store.ts';
import { hashPassword } from '../features/users/passwords.ts';
import { User } from '../features/users/user.entity.ts';
import type { Caller } from '../http/access.ts';
import { Sittings } from '../live/sittings.ts';
import { demoMeasurements } from './demo-measurements.ts';
import { demoPeople } from './demo-people.ts';
import {
  benchPreset,
  closedPreference,
  closedStudy,
  closedWithout,
  collectingStudy,
  demoCables,
  demoOrganisation,
  draftStudy,
  knownDifferences,
  publishedStudy,
  studyToRun,
} from './demo-scenario.ts';
import { forgetDemo } from './forget-demo.ts';
import { HandClock } from './hand-clock.ts';
import { inviteDemoListeners } from './invite-listeners.ts';
import { measureLevels } from './measure-levels.ts';
import { demoTimeZone, type People, prepareStudy } from './prepare-study.ts';
import { runPublishedStudy } from './published-study.ts';
import { type Hearing, SimulatedSession } from './simulated-session.ts';

const dayMs = 24 * 3_600_000;

async function makePeople(deps: Deps, organisationId: string): Promise<People> {
  const createdAt = new Date(deps.clock.now());
  const made = await Promise.all(
    demoPeople.map(async (person) => ({ ...person, id: deps.random.id(), hash: await hashPassword(person.password) })),
  );
  await withTransaction(deps.db, async (tx) => {
    await tx.insert(Organisation, { id: organisationId, name: demoOrganisation, demo: true, createdAt });
    for (const { id, email, name, hash, role } of made) {
      await tx.insert(User, { id, email, name, passwordHash: hash, createdAt });
      await tx.insert(Membership, { organisationId, userId: id, role });
    }
  });
  return Object.fromEntries(made.map(({ key, id }) => [key, id])) as People;
}

type Chosen = StudyDraft['cables'][number];
type DemoCables = { readonly cables: StudyDraft['cables']; readonly checks: [Chosen, Chosen] };

async function makeCables(deps: Deps, organisationId: string, userId: string): Promise<DemoCables> {
  const who: Caller = { organisationId, userId, role: 'manager' };
  const chosen = new Map<string, Chosen>();
  for (const { key, draft, serials } of demoCables) {
    const { id } = await createCable(deps, who, draft);
    for (const serial of serials) await addSpecimen(deps, who, id, { serial, note: '' });
    const { specimens } = await getCable(deps, who, id);
    for (const [index, specimen] of specimens.entries())
      for (const measured of demoMeasurements(draft, 0.012 + 0.009 * index))
        await addMeasurement(deps, who, { id, specimenId: specimen.id }, { draft: measured, upload: null });
    chosen.set(key, { cableId: id, specimenIds: specimens.map((specimen) => specimen.id) });
  }
  const of = (key: (typeof demoCables)[number]['key']): Chosen => {
    const found = chosen.get(key);
    if (found === undefined) throw new Error(`the demo has no ${key} cable`);
    return found;
  };
  return { cables: [of('thin'), of('thick')], checks: [of('check'), of('small-check')] };
}

const other = (answer: string) => (answer === 'A' ? 'B' : 'A');

/** Who is right when, seat by seat over the trials opened, in an order as irregular as that of people. */
const course =
  (seats: readonly string[]): Hearing =>
  ([a, , x], seat, trial) => {
    const right = x === a ? 'A' : 'B';
    const mark = seats[seat]?.[trial - 1];
    if (mark === '.') return null;
    return mark === '+' ? right : other(right);
  };

/** They hear the difference in most trials; one answer stays out. */
const hearing = course(['++-+++++-++++-+++', '+++-+++-++.+++-++', '-++++-++++-+++++-']);

/** They are right every other time or so. */
const notHearing = course(['+-++-++--+-++--+-', '-++-+--++--+-+--+', '++-+-+-+-+--++--+']);

/** They hear a known difference, nearly always; among the other trials they go by a course of their own. */
function hearingKnown(checkCodes: readonly string[], among: Hearing): Hearing {
  const others: number[] = [];
  return (codes, seat, trial) => {
    const isKnown = codes.some((code) => checkCodes.includes(code));
    if (isKnown) {
      const right = codes[2] === codes[0] ? 'A' : 'B';
      return seat === 2 && trial % 5 === 0 ? other(right) : right;
    }
    if (checkCodes.length > 0 && new Set(codes).size === 1) return trial % 2 === 0 ? 'A' : 'B';
    if (!others.includes(trial)) others.push(trial);
    return among(codes, seat, checkCodes.length === 0 ? trial : others.indexOf(trial) + 1);
  };
}

/** Simulated listeners in a pair: one leans to one code, one hardly does, and one often has no preference. */
const preference: Hearing = ([one = '', other = ''], seat, trial) => {
  if (seat === 0 && trial === 4) return null;
  if (Math.random() < ([0.05, 0.15, 0.5][seat] ?? 0)) return 'none';
  const leans = Math.random() < ([0.9, 0.65, 0.6][seat] ?? 0.5);
  return leans === one < other ? 'first' : 'second';
};

/** Measures the levels that are due. */
type Measure = (sittings: Sittings, check: LevelCheckName) => Promise<void>;

/** Runs the session that is planned, with a void in it, to its end. */
async function runSession(
  deps: Deps,
  clock: HandClock,
  sessionId: string,
  hears: Hearing,
  measure: Measure = async () => {},
): Promise<void> {
  clock.advance(3_600_000);
  const sittings = new Sittings(deps);
  const session = await SimulatedSession.open(deps, clock, sittings, sessionId);
  const measureIfDue = async () => {
    if (session.levelsDue !== null) await measure(sittings, session.levelsDue);
  };
  await measureIfDue();
  await session.seat(['Sofa, left', 'Sofa, right', 'Armchair']);
  await session.familiarise();
  let trial = 0;
  while (session.trialsLeft) {
    trial += 1;
    await measureIfDue();
    const fault = trial === 6 ? { reason: 'noise' as const, note: 'A door slammed while it played.' } : undefined;
    await session.trial(hears, fault);
  }
  await session.finish();
  await measureIfDue();
  await sittings.stop();
  clock.advance(900_000);
}

async function runClosedStudy(
  deps: Deps,
  clock: HandClock,
  organisationId: string,
  people: People,
  draft: StudyDraft,
  hears: Hearing,
) {
  const { where, sessionId, checkCodes } = await prepareStudy(deps, organisationId, people, draft);
  const at = { organisationId, studyId: where.id, sessionId };
  await runSession(deps, clock, sessionId, hearingKnown(checkCodes, hears), (sittings, check) =>
    measureLevels(deps, sittings, at, people.codeHolder, check),
  );
  await closeStudy(deps, where, people.manager, '');
}

/** A study between its two sessions. */
async function runFirstSession(
  deps: Deps,
  clock: HandClock,
  organisationId: string,
  people: People,
  draft: StudyDraft,
) {
  const { where, sessionId } = await prepareStudy(deps, organisationId, people, draft);
  await runSession(deps, clock, sessionId, hearing);
  const plannedAt = new Date(clock.now() + 7 * dayMs).toISOString();
  const room = 'Listening room';
  await planSession(deps, where, { plannedAt, timeZone: demoTimeZone, room, proctorId: people.proctor });
}

/**
 * Makes the demo once: an organisation, its people and cables, and a study in each state, all through the program's own
 * services, so that their records verify. The one to run is made last: a demo without it was cut short, and is made anew.
 */
export async function loadDemo(deps: Deps): Promise<void> {
  const existing = await deps.db.manager.findOneBy(Organisation, { demo: true });
  if (existing !== null) {
    const studies = await studiesOf(deps.db.manager, existing.id);
    if (studies.some(({ title }) => title === studyToRun.title)) return;
    await forgetDemo(deps, existing.id);
  }
  const clock = new HandClock(deps.clock.now() - 9 * dayMs);
  const past: Deps = { ...deps, clock };
  const organisationId = deps.random.id();
  const people = await makePeople(past, organisationId);
  const { cables, checks } = await makeCables(past, organisationId, people.manager);
  const codeHolderId = people.codeHolder;
  await createPreset(past, organisationId, benchPreset);
  await runPublishedStudy(past, clock, organisationId, people, { ...publishedStudy, cables, codeHolderId });
  clock.advance(deps.clock.now() - 3 * dayMs - clock.now());
  const of = (free: Omit<StudyDraft, 'cables' | 'codeHolderId'>): StudyDraft => ({ ...free, cables, codeHolderId });
  await runClosedStudy(past, clock, organisationId, people, of(closedStudy), hearing);
  const withChecks = { ...of(closedWithout), checks: knownDifferences(...checks) };
  await runClosedStudy(past, clock, organisationId, people, withChecks, notHearing);
  await runClosedStudy(past, clock, organisationId, people, of(closedPreference), preference);
  await runFirstSession(past, clock, organisationId, people, of(collectingStudy));
  await createStudy(past, organisationId, people.manager, of(draftStudy));
  const toRun = await prepareStudy(deps, organisationId, people, of(studyToRun));
  await inviteDemoListeners(deps, { organisationId, userId: people.manager }, toRun.sessionId);
}
