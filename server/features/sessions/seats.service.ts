import { createHash } from 'node:crypto';
import type { OpenSession } from '#shared/contracts/seats.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { Problem } from '#shared/problem.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import type { Sittings } from '../../live/sittings.ts';
import { studyById } from '../studies/studies.store.ts';
import type { Session } from './session.entity.ts';
import { sessionByCode } from './sessions.store.ts';

export const tokenDigest = (token: string) => createHash('sha256').update(token).digest('hex');

async function openSession(tx: Tx, code: string): Promise<Session> {
  const session = await sessionByCode(tx, code);
  if (session === null)
    throw new Problem('not-found', 'No session takes listeners under this code. Check it on the proctor’s screen.');
  return session;
}

/** How long a session takes, in whole minutes: every presentation with its change, the answers, and the familiarisation. */
function minutesOf({
  draft,
}: {
  draft: { method: string; trials: number; changeS: number; answerS: number; programme: { lengthS: number }[] };
}): number {
  const { presentations, familiarisation } = methodOf(draft.method);
  const longest = Math.max(...draft.programme.map(({ lengthS }) => lengthS));
  const presentation = draft.changeS + longest;
  const trial = presentations.length * presentation + draft.answerS;
  const seconds = draft.trials * trial + familiarisation.length * presentation;
  return Math.max(1, Math.ceil(seconds / 60));
}

/** What a listener is told before taking a seat. */
export function lookAtSession({ db }: Deps, code: string): Promise<OpenSession> {
  return withTransaction(db, async (tx) => {
    const session = await openSession(tx, code);
    const study = await studyById(tx, session.studyId);
    return {
      title: study.title,
      room: session.room,
      minutes: minutesOf(study),
      trials: study.draft.trials,
      running: session.phase === 'running',
    };
  });
}

/** Takes a seat: consent, a label in the study, and a token that is the seat. */
export async function takeSeat(
  { db }: Deps,
  sittings: Sittings,
  body: { code: string; place: string; commitment: string; consentVersion: number },
): Promise<{ token: string; seat: string }> {
  const session = await openSession(db.manager, body.code);
  const sitting = await sittings.of(session.id);
  return sitting.takeSeat(body);
}
