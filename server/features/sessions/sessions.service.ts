import { checkTrialsOf } from '#shared/contracts/check-draft.ts';
import type { SessionDraft, SessionListQuery, SessionMove, SessionRow } from '#shared/contracts/sessions.ts';
import type { StudyDraft } from '#shared/contracts/studies.ts';
import { Problem } from '#shared/problem.ts';
import { sessionPlanOf } from '#shared/protocol/protocol.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { append } from '../../ledger/ledger.ts';
import type { Sittings } from '../../live/sittings.ts';
import { sessionChangedMail, sessionPlannedMail } from '../../mail/mails.ts';
import { postMail } from '../../mail/outbox.ts';
import { pageAddresses } from '../../mail/page-addresses.ts';
import { tellMoved } from '../attendances/moved.service.ts';
import { lockedStudy, protocolOf } from '../studies/studies.service.ts';
import { studyById, updateStudy } from '../studies/studies.store.ts';
import { progressOf } from '../studies/studies.views.ts';
import { findById, membersOf, namesOf } from '../users/users.store.ts';
import type { Session } from './session.entity.ts';
import * as store from './sessions.store.ts';

const formatSessions = (count: number) => (count === 1 ? 'one session' : `${count} sessions`);

/** Trials of a session, check trials among them. */
const trialsOf = (draft: StudyDraft | undefined) =>
  draft === undefined ? 0 : draft.trials + checkTrialsOf(draft.checks);

async function rowsOf(tx: Tx, sessions: readonly Session[]): Promise<SessionRow[]> {
  const names = await namesOf(
    tx,
    sessions.map(({ proctorId }) => proctorId),
  );
  const studies = new Map<string, Awaited<ReturnType<typeof studyById>>>();
  for (const { studyId } of sessions) if (!studies.has(studyId)) studies.set(studyId, await studyById(tx, studyId));
  return sessions.map(
    ({ id, studyId, number, phase, room, plannedAt, timeZone, proctorId, trialsLocked, listeners }) => ({
      id,
      studyId,
      title: studies.get(studyId)?.title ?? '',
      number,
      phase,
      room,
      plannedAt: plannedAt.toISOString(),
      timeZone,
      proctor: names.get(proctorId) ?? 'unknown',
      proctorId,
      trials: trialsOf(studies.get(studyId)?.draft),
      trialsLocked,
      listeners,
      hasLevels: studies.get(studyId)?.draft.levels !== undefined,
    }),
  );
}

export function listSessions(
  { db }: Deps,
  who: { organisationId: string; userId: string; role: string | null },
  query: SessionListQuery,
) {
  return withTransaction(db, async (tx) => {
    const own = who.role === 'proctor' ? { proctorId: who.userId } : {};
    const found = await store.listSessions(tx, who.organisationId, { ...query, ...own });
    return { ...found, rows: await rowsOf(tx, found.rows) };
  });
}

export function getSession(
  { db }: Deps,
  who: { organisationId: string; userId: string; role: string | null },
  id: string,
): Promise<SessionRow> {
  return withTransaction(db, async (tx) => {
    const session = await store.findSession(tx, who.organisationId, id);
    const isHidden = who.role === 'proctor' && session?.proctorId !== who.userId;
    if (session === null || isHidden) throw new Problem('not-found', 'There is no such session.');
    const [row] = await rowsOf(tx, [session]);
    if (row === undefined) throw new Error('a session without a row');
    return row;
  });
}

