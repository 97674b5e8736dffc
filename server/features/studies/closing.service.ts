import { isClosed, type Study as StudyReply } from '#shared/contracts/studies.ts';
import { runCueAudit } from '#shared/cue-audit/run-cue-audit.ts';
import type { Json } from '#shared/ledger/canonical-json.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { runChecks } from '#shared/methods/run-checks.ts';
import { runRegistered } from '#shared/methods/run-registered.ts';
import { Problem } from '#shared/problem.ts';
import { decide } from '#shared/session/decide.ts';
import { sessionsInRecord } from '#shared/session/read-record.ts';
import type { RevealedKey } from '#shared/session/revealed-key.ts';
import { reveal } from '../../blind/index.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { append, type NewEntry, readRecord } from '../../ledger/ledger.ts';
import { pastManagersOf } from '../people/people.store.ts';
import { requestsOfSessions } from '../sessions/requests.store.ts';
import type { Session } from '../sessions/session.entity.ts';
import { answersOfSessions, sessionsOfStudy, updateSession } from '../sessions/sessions.store.ts';
import { membersOf } from '../users/users.store.ts';
import { lockedStudy, protocolOf, studyOrProblem, viewOf } from './studies.service.ts';
import * as store from './studies.store.ts';
import { closingOf } from './studies.views.ts';
import type { Study } from './study.entity.ts';

/** Sessions that never started get their end on the record too. */
async function endPlanned(tx: Tx, deps: Deps, study: Study, sessions: readonly Session[]): Promise<void> {
  const states = sessionsInRecord(await readRecord(tx, study.id), methodOf(study.draft.method));
  for (const { id, number } of sessions.filter((session) => session.phase === 'planned')) {
    const state = states.find((candidate) => candidate.session === number);
    if (state === undefined) throw new Error(`session ${number} is not on the record`);
    const command = { kind: 'abandon', reason: 'The study was closed before this session started.' } as const;
    const entries = decide(state, command, deps.clock.now()).map(({ kind, at, payload }) => ({
      kind,
      at,
      payload,
      session: number,
    }));
    await append(tx, deps, study.id, entries);
    await updateSession(tx, id, { phase: 'abandoned' });
  }
}

async function closedEntry(
  tx: Tx,
  study: Study,
  by: string,
  complete: boolean,
  reason: string,
  at: number,
): Promise<NewEntry> {
  const members = await membersOf(tx, study.organisationId);
  // Whoever once could see the cables' pages counts, also after another role or none.
  const everyone = [...members, ...(await pastManagersOf(tx, study.organisationId))];
  const withRole = (role: string) => [
    ...new Set(everyone.filter((member) => member.role === role).map(({ userId }) => userId)),
  ];
  const { managerId: manager, codeHolderId: codeHolder } = study;
  return {
    kind: 'study-closed',
    at,
    payload: { by, complete, reason, manager, codeHolder, owners: withRole('owner'), managers: withRole('manager') },
    session: null,
  };
}

async function recordResult(
  tx: Tx,
  deps: Deps,
  study: Study,
  sessions: readonly Session[],
  key: RevealedKey,
): Promise<void> {
  const protocol = protocolOf(study);
  const entries = await readRecord(tx, study.id);
  const states = sessionsInRecord(entries, methodOf(protocol.method));
  const answers = await answersOfSessions(
    tx,
    sessions.map(({ id }) => id),
  );
  const requests = await requestsOfSessions(
    tx,
    sessions.map(({ id }) => id),
  );
  const held = answers.map(({ sessionId, trial, seat, choice }) => ({ session: sessionId, trial, seat, choice }));
  const result = runRegistered(protocol, states, key, held) as unknown as Json;
  const cues = runCueAudit(protocol, states, entries, key, held, requests) as unknown as Json;
  const checks = runChecks(protocol, states, key, held) as unknown as Json | undefined;
  const payload = { analysis: protocol.analysis.name, result, ...(checks === undefined ? {} : { checks }), cues };
  await append(tx, deps, study.id, [{ kind: 'result-recorded', at: deps.clock.now(), payload, session: null }]);
}

/**
 * Closes a study: both secrets are opened, the registered analysis runs once, its result goes on the record.
 * All in one transaction, so that no study is ever half closed.
 */
export function closeStudy(
  deps: Deps,
  where: { organisationId: string; id: string },
  userId: string,
  reason: string,
): Promise<StudyReply> {
  const { clock } = deps;
  return withTransaction(deps.db, async (tx) => {
    const study = await lockedStudy(tx, where);
    const sessions = await sessionsOfStudy(tx, study.id);
    const { allowed, complete, why } = closingOf(study, sessions);
    if (!allowed) throw new Problem('wrong-phase', isClosed(study.state) ? 'The study is closed already.' : why);
    if (!complete && reason === '')
      throw new Problem('invalid-input', 'Ending early needs a reason.', [
        { pointer: '/reason', detail: 'Say why the study ends before its registered number of trials' },
      ]);
    await endPlanned(tx, deps, study, sessions);
    await append(tx, deps, study.id, [await closedEntry(tx, study, userId, complete, reason, clock.now())]);
    const key = await reveal(tx, study.id, sessions);
    await append(tx, deps, study.id, [{ kind: 'key-revealed', at: clock.now(), payload: key, session: null }]);
    await recordResult(tx, deps, study, sessions, key);
    await store.updateStudy(tx, study.id, { state: 'closed' }, new Date(clock.now()));
    return viewOf(tx, await studyOrProblem(tx, where));
  });
}
