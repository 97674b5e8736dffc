import { confirmationIds, type PublicationDraft } from '#shared/contracts/publications.ts';
import type { StudyDraft } from '#shared/contracts/studies.ts';
import type { Deps } from '../deps.ts';
import { publish } from '../features/publications/publications.service.ts';
import { planSession } from '../features/sessions/sessions.service.ts';
import { closeStudy } from '../features/studies/closing.service.ts';
import { recordDeviation } from '../features/studies/studies.service.ts';
import { Sittings } from '../live/sittings.ts';
import { publishedStatements } from './demo-scenario.ts';
import type { HandClock } from './hand-clock.ts';
import { demoLinks } from './invite-listeners.ts';
import { demoTimeZone, type People, prepareStudy } from './prepare-study.ts';
import { type Hearing, SimulatedSession } from './simulated-session.ts';

/** A simulated listener who hears the difference in some of the trials and guesses in the others. */
const hearingIn =
  (share: number): Hearing =>
  ([a, , x]) => {
    if (Math.random() < share) return x === a ? 'A' : 'B';
    return Math.random() < 0.5 ? 'A' : 'B';
  };

const confirmed = Object.fromEntries(confirmationIds.map((name) => [name, true])) as PublicationDraft['confirmations'];

/** Runs a study of single listeners from its seal to its publication; its second session ends before its trials. */
export async function runPublishedStudy(
  deps: Deps,
  clock: HandClock,
  organisationId: string,
  people: People,
  draft: StudyDraft,
): Promise<void> {
  const { where, sessionId } = await prepareStudy(deps, organisationId, people, draft);
  const sittings = new Sittings(deps);
  const hearings = [0.75, null, 0.6, 0.8];
  const listeners = ['ilse', 'bram', 'bram', 'oona'].map((name) => `${name}@listeners.example`);
  for (const [index, share] of hearings.entries()) {
    clock.advance(3_600_000);
    const plannedAt = new Date(clock.now()).toISOString();
    const id =
      index === 0
        ? sessionId
        : (
            await planSession(deps, where, {
              plannedAt,
              timeZone: demoTimeZone,
              room: 'Listening room',
              proctorId: people.proctor,
            })
          ).id;
    const session = await SimulatedSession.open(deps, clock, sittings, id);
    // Whoever came when the amplifier failed comes back: one listener, one label.
    const listener = listeners[index];
    const invited = { organisationId, userId: people.manager };
    await session.seat(['Armchair'], listener === undefined ? [] : await demoLinks(deps, invited, id, [listener]));
    if (share === null) {
      await session.abandon('The amplifier went into protection during seating.');
      continue;
    }
    await session.familiarise();
    let trial = 0;
    while (session.trialsLeft) {
      trial += 1;
      const fault =
        index === 2 && trial === 4 ? { reason: 'drop-out' as const, note: 'The player skipped.' } : undefined;
      await session.trial(hearingIn(share), fault);
    }
    await session.finish();
  }
  await sittings.stop();
  await recordDeviation(
    deps,
    where,
    'The amplifier was exchanged for a second one of the same model after session 2; nothing else in the chain changed.',
  );
  clock.advance(900_000);
  await closeStudy(deps, where, people.manager, '');
  clock.advance(86_400_000);
  await publish(deps, where, people.manager, { ...publishedStatements, confirmations: confirmed });
}
