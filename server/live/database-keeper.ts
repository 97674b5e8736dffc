import { isClosed } from '#shared/contracts/studies.ts';
import { canonicalJson, type Json } from '#shared/ledger/canonical-json.ts';
import { Problem } from '#shared/problem.ts';
import { sessionPlanOf } from '#shared/protocol/protocol.ts';
import { contributionsOf } from '#shared/session/counted-trials.ts';
import type { SessionPlan } from '#shared/session/events.ts';
import { studyMark } from '#shared/session/label-text.ts';
import { presentationNow } from '#shared/session/progress.ts';
import { codesOf, commitDraw, cueFor, truthPractised } from '../blind/index.ts';
import { type Tx, withTransaction } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import { labelOf, noteSeated } from '../features/attendances/attendances.store.ts';
import { dropReminders, tellCancelled } from '../features/attendances/telling.service.ts';
import { insertRequest } from '../features/sessions/requests.store.ts';
import * as store from '../features/sessions/sessions.store.ts';
import { protocolOf } from '../features/studies/studies.service.ts';
import { lockStudyRow, studiesOf, studyById, updateStudy } from '../features/studies/studies.store.ts';
import { append } from '../ledger/ledger.ts';
import { newSessionCode } from './join.ts';
import type { Keeper, Keeping } from './keeper.ts';
import { afterEvents, type SessionMemory } from './session-memory.ts';

/** Keeps a session in the database and on its study's record: one action, one transaction. */
export function databaseKeeper(deps: Deps): Keeper {
  return {
    keep: (work) => withTransaction(deps.db, (tx) => work(keepingIn(tx, deps))),
    codes: async ({ session }) => codesOf(deps.db.manager, session.studyId),
    titleOfMark: async ({ session }, mark) => {
      const studies = await studiesOf(deps.db.manager, session.organisationId);
      return studies.find(({ id }) => studyMark(id) === mark)?.title ?? null;
    },
    codeToFit: async ({ state, session, method }) => {
      const presentation = presentationNow(state, method);
      if (presentation === null || state.trial === null) return null;
      return cueFor(deps.db.manager, {
        studyId: session.studyId,
        sessionId: session.id,
        contributions: contributionsOf(state),
        method,
        state,
        trial: state.trial.trial,
        practice: state.trial.practice,
        presentation,
      });
    },
    truthPractised: ({ state, session, method }, practice) =>
      truthPractised(deps.db.manager, {
        studyId: session.studyId,
        sessionId: session.id,
        contributions: contributionsOf(state),
        method,
        plan: state.plan,
        practice,
      }),
  };
}

const planText = (plan: SessionPlan) => canonicalJson(plan as unknown as Json);

function keepingIn(tx: Tx, deps: Deps): Keeping {
  const { random, clock } = deps;
  return {
    openSeating: async ({ session, state }) => {
      // Locked, so that the protocol is not amended while the session opens by it.
      await lockStudyRow(tx, session.studyId);
      const study = await studyById(tx, session.studyId);
      if (planText(sessionPlanOf(protocolOf(study))) !== planText(state.plan))
        throw new Problem(
          'stale-view',
          'The protocol has been amended. The session goes by its new version now; look at it, then open seating again.',
        );
      if (study.codesState !== 'confirmed')
        throw new Problem(
          'wrong-phase',
          'The code holder has not confirmed the sleeves yet. Seating opens after that.',
        );
      if (state.phase !== 'planned') throw new Problem('wrong-phase', 'Seating is open already.');
      const commitment = await commitDraw(tx, random, session.id);
      const code = await newSessionCode(tx, random);
      await store.updateSession(tx, session.id, { code });
      await updateStudy(tx, study.id, { state: 'collecting' }, new Date(clock.now()));
      return { commitment, code };
    },
    addSeat: async (seat, link) => {
      await lockStudyRow(tx, seat.studyId);
      const known = link === null ? null : await labelOf(tx, link.listenerId);
      const label = known ?? (await store.nextLabel(tx, seat.studyId));
      await store.insertSeat(tx, { ...seat, label });
      if (link !== null) await noteSeated(tx, link, label);
      return { ...seat, label };
    },
    saveAnswer: (row) => store.saveAnswer(tx, row),
    saveRemark: async (row) => {
      const session = await store.sessionById(tx, row.sessionId);
      if (session === null) throw new Problem('not-found', 'There is no such session.');
      await lockStudyRow(tx, session.studyId);
      const { state } = await studyById(tx, session.studyId);
      if (isClosed(state)) throw new Problem('too-late', 'The study is closed; nothing can be added to it any more.');
      await store.saveRemark(tx, row);
    },
    saveRequest: (row) => insertRequest(tx, row),
    record: async (memory, events) => {
      const { studyId, id, number } = memory.session;
      const entries = await append(
        tx,
        deps,
        studyId,
        events.map(({ kind, at, payload }) => ({ kind, at, payload, session: number })),
      );
      await store.updateSession(tx, id, columnsOf(afterEvents(memory, events, entries)));
      const happened = new Set(events.map(({ kind }) => kind));
      const isCancelled = happened.has('session-abandoned') && memory.state.phase === 'planned';
      if (isCancelled) await tellCancelled(tx, deps, memory.session);
      else if (happened.has('seating-opened')) await dropReminders(tx, deps, id);
      return entries;
    },
  };
}

/** What lists read of a session, so that they need no replay. */
function columnsOf({ state }: SessionMemory) {
  const isOver = state.phase === 'finished' || state.phase === 'abandoned';
  return {
    phase: state.phase,
    ...(isOver ? { code: null } : {}),
    trialsLocked: state.ended.filter(({ outcome }) => outcome === 'locked').length,
    listeners: state.seats.length,
  };
}
