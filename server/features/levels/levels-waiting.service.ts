import { isClosed } from '#shared/contracts/studies.ts';
import { type LevelCheckName, levelCheckWords } from '#shared/levels/measured-levels.ts';
import type { Tx } from '../../db/transaction.ts';
import { readKinds } from '../../ledger/ledger.ts';
import type { Session } from '../sessions/session.entity.ts';
import type { Study } from '../studies/study.entity.ts';
import { measurerOf } from './levels.service.ts';

export type LevelsWaiting = { readonly sessionId: string; readonly detail: string };

function dueIn({ phase, trialsLocked }: Session, study: Study, done: ReadonlySet<unknown>): LevelCheckName | null {
  if (!done.has('before')) return phase === 'planned' || phase === 'seating' ? 'before' : null;
  const half = Math.ceil(study.draft.trials / 2);
  if (phase === 'running') return trialsLocked >= half && !done.has('half-time') ? 'half-time' : null;
  const isOver = phase === 'finished' || phase === 'abandoned';
  return isOver && trialsLocked > 0 && !done.has('after') ? 'after' : null;
}

/** The sessions of a study whose levels wait for this person. */
export async function levelsWaitingFor(
  tx: Tx,
  study: Study,
  sessions: readonly Session[],
  userId: string,
): Promise<LevelsWaiting[]> {
  if (study.draft.levels === undefined || study.codesState !== 'confirmed' || isClosed(study.state)) return [];
  const waiting: LevelsWaiting[] = [];
  const entries = await readKinds(tx, study.id, ['levels-measured', 'levels-skipped']);
  for (const session of sessions) {
    if ((await measurerOf(tx, study, session)) !== userId) continue;
    const own = entries.filter(({ payload }) => payload.session === session.number);
    const due = dueIn(session, study, new Set(own.map(({ payload }) => payload.check)));
    if (due !== null)
      waiting.push({
        sessionId: session.id,
        detail: `Session ${session.number}, ${session.room}: measure the levels ${levelCheckWords[due]}`,
      });
  }
  return waiting;
}
