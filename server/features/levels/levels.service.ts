import type { LevelsDraft, LevelsPage } from '#shared/contracts/levels.ts';
import { isClosed } from '#shared/contracts/studies.ts';
import { judgeLevels } from '#shared/levels/compare-levels.ts';
import { levelFaults, levelQuestions } from '#shared/levels/level-faults.ts';
import { levelsInRecord, type RecordedLevels } from '#shared/levels/levels-in-record.ts';
import type { MeasuredLevels } from '#shared/levels/measured-levels.ts';
import { type InputFault, Problem } from '#shared/problem.ts';
import { codesToMeasure } from '../../blind/index.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { readSessionEntries } from '../../ledger/ledger.ts';
import type { Sittings } from '../../live/sittings.ts';
import type { Session } from '../sessions/session.entity.ts';
import { findSession, sessionsOfStudy } from '../sessions/sessions.store.ts';
import { studyById } from '../studies/studies.store.ts';
import type { Study } from '../studies/study.entity.ts';
import { membersOf, namesOf } from '../users/users.store.ts';
import * as store from './levels.store.ts';
import { levelsPageView } from './levels.views.ts';

type Who = { readonly organisationId: string; readonly userId: string; readonly role: string | null };

const noSuchSession = () => new Problem('not-found', 'There is no such session.');

/** Who measures: whoever a manager named, else the code holder, unless that is a proctor of the study. */
export async function measurerOf(tx: Tx, study: Study, session: Session): Promise<string | null> {
  const duty = await store.dutyOf(tx, session.id);
  if (duty !== null) return duty.userId;
  const sessions = await sessionsOfStudy(tx, study.id);
  return sessions.some(({ proctorId }) => proctorId === study.codeHolderId) ? null : study.codeHolderId;
}

function dutyIn(session: Session, measurer: string | null, who: Who): LevelsPage['duty'] {
  if (measurer === who.userId) return 'measurer';
  if (session.proctorId === who.userId) return 'proctor';
  if (who.role === 'owner' || who.role === 'manager') return 'manager';
  throw noSuchSession();
}

type Found = {
  readonly session: Session;
  readonly study: Study;
  readonly measurer: string | null;
  readonly duty: LevelsPage['duty'];
  readonly recorded: readonly RecordedLevels[];
};

async function foundFor(tx: Tx, who: Who, id: string): Promise<Found> {
  const session = await findSession(tx, who.organisationId, id);
  if (session === null) throw noSuchSession();
  const study = await studyById(tx, session.studyId);
  const measurer = await measurerOf(tx, study, session);
  const duty = dutyIn(session, measurer, who);
  const recorded = levelsInRecord(await readSessionEntries(tx, study.id, session.number));
  return { session, study, measurer, duty, recorded };
}

async function pageOf(deps: Deps, sittings: Sittings, who: Who, id: string, asProctor: boolean): Promise<LevelsPage> {
  const { state } = (await sittings.of(id)).memory;
  return withTransaction(deps.db, async (tx) => {
    const { session, study, measurer, duty, recorded } = await foundFor(tx, who, id);
    const measures = duty === 'measurer' || (duty === 'proctor' && asProctor);
    const codes = await codesToMeasure(tx, study.id);
    const people = [session.proctorId, ...(measurer === null ? [] : [measurer]), ...recorded.map(({ by }) => by)];
    const names = await namesOf(tx, people);
    const seesAll = isClosed(study.state) && (duty !== 'proctor' || who.role !== 'proctor');
    return levelsPageView({
      session,
      title: study.title,
      state,
      recorded,
      measurer: measurer === null ? null : { id: measurer, name: names.get(measurer) ?? 'unknown' },
      names,
      duty,
      codes: measures ? codes : [],
      codesAreDrawn: codes.length > 0,
      maySee: ({ by }) => by === who.userId || seesAll,
    });
  });
}

