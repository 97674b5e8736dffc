import { answerLeaf } from '../session/answer-leaf.ts';
import type { PayloadOf } from '../session/events.ts';
import type { SessionState } from '../session/state.ts';
import { remarkFaults } from './check-remarks.ts';
import { requestFaults } from './check-requests.ts';
import { answerName } from './publication-parts.ts';
import type { StudyReading } from './study-reading.ts';
import type { Verdict } from './verify.ts';

function locksOf(study: StudyReading): PayloadOf<'trial-locked'>[] {
  return study
    .entries()
    .filter(({ kind }) => kind === 'trial-locked')
    .map(({ payload }) => payload as unknown as PayloadOf<'trial-locked'>);
}

/** Every locked leaf has its answer, and every answer its leaf. */
export function checkAnswers(study: StudyReading): Verdict {
  const answers = study.answers();
  const leaves = new Map(answers.map((answer) => [answerName(answer), answerLeaf(answer)]));
  const ids = new Map(study.sessions().map(({ session, sessionId }) => [session, sessionId]));
  const faults: string[] = [];
  const locked = new Set<string>();
  for (const { session, trial, leaves: expected } of locksOf(study)) {
    for (const { seat, leaf } of expected) {
      const name = answerName({ session: ids.get(session) ?? '', trial, seat });
      locked.add(name);
      if (leaves.get(name) !== leaf)
        faults.push(`Session ${session}, trial ${trial}, ${seat}: the answer does not match the record.`);
    }
  }
  const stray = answers.find((answer) => !locked.has(answerName(answer)));
  if (stray !== undefined) faults.push(`Trial ${stray.trial}, ${stray.seat}: the record holds no such answer.`);
  if (leaves.size < answers.length) faults.push('An answer comes twice.');
  const requests = requestFaults(study);
  const asked = requests.count === 0 ? '' : ` ${requests.count} presentations, each as it was asked for.`;
  return {
    faults: [...faults, ...requests.faults, ...remarkFaults(study)],
    held: `${locked.size} answers, each as it was when its trial locked.${asked}`,
  };
}

const lockName = ({ session, trial }: { session: number; trial: number }) => `${session} ${trial}`;

function sessionFaults(state: SessionState, locks: ReadonlyMap<string, PayloadOf<'trial-locked'>>): string[] {
  const { session, phase, ended, plan } = state;
  const name = `Session ${session}`;
  const faults: string[] = [];
  if (phase !== 'finished' && phase !== 'abandoned') faults.push(`${name} has no end on the record.`);
  for (const [place, { trial }] of ended.entries())
    if (trial !== place + 1) faults.push(`${name}: trial ${place + 1} is missing.`);
  const locked = ended.filter(({ outcome }) => outcome === 'locked');
  const voids = ended.length - locked.length;
  const due = plan.trials + Math.min(voids, plan.spares);
  if (phase === 'finished' && ended.length !== due)
    faults.push(`${name} was finished with ${ended.length} trials where ${due} were due.`);
  if (ended.length > plan.trials + plan.spares) faults.push(`${name} has more trials than were drawn.`);
  for (const { trial, seats } of locked) {
    const lock = locks.get(lockName({ session, trial }));
    const heard = [...(lock?.leaves.map(({ seat }) => seat) ?? []), ...(lock?.missing ?? [])].sort();
    if (heard.join() !== [...seats].sort().join())
      faults.push(`${name}, trial ${trial}: a listener who was seated is neither answered nor missing.`);
  }
  return faults;
}

/** Trial numbers run without gaps in every session; what was drawn was counted, void, left open, or not needed. */
export function checkTrials(study: StudyReading): Verdict {
  const sessions = study.sessions();
  const locks = new Map(locksOf(study).map((lock) => [lockName(lock), lock]));
  const faults = sessions.flatMap((state) => sessionFaults(state, locks));
  const ended = sessions.flatMap((state) => state.ended);
  const counted = ended.filter(({ outcome }) => outcome === 'locked').length;
  const held = `${counted} trials counted, ${ended.length - counted} void; numbers run without gaps.`;
  return { faults, held };
}

/** Every session has its number, and whichever was opened has its end. */
export function checkSessions(study: StudyReading): Verdict {
  const sessions = study.sessions();
  const faults = sessions.flatMap(({ session }, index) =>
    session === index + 1 ? [] : [`Session ${index + 1} is missing.`],
  );
  return { faults, held: `Sessions 1 to ${sessions.length}, none left out.` };
}
