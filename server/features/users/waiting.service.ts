import { isClosed } from '#shared/contracts/studies.ts';
import type { WaitingItem } from '#shared/contracts/users.ts';
import { withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { levelsWaitingFor } from '../levels/levels-waiting.service.ts';
import type { Session } from '../sessions/session.entity.ts';
import { sessionsOfStudies } from '../sessions/sessions.store.ts';
import { studiesOf } from '../studies/studies.store.ts';
import { closingOf, progressOf } from '../studies/studies.views.ts';
import type { Study } from '../studies/study.entity.ts';

type Asker = { organisationId: string; userId: string; role: string | null };

const item = (
  study: Study,
  kind: WaitingItem['kind'],
  detail: string,
  sessionId: string | null = null,
): WaitingItem => ({
  kind,
  studyId: study.id,
  sessionId,
  title: study.title,
  detail,
  since: study.updatedAt.toISOString(),
});

function forManager(study: Study, sessions: readonly Session[]): WaitingItem[] {
  const { sessionsPlanned, sessionsToPlan, trialsRegistered, trialsLocked } = progressOf(study, sessions);
  const closing = closingOf(study, sessions);
  if (study.state === 'draft') return [item(study, 'draft-to-finish', 'A draft, not sealed yet')];
  if (study.state === 'closed')
    return [item(study, 'report-to-read', 'Closed; read the report, then publish or shelve it')];
  if (isClosed(study.state)) return [];
  const waiting: WaitingItem[] = [];
  if (sessionsToPlan > 0)
    waiting.push(item(study, 'session-to-plan', `${sessionsPlanned} of ${study.draft.sessions} sessions planned`));
  if (closing.allowed && closing.complete)
    waiting.push(item(study, 'study-to-close', `${trialsLocked} of ${trialsRegistered} trials locked`));
  return waiting;
}

function forCodeHolder(study: Study): WaitingItem[] {
  if (study.state === 'draft' || isClosed(study.state)) return [];
  if (study.codesState === 'none')
    return [item(study, 'codes-to-draw', 'Draw the blind codes and sleeve the specimens')];
  if (study.codesState === 'drawn') return [item(study, 'codes-to-confirm', 'Label both ends, then confirm')];
  return [];
}

function forProctor(study: Study, sessions: readonly Session[], userId: string): WaitingItem[] {
  return sessions
    .filter(({ proctorId, phase }) => proctorId === userId && phase !== 'finished' && phase !== 'abandoned')
    .map(({ id, number, room, phase }) =>
      item(study, 'session-to-run', `Session ${number}, ${room}${phase === 'planned' ? '' : ', open now'}`, id),
    );
}

/** What waits for a person, by role and by the duties they hold; the latest change first. */
export function waitingFor({ db }: Deps, { organisationId, userId, role }: Asker): Promise<WaitingItem[]> {
  return withTransaction(db, async (tx) => {
    const studies = await studiesOf(tx, organisationId);
    const sessions = await sessionsOfStudies(
      tx,
      studies.map(({ id }) => id),
    );
    const waiting: WaitingItem[] = [];
    for (const study of studies) {
      const own = sessions.filter((session) => session.studyId === study.id);
      const levels = await levelsWaitingFor(tx, study, own, userId);
      const isManager = role === 'owner' || role === 'manager';
      const closed =
        role === 'reviewer' && study.state === 'closed'
          ? [item(study, 'report-to-read', 'Closed; the report is ready')]
          : [];
      waiting.push(
        ...forProctor(study, own, userId),
        ...levels.map(({ sessionId, detail }) => item(study, 'levels-to-measure', detail, sessionId)),
        ...(study.codeHolderId === userId ? forCodeHolder(study) : []),
        ...(isManager ? forManager(study, own) : closed),
      );
    }
    return waiting;
  });
}