async function requireVisible(deps: Deps, who: Who, id: string): Promise<Found> {
  return withTransaction(deps.db, (tx) => foundFor(tx, who, id));
}

export async function getLevels(deps: Deps, sittings: Sittings, who: Who, id: string, asProctor: boolean) {
  await requireVisible(deps, who, id);
  return pageOf(deps, sittings, who, id, asProctor);
}

/** What is wrong with a measurement, each at its line; then whatever is asked about and not answered yet. */
function faultsOf(
  measured: MeasuredLevels,
  answered: readonly string[],
  about: Parameters<typeof levelFaults>,
  now: number,
): InputFault[] {
  const faults = levelFaults(...about).map(({ row, text }) => ({
    pointer: row === null ? '/rows' : `/rows/${row}`,
    detail: text,
  }));
  if (faults.length > 0) return faults;
  return levelQuestions(measured, now)
    .filter(({ id }) => !answered.includes(id))
    .map(({ id, text }) => ({ pointer: `/answered/${id}`, detail: text }));
}

/** Puts a measurement on the record. The proctor may take it alone; it caps how blind the study was. */
export async function recordLevels(
  deps: Deps,
  sittings: Sittings,
  who: Who,
  id: string,
  { asProctor, answered, ...measured }: LevelsDraft,
): Promise<LevelsPage> {
  const { duty, study } = await requireVisible(deps, who, id);
  if (isClosed(study.state)) throw new Problem('wrong-phase', 'The study is closed; its record takes no more levels.');
  if (duty === 'manager')
    throw new Problem('not-allowed', 'Levels are measured by whoever is named for it. Name yourself first.');
  if (duty === 'proctor' && !asProctor)
    throw new Problem('invalid-input', 'Please mend what is marked; nothing was saved.', [
      {
        pointer: '/asProctor',
        detail: 'Confirm that you measure alone: you see levels by code, and the study counts as listener-blind.',
      },
    ]);
  const sitting = await sittings.of(id);
  await sitting.decideOn(async ({ state, session }) => {
    const registered = state.plan.levels;
    if (registered === undefined) throw new Problem('wrong-phase', 'This study registers no levels.');
    const entries = await withTransaction(deps.db, (tx) => readSessionEntries(tx, study.id, session.number));
    const before = levelsInRecord(entries).findLast(({ check }) => check === 'before') ?? null;
    const first = measured.check === 'before' ? null : before;
    const codes = await withTransaction(deps.db, (tx) => codesToMeasure(tx, study.id));
    if (codes.length === 0) throw new Problem('wrong-phase', 'The code holder has drawn no codes yet.');
    const faults = faultsOf(measured, answered, [measured, codes, registered, first], deps.clock.now());
    if (faults.length > 0)
      throw new Problem('invalid-input', 'Please look at what is marked; nothing was saved.', faults);
    return { kind: 'record-levels', by: who.userId, measured, ...judgeLevels(measured, first, registered) };
  });
  return pageOf(deps, sittings, who, id, asProctor);
}

/** Names who measures: a member who runs no session of the study, so that no proctor sees levels by code. */
export async function assignMeasurer(deps: Deps, sittings: Sittings, who: Who, id: string, userId: string) {
  await withTransaction(deps.db, async (tx) => {
    const { study } = await foundFor(tx, who, id);
    const members = await membersOf(tx, who.organisationId);
    const refuse = (detail: string) =>
      new Problem('invalid-input', 'Choose somebody else.', [{ pointer: '/userId', detail }]);
    if (!members.some((member) => member.userId === userId)) throw refuse('Choose a member of the organisation');
    const sessions = await sessionsOfStudy(tx, study.id);
    if (sessions.some(({ proctorId }) => proctorId === userId))
      throw refuse('This person runs a session of the study and must not see levels by code');
    await store.saveDuty(tx, { sessionId: id, userId });
  });
  return pageOf(deps, sittings, who, id, false);
}
