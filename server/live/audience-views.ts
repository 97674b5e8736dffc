import { type ListenerView, type LockReceipt, listenerView } from '#shared/contracts/listener-live.ts';
import { type ProctorView, proctorView } from '#shared/contracts/proctor-live.ts';
import { contributionsOf } from '#shared/session/counted-trials.ts';
import { presentationsOf } from '#shared/session/progress.ts';
import { listenerViewOf, type Presence, proctorViewOf } from '#shared/session/views.ts';
import { cueFor } from '../blind/index.ts';
import type { Deps } from '../deps.ts';
import { joinOf } from './join.ts';
import type { SessionMemory } from './session-memory.ts';

/** What one seat's phone shows now. */
export function phoneViewOf(memory: SessionMemory, seat: string, now: number): ListenerView {
  const { lock } = memory;
  const leaf = lock?.leaves.get(seat);
  const lastLock: LockReceipt | null =
    lock === null || leaf === undefined
      ? null
      : { trial: lock.trial, leaf, sequence: lock.sequence, digest: lock.digest };
  const context = { title: memory.title, seat, now, held: memory.held.get(seat) ?? null, lastLock };
  return listenerView.parse(listenerViewOf(memory.state, memory.method, context));
}

/** What the console shows now. */
export async function consoleViewOf(
  { config, clock, db }: Deps,
  memory: SessionMemory,
  awaySince: (seat: string) => number | null,
): Promise<ProctorView> {
  const { state, session, method } = memory;
  const presence: Presence[] = [...memory.seats].map(([seat, { place }]) => ({
    seat,
    place,
    awaySince: awaySince(seat),
  }));
  const isOpen = state.phase === 'seating' || state.phase === 'revealing' || state.phase === 'running';
  return proctorView.parse(
    proctorViewOf(state, method, {
      title: memory.title,
      room: session.room,
      now: clock.now(),
      code: await codeToFit(db, memory),
      join: isOpen && session.code !== null ? await joinOf(config.publicUrl, session.code) : null,
      presence,
      entries: memory.entries,
      demo: config.demo,
    }),
  );
}

/** The blind code of the presentation that is being fitted or heard. */
async function codeToFit(db: Deps['db'], { state, session, method }: SessionMemory): Promise<string | null> {
  const { trial, plan } = state;
  if (trial === null || trial.stage === 'answering') return null;
  const presentation = presentationsOf(method, trial.trial)[trial.presentation];
  if (presentation === undefined) throw new Error('a trial beyond its presentations');
  return cueFor(db.manager, {
    studyId: session.studyId,
    sessionId: session.id,
    contributions: contributionsOf(state),
    method,
    trials: plan.trials + plan.spares,
    trial: trial.trial,
    presentation,
  });
}
