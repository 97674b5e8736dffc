import type { AmendmentPreview, StudyDraft, Study as StudyReply } from '#shared/contracts/studies.ts';
import type { Json } from '#shared/ledger/canonical-json.ts';
import { Problem } from '#shared/problem.ts';
import { codedCables, type Protocol, sessionPlanOf } from '#shared/protocol/protocol.ts';
import { protocolDifferences } from '#shared/protocol/protocol-differences.ts';
import { voidCodeKey } from '../../blind/index.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { append, type NewEntry } from '../../ledger/ledger.ts';
import type { Sittings } from '../../live/sittings.ts';
import type { Session } from '../sessions/session.entity.ts';
import { sessionsOfStudy } from '../sessions/sessions.store.ts';
import { namesOf } from '../users/users.store.ts';
import { requireReferences } from './references.service.ts';
import { enterSealed, protocolAs, tellCodeHolder } from './sealing.service.ts';
import { lockedStudy, protocolOf, studyOrProblem, viewOf } from './studies.service.ts';
import * as store from './studies.store.ts';
import { amendingOf } from './studies.views.ts';
import type { Study } from './study.entity.ts';

type Where = { organisationId: string; id: string };
type Amendment = { draft: StudyDraft; reason: string; amends: number };

const isPlanned = ({ phase }: Session) => phase === 'planned';

function requireAmendable(study: Study, sessions: readonly Session[]): void {
  const { allowed, why } = amendingOf(study, sessions);
  if (!allowed) throw new Problem('wrong-phase', why);
}

/** The sessions that are planned already must find their place in the amended protocol. */
function requireRoom(draft: StudyDraft, sessions: readonly Session[], at: string): void {
  const planned = sessions.filter(isPlanned).length;
  if (planned > draft.sessions)
    throw new Problem('invalid-input', 'More sessions are planned than this would register.', [
      { pointer: `${at}/sessions`, detail: `${planned} are planned; cancel some first, or register as many` },
    ]);
}

/** What the codes are drawn for: other specimens, or another person who is to know them, need other codes. */
const codedBy = (protocol: Protocol) =>
  JSON.stringify([
    codedCables(protocol).map(({ specimens }) => specimens.map(({ id, serial }) => `${id} ${serial}`).sort()),
    protocol.design.codeHolder,
  ]);

type Prepared = { before: Protocol; after: Protocol; voidsCodes: boolean; planned: Session[] };

/** @param at where the draft stands in what was sent, as a JSON pointer */
async function prepare(tx: Tx, study: Study, draft: StudyDraft, salt: string, at: string): Promise<Prepared> {
  const sessions = await sessionsOfStudy(tx, study.id);
  requireAmendable(study, sessions);
  await requireReferences(tx, study.organisationId, draft, at);
  requireRoom(draft, sessions, at);
  const before = protocolOf(study);
  const after = await protocolAs(tx, study, draft, { version: before.version + 1, salt });
  return {
    before,
    after,
    voidsCodes: study.codesState !== 'none' && codedBy(before) !== codedBy(after),
    planned: sessions.filter(isPlanned),
  };
}

/** What an amendment would change, and what would follow. Nothing is stored. */
export function previewAmendment({ db }: Deps, where: Where, draft: StudyDraft): Promise<AmendmentPreview> {
  return withTransaction(db, async (tx) => {
    const study = await studyOrProblem(tx, where);
    const { before, after, voidsCodes, planned } = await prepare(tx, study, draft, '0'.repeat(64), '');
    const names = await namesOf(tx, [before.design.codeHolder, after.design.codeHolder]);
    return {
      amends: before.version,
      changes: protocolDifferences(before, after, (id) => names.get(id) ?? 'unknown'),
      codes: study.codesState === 'none' ? 'none' : voidsCodes ? 'void' : 'kept',
      sessionsReplanned: planned.length,
    };
  });
}

async function voidCodes(tx: Tx, deps: Deps, study: Study, by: string, at: number): Promise<void> {
  await voidCodeKey(tx, study.id);
  await append(tx, deps, study.id, [{ kind: 'code-key-voided', at, payload: { by }, session: null }]);
}

/** Planned sessions follow the protocol in force. */
function replanned(planned: readonly Session[], protocol: Protocol, at: number): NewEntry[] {
  const plan = sessionPlanOf(protocol) as unknown as Json;
  return planned.map(({ number }) => ({
    kind: 'session-replanned',
    at,
    payload: { session: number, plan },
    session: number,
  }));
}

/**
 * Seals the changed draft as the next version of a sealed protocol. All in one transaction: record, registry, codes and
 * planned sessions never stand apart.
 */
export async function amendStudy(
  deps: Deps,
  sittings: Sittings,
  where: Where,
  userId: string,
  { draft, reason, amends }: Amendment,
): Promise<StudyReply> {
  const { random, clock } = deps;
  const { planned, view } = await withTransaction(deps.db, async (tx) => {
    const study = await lockedStudy(tx, where);
    const salt = random.bytes('protocol-salt', 32).toString('hex');
    const { before, after, voidsCodes, planned } = await prepare(tx, study, draft, salt, '/draft');
    if (before.version !== amends)
      throw new Problem('stale-view', 'The protocol has been amended meanwhile. Look at it and try again.');
    if (protocolDifferences(before, after, (id) => id).length === 0)
      throw new Problem('invalid-input', 'Nothing differs from the sealed protocol.', [
        { pointer: '/draft', detail: 'Change something first' },
      ]);
    const now = clock.now();
    const digest = await enterSealed(tx, deps, study, after, now);
    const payload = { protocolVersion: after.version, digest, amendedBy: userId, reason };
    await append(tx, deps, study.id, [{ kind: 'protocol-amended', at: now, payload, session: null }]);
    if (voidsCodes) await voidCodes(tx, deps, study, userId, now);
    await append(tx, deps, study.id, replanned(planned, after, now));
    await store.updateDraft(tx, study.id, draft, new Date(now));
    if (voidsCodes) await store.updateStudy(tx, study.id, { codesState: 'none' }, new Date(now));
    const amended = await studyOrProblem(tx, where);
    if (voidsCodes || study.codeHolderId !== draft.codeHolderId) await tellCodeHolder(tx, deps, amended);
    return { planned, view: await viewOf(tx, amended) };
  });
  for (const { id } of planned) await sittings.readAfresh(id);
  return view;
}
