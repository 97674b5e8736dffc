import type { StudyDraft, StudyListQuery, Study as StudyReply } from '#shared/contracts/studies.ts';
import { sealedVersions } from '#shared/ledger/protocol-versions.ts';
import { Problem } from '#shared/problem.ts';
import type { Protocol } from '#shared/protocol/protocol.ts';
import { nameInStudy } from '#shared/protocol/treatment.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { append, readKinds } from '../../ledger/ledger.ts';
import { cablesById } from '../cables/cables.store.ts';
import { sessionsOfStudies, sessionsOfStudy } from '../sessions/sessions.store.ts';
import { signedHeadsOf } from '../signed-heads/signed-heads.service.ts';
import { namesOf } from '../users/users.store.ts';
import { cableIds, requireReferences } from './references.service.ts';
import * as store from './studies.store.ts';
import { studyRowView, studyView } from './studies.views.ts';
import type { Study } from './study.entity.ts';

type Where = { organisationId: string; id: string };

const noSuchStudy = () => new Problem('not-found', 'There is no such study.');

async function studyOrProblem(tx: Tx, { organisationId, id }: Where): Promise<Study> {
  const study = await store.findStudy(tx, organisationId, id);
  if (study === null) throw noSuchStudy();
  return study;
}

async function lockedStudy(tx: Tx, { organisationId, id }: Where): Promise<Study> {
  const study = await store.lockStudy(tx, organisationId, id);
  if (study === null) throw noSuchStudy();
  return study;
}

async function viewOf(tx: Tx, study: Study): Promise<StudyReply> {
  const cables = await cablesById(tx, study.organisationId, cableIds(study.draft));
  const cableName = (index: 0 | 1) => {
    const cable = cables.find(({ id }) => id === study.draft.cables[index].cableId);
    return nameInStudy(cable?.name ?? '', index, study.draft.treatment);
  };
  const entries = await readKinds(tx, study.id, ['protocol-sealed', 'protocol-amended', 'deviation-recorded']);
  const versions = sealedVersions(entries);
  const protocols = (await versionsOf(tx, study.id)).map(({ protocol }) => protocol);
  const people = protocols.map(({ design }) => design.codeHolder);
  return studyView(study, {
    sessions: await sessionsOfStudy(tx, study.id),
    names: await namesOf(tx, [study.managerId, study.codeHolderId, ...versions.map(({ by }) => by), ...people]),
    cableNames: [cableName(0), cableName(1)],
    versions,
    protocols,
    deviations: entries.filter((entry) => entry.kind === 'deviation-recorded'),
    heads: await signedHeadsOf(tx, study.id),
  });
}

export function listStudies({ db }: Deps, organisationId: string, query: StudyListQuery) {
  return withTransaction(db, async (tx) => {
    const found = await store.listStudies(tx, organisationId, query);
    const sessions = await sessionsOfStudies(
      tx,
      found.rows.map(({ id }) => id),
    );
    const rows = found.rows.map((study) =>
      studyRowView(
        study,
        sessions.filter((session) => session.studyId === study.id),
      ),
    );
    return { ...found, rows };
  });
}

export function getStudy({ db }: Deps, where: Where): Promise<StudyReply> {
  return withTransaction(db, async (tx) => viewOf(tx, await studyOrProblem(tx, where)));
}

export function createStudy(deps: Deps, organisationId: string, managerId: string, draft: StudyDraft) {
  return withTransaction(deps.db, async (tx) => {
    await requireReferences(tx, organisationId, draft);
    const id = deps.random.id();
    await store.insertStudy(tx, { id, organisationId, managerId, draft, now: new Date(deps.clock.now()) });
    return viewOf(tx, await studyOrProblem(tx, { organisationId, id }));
  });
}

function requireDraft(study: Study): void {
  if (study.state !== 'draft') throw new Problem('wrong-phase', 'The protocol is sealed. Record a deviation instead.');
}

export function updateStudy(deps: Deps, where: Where, draft: StudyDraft) {
  return withTransaction(deps.db, async (tx) => {
    requireDraft(await lockedStudy(tx, where));
    await requireReferences(tx, where.organisationId, draft);
    await store.updateDraft(tx, where.id, draft, new Date(deps.clock.now()));
    return viewOf(tx, await studyOrProblem(tx, where));
  });
}

export function discardStudy({ db }: Deps, where: Where) {
  return withTransaction(db, async (tx) => {
    const study = await lockedStudy(tx, where);
    if (study.state !== 'draft') throw new Problem('wrong-phase', 'A sealed study stays, whatever becomes of it.');
    await store.deleteDraft(tx, where.id);
    return { ok: true as const };
  });
}

export function recordDeviation(deps: Deps, where: Where, text: string) {
  return withTransaction(deps.db, async (tx) => {
    const study = await lockedStudy(tx, where);
    if (study.state !== 'sealed' && study.state !== 'collecting')
      throw new Problem('wrong-phase', 'Deviations are recorded between sealing and closing.');
    const now = deps.clock.now();
    const payload = { session: null, text };
    await append(tx, deps, study.id, [{ kind: 'deviation-recorded', at: now, payload, session: null }]);
    await store.updateStudy(tx, study.id, {}, new Date(now));
    return viewOf(tx, await studyOrProblem(tx, where));
  });
}

/** Every sealed version of a study's protocol, the first first. */
export async function versionsOf(tx: Tx, studyId: string): Promise<{ version: number; protocol: Protocol }[]> {
  const rows = await store.versionsOfStudy(tx, studyId);
  return rows.map(({ version, protocol }) => ({ version, protocol: JSON.parse(protocol) as Protocol }));
}

/** The sealed protocol of a study, for the parts of the program that run it. @throws Problem before sealing */
export function protocolOf(study: Study): Protocol {
  if (study.protocol === null) throw new Problem('wrong-phase', 'The protocol is not sealed yet.');
  return JSON.parse(study.protocol) as Protocol;
}

export { lockedStudy, studyOrProblem, viewOf };
