import type { StudyDraft, Study as StudyReply } from '#shared/contracts/studies.ts';
import { canonicalJson } from '#shared/ledger/canonical-json.ts';
import { Problem } from '#shared/problem.ts';
import { type Protocol, protocolDigest, protocolFromDraft } from '#shared/protocol/protocol.ts';
import type { ProtocolCable } from '#shared/protocol/protocol-cable.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { append } from '../../ledger/ledger.ts';
import { enterProtocol } from '../../ledger/registry-log.ts';
import { codesToDrawMail } from '../../mail/mails.ts';
import { postMail } from '../../mail/outbox.ts';
import { pageAddresses } from '../../mail/page-addresses.ts';
import type { Cable } from '../cables/cable.entity.ts';
import { cablesById } from '../cables/cables.store.ts';
import { findById } from '../users/users.store.ts';
import { cableIds, requireReferences } from './references.service.ts';
import { lockedStudy, studyOrProblem, viewOf } from './studies.service.ts';
import * as store from './studies.store.ts';
import type { Study } from './study.entity.ts';

type Choice = StudyDraft['cables'][number];

function protocolCable(cables: readonly Cable[], choice: Choice): ProtocolCable {
  const cable = cables.find(({ id }) => id === choice.cableId);
  if (cable === undefined) throw new Error('a checked reference is gone');
  const { id, name, kind, lengthMm, description } = cable;
  const specimens = cable.specimens
    .filter((specimen) => choice.specimenIds.includes(specimen.id))
    .map(({ id: specimenId, serial, note }) => ({ id: specimenId, serial, note }));
  return { id, name, kind, lengthMm, description, specimens };
}

/** The protocol that a draft comes to now, as a version of a study. */
export async function protocolAs(
  tx: Tx,
  study: Study,
  draft: StudyDraft,
  { version, salt }: { version: number; salt: string },
): Promise<Protocol> {
  const cables = await cablesById(tx, study.organisationId, cableIds(draft));
  return protocolFromDraft(draft, {
    study: study.id,
    version,
    salt,
    cables: [protocolCable(cables, draft.cables[0]), protocolCable(cables, draft.cables[1])],
    checkCable: ({ cableId }) => {
      const step = draft.checks?.steps.find((candidate) => candidate.cableId === cableId);
      if (step === undefined) throw new Error('a step without its check cable');
      return protocolCable(cables, step);
    },
  });
}

/**
 * Keeps a version of the protocol, puts it in force and enters it in the registry. Comes before the entry on the record,
 * whose signature needs the organisation's key: see `enterProtocol`.
 *
 * @returns its digest
 */
export async function enterSealed(tx: Tx, deps: Deps, study: Study, protocol: Protocol, now: number): Promise<string> {
  const { version } = protocol;
  const digest = protocolDigest(protocol);
  const sealedAt = new Date(now).toISOString();
  await enterProtocol(tx, deps, study.organisationId, { study: study.id, version, digest, sealedAt });
  const text = canonicalJson(protocol);
  await store.insertVersion(tx, { studyId: study.id, version, protocol: text });
  await store.updateStudy(tx, study.id, { state: 'sealed', protocol: text }, new Date(now));
  return digest;
}

/** Seals the protocol: its digest becomes the first entry of the study's record, and nothing in it changes any more. */
export function sealStudy(
  deps: Deps,
  where: { organisationId: string; id: string },
  userId: string,
): Promise<StudyReply> {
  const { random, clock } = deps;
  return withTransaction(deps.db, async (tx) => {
    const study = await lockedStudy(tx, where);
    if (study.state !== 'draft') throw new Problem('wrong-phase', 'The protocol is sealed already.');
    await requireReferences(tx, where.organisationId, study.draft);
    const salt = random.bytes('protocol-salt', 32).toString('hex');
    const protocol = await protocolAs(tx, study, study.draft, { version: 1, salt });
    const now = clock.now();
    const digest = await enterSealed(tx, deps, study, protocol, now);
    const payload = { protocolVersion: 1, digest, sealedBy: userId };
    await append(tx, deps, study.id, [{ kind: 'protocol-sealed', at: now, payload, session: null }]);
    await tellCodeHolder(tx, deps, study);
    return viewOf(tx, await studyOrProblem(tx, where));
  });
}

/** Tells the code holder that there are codes to draw, or to look after. */
export async function tellCodeHolder(
  tx: Tx,
  deps: Deps,
  { id, organisationId, title, codeHolderId }: Study,
): Promise<void> {
  const holder = await findById(tx, codeHolderId);
  if (holder === null) throw new Error('a checked code holder is gone');
  const url = pageAddresses.codes(deps.config, organisationId, id);
  await postMail(tx, deps, { organisationId, recipient: holder.email }, codesToDrawMail({ title, url }));
}
