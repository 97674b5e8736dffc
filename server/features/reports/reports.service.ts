import type { Report, ReportRow } from '#shared/contracts/reports.ts';
import type { SignedHead } from '#shared/contracts/signed-heads.ts';
import { isClosed } from '#shared/contracts/studies.ts';
import { cueAudit } from '#shared/cue-audit/cue-audit.ts';
import { cueTrials } from '#shared/cue-audit/cue-trials.ts';
import { portrayCueAudit, withCueCautions } from '#shared/cue-audit/portray-cue-audit.ts';
import { knownDifferences } from '#shared/findings/check-result.ts';
import type { Entry } from '#shared/ledger/chain.ts';
import type { CheckId } from '#shared/ledger/check-names.ts';
import { type ClosedStudy, publicationParts } from '#shared/ledger/publication-parts.ts';
import { type Check, verifyStudy } from '#shared/ledger/verify.ts';
import { levelsFound } from '#shared/levels/levels-found.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { Problem } from '#shared/problem.ts';
import { blindingRung } from '#shared/session/blinding-rung.ts';
import { sessionsInRecord } from '#shared/session/read-record.ts';
import { revealedKey } from '#shared/session/revealed-key.ts';
import type { SessionState } from '#shared/session/state.ts';
import { studyEvents } from '#shared/session/study-events.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { readRecord } from '../../ledger/ledger.ts';
import { requestsOfSessions } from '../sessions/requests.store.ts';
import { answersOfSessions, remarksOfSessions, sessionsOfStudy } from '../sessions/sessions.store.ts';
import { signedHeadsOf } from '../signed-heads/signed-heads.service.ts';
import { protocolOf, studyOrProblem, versionsOf } from '../studies/studies.service.ts';
import { listStudies } from '../studies/studies.store.ts';
import type { Study } from '../studies/study.entity.ts';
import { type ReportSource, reportView } from './reports.views.ts';

/** Whether the checks that a gate stands on have all passed. */
function passed(checks: readonly Check[], ids: readonly CheckId[]): boolean {
  return checks.every(({ id, outcome }) => !ids.includes(id) || outcome === 'pass');
}

function closingOf(entries: readonly Entry[]) {
  return studyEvents['study-closed'].parse(entries.find(({ kind }) => kind === 'study-closed')?.payload);
}

export type ClosedRecord = ClosedStudy & {
  readonly study: { readonly id: string; readonly title: string };
  /** Where each session was held, by its number; beside the record. */
  readonly rooms: ReadonlyMap<number, string>;
  /** Beside the record too. */
  readonly heads: readonly SignedHead[];
};

/** The level match, where the protocol registers one: over the sessions in which something was counted. */
function levelsOf({ entries, protocol }: ClosedRecord, states: readonly SessionState[]) {
  const registered = protocol.conduct.levels;
  if (registered === undefined) return undefined;
  const key = revealedKey.parse(entries.find(({ kind }) => kind === 'key-revealed')?.payload);
  const counted = states.filter(({ ended }) => ended.some(({ outcome }) => outcome === 'locked'));
  return levelsFound(
    entries,
    key.codeKey.rows,
    registered,
    counted.map(({ session }) => session),
  );
}

/** Everything that a report says, from the record alone: what was checked, how blind it was, what was found. */
function sourceFrom(closed: ClosedRecord): ReportSource {
  const { entries, protocol } = closed;
  const method = methodOf(protocol.method);
  const states = sessionsInRecord(entries, method);
  const checks = verifyStudy(publicationParts(closed));
  const rung = blindingRung(entries, states, method);
  const closing = closingOf(entries);
  const recorded = studyEvents['result-recorded'].parse(
    entries.find(({ kind }) => kind === 'result-recorded')?.payload,
  );
  const { result, checks: known } = recorded;
  const cables = [protocol.cables[0].name, protocol.cables[1].name] as const;
  const key = revealedKey.parse(entries.find(({ kind }) => kind === 'key-revealed')?.payload);
  const cued = cueTrials(method, states, entries, key, closed.answers, closed.requests);
  // A study closed before there was an audit has none on its record; it follows from the record all the same.
  const cues = recorded.cues ?? cueAudit(method, cued);
  const found = method.finding(result, {
    cables,
    gate: {
      commitmentsHold: passed(checks, [
        ...(['record', 'protocol', 'commitments', 'codeKey', 'draws', 'answers', 'rules', 'figures'] as const),
      ]),
      allTrialsAccounted: passed(checks, ['trials', 'sessions', 'flow']),
      isBlind: rung.name !== 'open',
    },
    known: knownDifferences(known),
    endedEarly: closing.complete ? null : closing.reason,
    levels: levelsOf(closed, states),
    setting: protocol.conduct.chain,
  });
  const finding = withCueCautions(found, cues, method, cables);
  const cueAuditShown = portrayCueAudit(cues, method, cables, cued);
  return { ...closed, states, checks, rung, closing, result, known, finding, cueAudit: cueAuditShown };
}

/** The report of a closed record, wherever it was read from. */
export function reportOf(closed: ClosedRecord): Report {
  return reportView(sourceFrom(closed));
}

/** A closed study as its tables hold it. @throws Problem before closing */
export async function closedRecord(tx: Tx, study: Study): Promise<ClosedRecord> {
  if (!isClosed(study.state)) throw new Problem('wrong-phase', 'There is a report once the study is closed.');
  const sessions = await sessionsOfStudy(tx, study.id);
  const rows = await answersOfSessions(
    tx,
    sessions.map(({ id }) => id),
  );
  const remarks = await remarksOfSessions(
    tx,
    sessions.map(({ id }) => id),
  );
  return {
    study,
    protocol: protocolOf(study),
    earlierProtocols: (await versionsOf(tx, study.id)).map(({ protocol }) => protocol).slice(0, -1),
    entries: await readRecord(tx, study.id),
    answers: rows.map(({ sessionId, trial, seat, choice, confidence, salt }) => ({
      session: sessionId,
      trial,
      seat,
      choice,
      confidence,
      salt,
    })),
    remarks: remarks.map(({ sessionId, seat, about, said, salt }) => ({ session: sessionId, seat, about, said, salt })),
    requests: await requestsOfSessions(
      tx,
      sessions.map(({ id }) => id),
    ),
    rooms: new Map(sessions.map(({ number, room }) => [number, room])),
    heads: await signedHeadsOf(tx, study.id),
  };
}

/** The report of a closed study, computed from its record. */
export function getReport({ db }: Deps, where: { organisationId: string; id: string }): Promise<Report> {
  return withTransaction(db, async (tx) => reportOf(await closedRecord(tx, await studyOrProblem(tx, where))));
}

export function listReports({ db }: Deps, organisationId: string, query: { q: string; page: number }) {
  return withTransaction(db, async (tx) => {
    const found = await listStudies(tx, organisationId, { ...query, state: 'any-closed', sort: '-updatedAt' });
    const rows: ReportRow[] = [];
    for (const study of found.rows) {
      const { entries, finding } = sourceFrom(await closedRecord(tx, study));
      const closedAt = entries.find(({ kind }) => kind === 'study-closed')?.at ?? study.updatedAt.toISOString();
      rows.push({ studyId: study.id, title: study.title, closedAt, headline: finding.headline });
    }
    return { ...found, rows };
  });
}
