import { createHash } from 'node:crypto';
import type { OpenSession } from '#shared/contracts/seats.ts';
import { Problem } from '#shared/problem.ts';
import type { Deps } from '../../deps.ts';
import type { SessionMemory } from '../../live/session-memory.ts';
import type { Sitting } from '../../live/sitting.ts';
import type { Sittings } from '../../live/sittings.ts';
import { sessionByCode } from './sessions.store.ts';

export const tokenDigest = (token: string) => createHash('sha256').update(token).digest('hex');

/** The session or rehearsal that takes listeners under a code. */
async function sittingUnder({ db }: Deps, sittings: Sittings, code: string): Promise<Sitting> {
  const session = await sessionByCode(db.manager, code);
  const sitting = session === null ? sittings.rehearsals.byCode(code) : await sittings.of(session.id);
  if (sitting === null)
    throw new Problem('not-found', 'No session takes listeners under this code. Check it on the proctor’s screen.');
  return sitting;
}

/** How long a session takes, in whole minutes: every presentation with its change, the answers, and the familiarisation. */
function minutesOf({ method, state: { plan } }: SessionMemory): number {
  const longestMs = Math.max(...plan.programme.map(({ lengthMs }) => lengthMs));
  const presentationMs = plan.changeMs + longestMs;
  const trialMs = method.presentations.length * presentationMs + plan.answerMs;
  return Math.max(1, Math.ceil((plan.trials * trialMs + method.familiarisation.length * presentationMs) / 60_000));
}

/** What a listener is told before taking a seat. */
export async function lookAtSession(deps: Deps, sittings: Sittings, code: string): Promise<OpenSession> {
  const { memory } = await sittingUnder(deps, sittings, code);
  return {
    title: memory.title,
    room: memory.session.room,
    minutes: minutesOf(memory),
    trials: memory.state.plan.trials,
    running: memory.state.phase === 'running',
    rehearsal: memory.isRehearsal,
  };
}

/** Takes a seat: consent, a label in the study, and a token that is the seat. */
export async function takeSeat(
  deps: Deps,
  sittings: Sittings,
  body: { code: string; place: string; commitment: string; consentVersion: number },
): Promise<{ token: string; seat: string }> {
  const sitting = await sittingUnder(deps, sittings, body.code);
  return sitting.takeSeat(body);
}