/** Plans a session: it takes the study's next number and keeps it, whatever becomes of it. */
export function planSession(
  deps: Deps,
  where: { organisationId: string; id: string },
  draft: SessionDraft,
): Promise<SessionRow> {
  const { random, clock } = deps;
  return withTransaction(deps.db, async (tx) => {
    const study = await lockedStudy(tx, where);
    if (study.state !== 'sealed' && study.state !== 'collecting')
      throw new Problem('wrong-phase', 'Sessions are planned between sealing and closing.');
    const members = await membersOf(tx, where.organisationId);
    const proctor = members.find(({ userId }) => userId === draft.proctorId);
    if (proctor === undefined || proctor.role === 'reviewer')
      throw new Problem('invalid-input', 'Choose another proctor.', [
        { pointer: '/proctorId', detail: 'Choose a member who may run sessions' },
      ]);
    const sessions = await store.sessionsOfStudy(tx, study.id);
    if (progressOf(study, sessions).sessionsToPlan === 0)
      throw new Problem(
        'wrong-phase',
        `The protocol registers ${formatSessions(study.draft.sessions)}, and no more can be planned. One that is abandoned leaves its place to another.`,
      );
    const session: Session = {
      id: random.id(),
      organisationId: where.organisationId,
      studyId: study.id,
      number: sessions.length + 1,
      proctorId: draft.proctorId,
      room: draft.room,
      plannedAt: new Date(draft.plannedAt),
      timeZone: draft.timeZone,
      phase: 'planned',
      code: null,
      trialsLocked: 0,
      listeners: 0,
    };
    await store.insertSession(tx, session);
    const { number } = session;
    const payload = {
      session: number,
      sessionId: session.id,
      proctor: draft.proctorId,
      plan: sessionPlanOf(protocolOf(study)),
    };
    await append(tx, deps, study.id, [{ kind: 'session-planned', at: clock.now(), payload, session: number }]);
    await updateStudy(tx, study.id, {}, new Date(clock.now()));
    const { organisationId } = where;
    const url = pageAddresses.console(deps.config, organisationId, session.id);
    const mail = sessionPlannedMail({ title: study.title, url }, session);
    await postMail(tx, deps, { organisationId, recipient: proctor.user.email }, mail);
    const [row] = await rowsOf(tx, [session]);
    if (row === undefined) throw new Error('a session without a row');
    return row;
  });
}

/** Tells the proctor, unless they did it themselves. */
async function tellProctor(tx: Tx, deps: Deps, userId: string, session: Session, change: 'moved' | 'cancelled') {
  const proctor = await findById(tx, session.proctorId);
  if (proctor === null || proctor.id === userId) return;
  const { organisationId, id, studyId } = session;
  const { title } = await studyById(tx, studyId);
  const mail = sessionChangedMail(
    { title, url: pageAddresses.session(deps.config, organisationId, id) },
    session,
    change,
  );
  await postMail(tx, deps, { organisationId, recipient: proctor.email }, mail);
}

type Who = { organisationId: string; userId: string; role: string | null };

/** Changes when or where a planned session takes place; proctor and listeners are told. */
export async function moveSession(
  deps: Deps,
  sittings: Sittings,
  who: Who,
  id: string,
  { plannedAt, room, timeZone }: SessionMove,
): Promise<SessionRow> {
  await getSession(deps, who, id);
  const sitting = await sittings.of(id);
  await sitting.replan(() =>
    withTransaction(deps.db, async (tx) => {
      const before = await store.lockSession(tx, who.organisationId, id);
      if (before === null) throw new Problem('not-found', 'There is no such session.');
      const session = { ...before, plannedAt: new Date(plannedAt), room, timeZone };
      const isOtherTime = session.plannedAt.getTime() !== before.plannedAt.getTime();
      if (!isOtherTime && before.room === room && before.timeZone === timeZone) return before;
      await store.updateSession(tx, id, { plannedAt: session.plannedAt, room, timeZone });
      await tellProctor(tx, deps, who.userId, session, 'moved');
      await tellMoved(tx, deps, session, isOtherTime);
      return session;
    }),
  );
  return getSession(deps, who, id);
}

/** Ends a session before its seating opens. It keeps its number, and leaves its place to another. */
export async function cancelSession(deps: Deps, sittings: Sittings, who: Who, id: string, reason: string) {
  await getSession(deps, who, id);
  await (await sittings.of(id)).cancel(reason);
  await withTransaction(deps.db, async (tx) => {
    const session = await store.sessionById(tx, id);
    if (session !== null) await tellProctor(tx, deps, who.userId, session, 'cancelled');
  });
  return { ok: true } as const;
}
