import type { PayloadOf } from '../session/events.ts';
import { requestLeaf } from '../session/request-leaf.ts';
import type { SessionState } from '../session/state.ts';
import type { StudyReading } from './study-reading.ts';

type Requested = PayloadOf<'presentation-requested'>;

const nameOf = (session: string, trial: number, presentation: number) => `${session} ${trial} ${presentation}`;

function leavesFaults(study: StudyReading, requested: readonly Requested[]): string[] {
  const requests = study.requests();
  const ids = new Map(study.sessions().map(({ session, sessionId }) => [session, sessionId]));
  const leaves = new Map(
    requests.map((one) => [nameOf(one.session, one.trial, one.presentation), requestLeaf(one)] as const),
  );
  const names = requested.map(({ session, trial, presentation }) =>
    nameOf(ids.get(session) ?? '', trial, presentation),
  );
  const faults = requested.flatMap(({ session, trial, presentation, leaf }, index) =>
    leaves.get(names[index] ?? '') === leaf
      ? []
      : [`Session ${session}, trial ${trial}: presentation ${presentation + 1} does not match the record.`],
  );
  const known = new Set(names);
  const stray = requests.find((one) => !known.has(nameOf(one.session, one.trial, one.presentation)));
  if (stray !== undefined) faults.push(`Trial ${stray.trial}: the record holds no presentation as asked for.`);
  if (known.size < requested.length || leaves.size < requests.length) faults.push('A request comes twice.');
  return faults;
}

/** Nobody answered before each was heard, and nobody heard more than the protocol allows. */
function orderFaults(study: StudyReading, { session, sessionId, plan, ended }: SessionState): string[] {
  const { onRequest } = plan;
  if (onRequest === undefined) return [];
  const labels = study.method().presentations;
  return ended.flatMap(({ trial, outcome, seats, missing }) => {
    const own = study.requests().filter((one) => one.session === sessionId && one.trial === trial);
    const heard = new Set(own.map(({ label }) => label));
    const isAnswered = outcome === 'locked' && missing.length < seats.length;
    return [
      ...(own.length > onRequest.most
        ? [`Session ${session}, trial ${trial}: more was presented than the protocol allows.`]
        : []),
      ...(isAnswered && labels.some((label) => !heard.has(label))
        ? [`Session ${session}, trial ${trial}: it was answered before each was heard.`]
        : []),
    ];
  });
}

/** Whatever was asked for on request matches its leaf, and went by the protocol. */
export function requestFaults(study: StudyReading): { readonly faults: readonly string[]; readonly count: number } {
  const requested = study
    .entries()
    .filter(({ kind }) => kind === 'presentation-requested')
    .map(({ payload }) => payload as unknown as Requested);
  const faults = [...leavesFaults(study, requested), ...study.sessions().flatMap((state) => orderFaults(study, state))];
  return { faults, count: requested.length };
}
