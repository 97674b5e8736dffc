import { levelFaultsIn } from './check-levels.ts';
import type { StudyReading } from './study-reading.ts';
import type { Verdict } from './verify.ts';

/** What the result on the record says of itself, as far as every method says it. */
type Counted = {
  readonly alpha?: unknown;
  readonly missingAnswers?: unknown;
  readonly sessions?: unknown;
  readonly trials?: unknown;
  readonly listeners?: unknown;
  readonly answers?: unknown;
  readonly missing?: unknown;
  readonly byListener?: readonly { readonly listener?: unknown }[];
};

const resultOf = (study: StudyReading) => (study.payloadOf('result-recorded')?.result ?? {}) as Counted;

const lockedIn = (study: StudyReading) =>
  study
    .sessions()
    .flatMap(({ session, ended }) =>
      ended.filter(({ outcome }) => outcome === 'locked').map((trial) => ({ ...trial, session })),
    );

/** Nobody was left out but by the registered rule, and a missing answer counts as the protocol says. */
export function checkRules(study: StudyReading): Verdict {
  const { analysis } = study.protocol();
  const result = resultOf(study);
  const locked = lockedIn(study);
  const heard = [...new Set(locked.flatMap(({ seats }) => seats))].sort();
  const reported = (result.byListener ?? []).map(({ listener }) => String(listener)).sort();
  const missing = locked.reduce((sum, trial) => sum + trial.missing.length, 0);
  const faults: string[] = [];
  if (analysis.exclusions !== 'none')
    faults.push(`The protocol registers exclusions that are not known: ${analysis.exclusions}.`);
  if (heard.join() !== reported.join())
    faults.push('The result does not speak of just the listeners who had an answer due.');
  if (result.missingAnswers !== analysis.missing)
    faults.push(
      `The result counts missing answers as “${String(result.missingAnswers)}”, the protocol as “${analysis.missing}”.`,
    );
  if (result.alpha !== analysis.alpha)
    faults.push('The result was held against another level than the registered one.');
  faults.push(...levelFaultsIn(study));
  return {
    faults,
    held: `Nobody was left out, of ${heard.length} listeners; ${missing} missing answers ${analysis.missing}.`,
  };
}

/** What was opened was counted, void or left open; what was due was answered or missing; the result says the same. */
export function checkFlow(study: StudyReading): Verdict {
  const entries = study.entries();
  const of = (kind: string) => entries.filter((entry) => entry.kind === kind).length;
  const sessions = study.sessions();
  const locked = lockedIn(study);
  const counted = locked.length;
  const voids = sessions.flatMap(({ ended }) => ended).length - counted;
  const stillOpen = sessions.filter(({ trial }) => trial !== null && trial.trial > 0).length;
  const opened = entries.filter(({ kind, payload }) => kind === 'trial-opened' && Number(payload.trial) > 0).length;
  const due = locked.reduce((sum, { seats }) => sum + seats.length, 0);
  const missing = locked.reduce((sum, trial) => sum + trial.missing.length, 0);
  const result = resultOf(study);
  const says: [string, unknown, number][] = [
    ['trials', result.trials, counted],
    ['answers', result.answers, due],
    ['missing answers', result.missing, missing],
    ['listeners', result.listeners, new Set(locked.flatMap(({ seats }) => seats)).size],
    ['sessions', result.sessions, new Set(locked.map(({ session }) => session)).size],
  ];
  const faults = says
    .filter(([, said, is]) => said !== is)
    .map(([what, said, is]) => `The result speaks of ${String(said)} ${what}, the record of ${is}.`);
  if (opened !== counted + voids + stillOpen)
    faults.push(
      `${opened} trials were opened; ${counted} counted, ${voids} void and ${stillOpen} left open do not make them up.`,
    );
  const ended = of('session-finished') + of('session-abandoned');
  if (ended !== sessions.filter(({ phase }) => phase === 'finished' || phase === 'abandoned').length)
    faults.push('The ends of sessions on the record do not match its sessions.');
  return {
    faults,
    held: `${opened} trials opened: ${counted} counted, ${voids} void, ${stillOpen} left open. ${due} answers due: ${due - missing} given, ${missing} missing.`,
  };
}
