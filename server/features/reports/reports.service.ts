import type { Report, ReportRow } from '#shared/contracts/reports.ts';
import type { Entry } from '#shared/ledger/chain.ts';
import { type Check, verifyStudy } from '#shared/ledger/verify.ts';
import { methodOf, registeredResult } from '#shared/methods/methods.ts';
import { Problem } from '#shared/problem.ts';
import type { Protocol } from '#shared/protocol/protocol.ts';
import { blindingRung } from '#shared/session/blinding-rung.ts';
import { sessionsInRecord } from '#shared/session/read-record.ts';
import { studyEvents } from '#shared/session/study-events.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { readRecord } from '../../ledger/ledger.ts';
import { answersOfSessions, sessionsOfStudy } from '../sessions/sessions.store.ts';
import { protocolOf, studyOrProblem } from '../studies/studies.service.ts';
import { listStudies } from '../studies/studies.store.ts';
import type { Study } from '../studies/study.entity.ts';
import { type ReportSource, reportView } from './reports.views.ts';

const holds = (checks: readonly Check[]) => checks.every(({ outcome }) => outcome === 'pass');

function findingFor(source: Pick<ReportSource, 'entries' | 'protocol' | 'result' | 'checks'>) {
  const { entries, protocol, result, checks } = source;
  const closing = closingOf(entries);
  return methodOf(result.method).finding(result, {
    cables: [protocol.cables[0].name, protocol.cables[1].name],
    gate: { commitmentsHold: holds(checks), allTrialsAccounted: holds(checks) },
    endedEarly: closing.complete ? null : closing.reason,
    setting: protocol.conduct.chain,
  });
}

function closingOf(entries: readonly Entry[]) {
  return studyEvents['study-closed'].parse(entries.find(({ kind }) => kind === 'study-closed')?.payload);
}

async function sourceOf(tx: Tx, study: Study): Promise<ReportSource> {
  if (study.state !== 'closed') throw new Problem('wrong-phase', 'There is a report once the study is closed.');
  const protocol: Protocol = protocolOf(study);
  const entries = await readRecord(tx, study.id);
  const sessions = await sessionsOfStudy(tx, study.id);
  const rows = await answersOfSessions(
    tx,
    sessions.map(({ id }) => id),
  );
  const answers = rows.map(({ sessionId, trial, seat, choice, confidence, salt }) => ({
    session: sessionId,
    trial,
    seat,
    choice,
    confidence,
    salt,
  }));
  const recorded = entries.find(({ kind }) => kind === 'result-recorded');
  const method = methodOf(protocol.method);
  const states = sessionsInRecord(entries, method);
  const source = {
    study,
    protocol,
    entries,
    answers,
    states,
    rooms: new Map(sessions.map(({ number, room }) => [number, room])),
    result: registeredResult.parse(recorded?.payload.result),
    checks: verifyStudy({ entries, protocol, answers }),
    rung: blindingRung(entries, states, method),
    closing: closingOf(entries),
  };
  return { ...source, finding: findingFor(source) };
}

/** The report of a closed study, computed from its record. */
export function getReport({ db }: Deps, where: { organisationId: string; id: string }): Promise<Report> {
  return withTransaction(db, async (tx) => reportView(await sourceOf(tx, await studyOrProblem(tx, where))));
}

export function listReports({ db }: Deps, organisationId: string, query: { q: string; page: number }) {
  return withTransaction(db, async (tx) => {
    const found = await listStudies(tx, organisationId, { ...query, state: 'closed', sort: '-updatedAt' });
    const rows: ReportRow[] = [];
    for (const study of found.rows) {
      const { entries, finding } = await sourceOf(tx, study);
      const closedAt = entries.find(({ kind }) => kind === 'study-closed')?.at ?? study.updatedAt.toISOString();
      rows.push({ studyId: study.id, title: study.title, closedAt, headline: finding.headline });
    }
    return { ...found, rows };
  });
}
