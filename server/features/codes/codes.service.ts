import type { CodeSheet, CodesStatus } from '#shared/contracts/codes.ts';
import { Problem } from '#shared/problem.ts';
import { codedCables } from '#shared/protocol/protocol.ts';
import { labelText, studyMark } from '#shared/session/label-text.ts';
import { studyEvents } from '#shared/session/study-events.ts';
import { commitCodeKey, openForHolder, type SpecimenToCode } from '../../blind/index.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { append, readKinds } from '../../ledger/ledger.ts';
import { qrSvg } from '../../qr/qr-svg.ts';
import { lockedStudy, protocolOf, studyOrProblem } from '../studies/studies.service.ts';
import { updateStudy } from '../studies/studies.store.ts';
import type { Study } from '../studies/study.entity.ts';
import { namesOf } from '../users/users.store.ts';

type Where = { organisationId: string; id: string };
type Asker = { userId: string; role: string | null };

/** A study shows its codes' state to its managers and its code holder; to anyone else it does not exist. */
function requireInterest(study: Study, who: Asker): void {
  const mayKnow = study.codeHolderId === who.userId || who.role === 'owner' || who.role === 'manager';
  if (!mayKnow) throw new Problem('not-found', 'There is no such study.');
}

function requireHolder(study: Study, who: Asker): void {
  requireInterest(study, who);
  if (study.codeHolderId !== who.userId)
    throw new Problem('not-allowed', 'Only the code holder of this study does this.');
}

/** Check cables are sleeved and coded with the others, so that nothing tells them apart. */
function specimensOf(study: Study): SpecimenToCode[] {
  return codedCables(protocolOf(study)).flatMap(({ specimens }, cable) =>
    specimens.map(({ id, serial }) => ({ specimen: id, serial, cable })),
  );
}

async function statusOf(tx: Tx, study: Study, who: Asker): Promise<CodesStatus> {
  const entries = await readKinds(tx, study.id, ['code-key-committed', 'code-key-opened', 'code-key-voided']);
  const openings = entries
    .filter((entry) => entry.kind === 'code-key-opened')
    .map((entry) => ({ at: entry.at, ...studyEvents['code-key-opened'].parse(entry.payload) }));
  const names = await namesOf(tx, [study.codeHolderId, ...openings.map(({ by }) => by)]);
  const last = entries.findLast(({ kind }) => kind === 'code-key-committed' || kind === 'code-key-voided');
  const committed = last?.kind === 'code-key-committed' ? last : undefined;
  return {
    studyId: study.id,
    title: study.title,
    isSealed: study.state !== 'draft',
    state: study.codesState,
    specimenCount: [...study.draft.cables, ...(study.draft.checks?.steps ?? [])].reduce(
      (sum, { specimenIds }) => sum + specimenIds.length,
      0,
    ),
    codeHolder: names.get(study.codeHolderId) ?? 'unknown',
    youHoldCodes: study.codeHolderId === who.userId,
    commitment: committed === undefined ? null : String(committed.payload.commitment),
    voidedAt: last?.kind === 'code-key-voided' ? last.at : null,
    openings: openings.map(({ at, by, purpose }) => ({ at, by: names.get(by) ?? 'unknown', purpose })),
  };
}

export function codesStatus({ db }: Deps, where: Where, who: Asker): Promise<CodesStatus> {
  return withTransaction(db, async (tx) => {
    const study = await studyOrProblem(tx, where);
    requireInterest(study, who);
    return statusOf(tx, study, who);
  });
}

/** Draws the codes and puts the commitment to the code key on the record. */
export function drawCodes(deps: Deps, where: Where, who: Asker): Promise<CodesStatus> {
  const { random, clock } = deps;
  return withTransaction(deps.db, async (tx) => {
    const study = await lockedStudy(tx, where);
    requireHolder(study, who);
    if (study.state === 'draft') throw new Problem('wrong-phase', 'Codes are drawn once the protocol is sealed.');
    if (study.codesState !== 'none') throw new Problem('wrong-phase', 'The codes are drawn already.');
    const specimens = specimensOf(study);
    const commitment = await commitCodeKey(tx, random, study.id, specimens);
    const payload = { commitment, specimens: specimens.length, by: who.userId };
    await append(tx, deps, study.id, [{ kind: 'code-key-committed', at: clock.now(), payload, session: null }]);
    await updateStudy(tx, study.id, { codesState: 'drawn' }, new Date(clock.now()));
    return statusOf(tx, await studyOrProblem(tx, where), who);
  });
}

/** The code sheet for its holder; the opening goes on the record first. */
export function openCodes(deps: Deps, where: Where, who: Asker, purpose: 'labels' | 'check'): Promise<CodeSheet> {
  const { clock } = deps;
  return withTransaction(deps.db, async (tx) => {
    const study = await lockedStudy(tx, where);
    requireHolder(study, who);
    if (study.codesState === 'none') throw new Problem('wrong-phase', 'No codes are drawn yet.');
    const payload = { by: who.userId, purpose };
    await append(tx, deps, study.id, [{ kind: 'code-key-opened', at: clock.now(), payload, session: null }]);
    const rows = await openForHolder(tx, study.id, who.userId);
    const mark = studyMark(study.id);
    const cables = codedCables(protocolOf(study));
    return {
      title: study.title,
      mark,
      rows: await Promise.all(
        rows.map(async ({ code, serial, cable }) => {
          const labels = await Promise.all(
            ([1, 2] as const).map(async (end) => {
              const scanText = labelText(mark, code, end);
              return { end, scanText, qrSvg: await qrSvg(scanText) };
            }),
          );
          return { code, cable: cables[cable]?.name ?? '', serial, labels };
        }),
      ),
    };
  });
}

/** The code holder's word that every specimen is sleeved and labelled at both ends. */
export function confirmCodes(deps: Deps, where: Where, who: Asker): Promise<CodesStatus> {
  const { clock } = deps;
  return withTransaction(deps.db, async (tx) => {
    const study = await lockedStudy(tx, where);
    requireHolder(study, who);
    if (study.codesState !== 'drawn')
      throw new Problem(
        'wrong-phase',
        study.codesState === 'none' ? 'Draw the codes first.' : 'The codes are confirmed already.',
      );
    const payload = { by: who.userId };
    await append(tx, deps, study.id, [{ kind: 'code-key-confirmed', at: clock.now(), payload, session: null }]);
    await updateStudy(tx, study.id, { codesState: 'confirmed' }, new Date(clock.now()));
    return statusOf(tx, await studyOrProblem(tx, where), who);
  });
}
