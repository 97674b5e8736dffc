import { checkTrialsOf } from '#shared/contracts/check-draft.ts';
import type { SignedHead } from '#shared/contracts/signed-heads.ts';
import type { Study as StudyReply, StudyRow } from '#shared/contracts/studies.ts';
import type { Entry } from '#shared/ledger/chain.ts';
import type { SealedVersion } from '#shared/ledger/protocol-versions.ts';
import type { Protocol } from '#shared/protocol/protocol.ts';
import { protocolDifferences } from '#shared/protocol/protocol-differences.ts';
import type { Session } from '../sessions/session.entity.ts';
import type { Study } from './study.entity.ts';

/** How far a study has come: sessions and locked trials, never scores. */
export function progressOf(study: Study, sessions: readonly Session[]): StudyRow['progress'] {
  const opened = sessions.filter(
    (session) => session.code !== null || session.listeners > 0 || session.phase === 'finished',
  );
  const standing = sessions.filter(({ phase }) => phase !== 'abandoned');
  return {
    sessionsPlanned: sessions.length,
    sessionsOpened: opened.length,
    sessionsEnded: sessions.filter(({ phase }) => phase === 'finished' || phase === 'abandoned').length,
    sessionsToPlan: Math.max(0, study.draft.sessions - standing.length),
    trialsLocked: sessions.reduce((sum, session) => sum + session.trialsLocked, 0),
    trialsRegistered: study.draft.sessions * (study.draft.trials + checkTrialsOf(study.draft.checks)),
  };
}

const shape = ({ id, title, draft, state, updatedAt }: Study) => ({
  id,
  title,
  method: draft.method,
  state,
  updatedAt: updatedAt.toISOString(),
});

export function studyRowView(study: Study, sessions: readonly Session[]): StudyRow {
  return { ...shape(study), progress: progressOf(study, sessions) };
}

/** Whether the study can be closed now, and what stands in the way. */
export function closingOf(study: Study, sessions: readonly Session[]): StudyReply['closing'] {
  const { trialsLocked, trialsRegistered, sessionsOpened } = progressOf(study, sessions);
  const complete = trialsLocked >= trialsRegistered;
  const isOpen = sessions.some(({ phase }) => phase === 'seating' || phase === 'revealing' || phase === 'running');
  if (study.state !== 'collecting' || sessionsOpened === 0)
    return { allowed: false, complete, why: 'No session has been opened yet.' };
  if (isOpen) return { allowed: false, complete, why: 'A session is still open. Finish or abandon it first.' };
  const why = complete
    ? `All ${trialsRegistered} registered trials are locked.`
    : `${trialsLocked} of ${trialsRegistered} registered trials are locked. Closing now ends the study early.`;
  return { allowed: true, complete, why };
}

export type StudyContext = {
  readonly sessions: readonly Session[];
  readonly names: ReadonlyMap<string, string>;
  readonly cableNames: readonly [string, string];
  /** As the record says, and as they are kept: the first first. */
  readonly versions: readonly SealedVersion[];
  readonly protocols: readonly Protocol[];
  readonly deviations: readonly Entry[];
  readonly heads: readonly SignedHead[];
};

/** Whether the sealed protocol can still be amended, and why not. */
export function amendingOf(study: Study, sessions: readonly Session[]): StudyReply['amending'] {
  if (study.state === 'draft') return { allowed: false, why: 'The protocol is not sealed yet: edit the draft.' };
  const opened = progressOf(study, sessions).sessionsOpened > 0;
  if (study.state !== 'sealed' || opened)
    return {
      allowed: false,
      why: 'A session has opened, so the protocol stays as it is. Whatever differs from it is recorded as a deviation.',
    };
  return { allowed: true, why: 'No session has opened yet.' };
}

function versionsView(
  { versions, protocols, heads }: StudyContext,
  nameOf: (id: string) => string,
): StudyReply['versions'] {
  return versions.map(({ version, digest, at, by, reason, sequence }, index) => {
    const [before, after] = [protocols[index - 1], protocols[index]];
    return {
      version,
      digest,
      sealedAt: at,
      sealedBy: nameOf(by),
      signed: heads.find((head) => head.sequence === sequence) ?? null,
      reason,
      changes: before === undefined || after === undefined ? [] : protocolDifferences(before, after, nameOf),
    };
  });
}

/** A study as its manager sees it before closing. */
export function studyView(study: Study, context: StudyContext): StudyReply {
  const { sessions, names, cableNames, deviations } = context;
  const nameOf = (id: string) => names.get(id) ?? 'unknown';
  const versions = versionsView(context, nameOf);
  return {
    ...shape(study),
    draft: study.draft,
    cableNames: [cableNames[0], cableNames[1]],
    manager: nameOf(study.managerId),
    codeHolder: nameOf(study.codeHolderId),
    sealed: versions.at(-1) ?? null,
    versions,
    amending: amendingOf(study, sessions),
    codes: study.codesState,
    progress: progressOf(study, sessions),
    record: { entries: study.headSequence, head: study.headDigest },
    closing: closingOf(study, sessions),
    deviations: deviations.map(({ at, payload }) => ({ at, text: String(payload.text) })),
  };
}
