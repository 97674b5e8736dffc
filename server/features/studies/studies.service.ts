import type { StudyDraft, StudyListQuery, Study as StudyReply } from '#shared/contracts/studies.ts';
import { canonicalJson } from '#shared/ledger/canonical-json.ts';
import { type InputFault, Problem } from '#shared/problem.ts';
import { type Protocol, type ProtocolCable, protocolDigest, protocolFromDraft } from '#shared/protocol/protocol.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { append, readKinds } from '../../ledger/ledger.ts';
import { enterProtocol } from '../../ledger/registry-log.ts';
import { codesToDrawMail } from '../../mail/mails.ts';
import { postMail } from '../../mail/outbox.ts';
import { pageAddresses } from '../../mail/page-addresses.ts';
import type { Cable } from '../cables/cable.entity.ts';
import { cablesById } from '../cables/cables.store.ts';
import { sessionsOfStudies, sessionsOfStudy } from '../sessions/sessions.store.ts';
import { signedHeadsOf } from '../signed-heads/signed-heads.service.ts';
import { findById, membersOf, namesOf } from '../users/users.store.ts';
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

const cableIds = (draft: StudyDraft) => draft.cables.map((choice) => choice.cableId);

async function viewOf(tx: Tx, study: Study): Promise<StudyReply> {
  const cables = await cablesById(tx, study.organisationId, cableIds(study.draft));
  const cableName = (index: 0 | 1) => cables.find(({ id }) => id === study.draft.cables[index].cableId)?.name ?? '';
  const entries = await readKinds(tx, study.id, ['protocol-sealed', 'deviation-recorded']);
  return studyView(study, {
    sessions: await sessionsOfStudy(tx, study.id),
    names: await namesOf(tx, [study.managerId, study.codeHolderId]),
    cableNames: [cableName(0), cableName(1)],
    sealing: entries.find((entry) => entry.kind === 'protocol-sealed') ?? null,
    deviations: entries.filter((entry) => entry.kind === 'deviation-recorded'),
    heads: await signedHeadsOf(tx, study.id),
  });
}

/** What a draft refers to must be this organisation's, and in use. */
async function requireReferences(tx: Tx, organisationId: string, draft: StudyDraft): Promise<void> {
  const cables = await cablesById(tx, organisationId, cableIds(draft));
  const faults: InputFault[] = [];
  for (const [index, choice] of draft.cables.entries()) {
    const cable = cables.find(({ id, archived }) => id === choice.cableId && !archived);
    if (cable === undefined) {
      faults.push({ pointer: `/cables/${index}/cableId`, detail: 'This cable is not in use; choose another' });
      continue;
    }
    const inUse = new Set(cable.specimens.filter(({ archived }) => !archived).map(({ id }) => id));
    const isWrong =
      choice.specimenIds.some((id) => !inUse.has(id)) || new Set(choice.specimenIds).size < choice.specimenIds.length;
    if (isWrong)
      faults.push({ pointer: `/cables/${index}/specimenIds`, detail: 'Choose specimens of this cable, each once' });
  }
  const members = await membersOf(tx, organisationId);
  if (!members.some(({ userId }) => userId === draft.codeHolderId))
    faults.push({ pointer: '/codeHolderId', detail: 'The code holder must be a member of your organisation' });
  if (faults.length > 0) throw new Problem('invalid-input', 'Please mend what is marked; nothing was saved.', faults);
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

function protocolCable(cables: readonly Cable[], choice: StudyDraft['cables'][number]): ProtocolCable {
  const cable = cables.find(({ id }) => id === choice.cableId);
  if (cable === undefined) throw new Error('a checked reference is gone');
  const { id, name, kind, lengthMm, description } = cable;
  const specimens = cable.specimens
    .filter((specimen) => choice.specimenIds.includes(specimen.id))
    .map(({ id: specimenId, serial, note }) => ({ id: specimenId, serial, note }));
  return { id, name, kind, lengthMm, description, specimens };
}

/** Seals the protocol: its digest becomes the first entry of the study's record, and nothing in it changes any more. */
export function sealStudy(deps: Deps, where: Where, userId: string) {
  const { random, clock } = deps;
  return withTransaction(deps.db, async (tx) => {
    const study = await lockedStudy(tx, where);
    if (study.state !== 'draft') throw new Problem('wrong-phase', 'The protocol is sealed already.');
    await requireReferences(tx, where.organisationId, study.draft);
    const cables = await cablesById(tx, where.organisationId, cableIds(study.draft));
    const protocol = protocolFromDraft(study.draft, {
      study: study.id,
      version: 1,
      salt: random.bytes('protocol-salt', 32).toString('hex'),
      cables: [protocolCable(cables, study.draft.cables[0]), protocolCable(cables, study.draft.cables[1])],
    });
    const now = clock.now();
    const digest = protocolDigest(protocol);
    const sealed = { study: study.id, version: 1, digest, sealedAt: new Date(now).toISOString() };
    await enterProtocol(tx, deps, study.organisationId, sealed);
    const payload = { protocolVersion: 1, digest, sealedBy: userId };
    await append(tx, deps, study.id, [{ kind: 'protocol-sealed', at: now, payload, session: null }]);
    await store.updateStudy(tx, study.id, { state: 'sealed', protocol: canonicalJson(protocol) }, new Date(now));
    await tellCodeHolder(tx, deps, study);
    return viewOf(tx, await studyOrProblem(tx, where));
  });
}

async function tellCodeHolder(tx: Tx, deps: Deps, { id, organisationId, title, codeHolderId }: Study): Promise<void> {
  const holder = await findById(tx, codeHolderId);
  if (holder === null) throw new Error('a checked code holder is gone');
  const url = pageAddresses.codes(deps.config, organisationId, id);
  await postMail(tx, deps, { organisationId, recipient: holder.email }, codesToDrawMail({ title, url }));
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

/** The sealed protocol of a study, for the parts of the program that run it. @throws Problem before sealing */
export function protocolOf(study: Study): Protocol {
  if (study.protocol === null) throw new Problem('wrong-phase', 'The protocol is not sealed yet.');
  return JSON.parse(study.protocol) as Protocol;
}

export { lockedStudy, studyOrProblem, viewOf };
