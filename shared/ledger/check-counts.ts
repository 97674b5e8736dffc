import type { CheckResult } from '../findings/check-result.ts';
import { decibels } from '../protocol/protocol-checks.ts';
import { kindOf } from '../session/fitting.ts';
import type { EndedTrial } from '../session/state.ts';
import type { TrialKind } from '../session/trial-kinds.ts';
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

type Locked = EndedTrial & { readonly session: number; readonly kind: TrialKind };

/** Every locked trial with what the draw made it; draws are read only where there are check trials. */
function everyLocked(study: StudyReading): Locked[] {
  return study.sessions().flatMap((state) => {
    const draw = state.plan.checks === undefined ? {} : study.draws().find(({ session }) => session === state.session);
    return state.ended
      .filter(({ outcome }) => outcome === 'locked')
      .map((trial) => ({ ...trial, session: state.session, kind: kindOf(draw ?? {}, state, trial.trial) }));
  });
}

/** What the registered analysis reads. */
const lockedIn = (study: StudyReading) => everyLocked(study).filter(({ kind }) => kind === 'main');

/** Check trials on the record and in what it says they came to: of every step, and of the same with the same. */
function checkTrialFaults(study: StudyReading, checked: readonly Locked[]): string[] {
  const registered = study.protocol().checks;
  const said = study.payloadOf('result-recorded')?.checks as CheckResult | undefined;
  if (registered === undefined)
    return said === undefined ? [] : ['The result speaks of check trials that are not registered.'];
  const of = (kind: TrialKind) => checked.filter((trial) => trial.kind === kind).length;
  const pairs: [string, unknown, number][] = [
    ...registered.steps.map(({ milliDb }, index): [string, unknown, number] => [
      `trials of ${decibels(milliDb)}`,
      said?.steps?.find((step) => step.milliDb === milliDb)?.trials,
      of(`step/${index}` as TrialKind),
    ]),
    ['trials of the same with the same', said?.same?.trials, of('same')],
  ];
  return pairs
    .filter(([, told, is]) => told !== is)
    .map(([what, told, is]) => `The result speaks of ${String(told)} ${what}, the record of ${is}.`);
}

/** Nobody was left out but by the registered rule, and a missing answer counts as the protocol says. */
export function checkRules(study: StudyReading): Verdict {
  const { analysis } = study.protocol();
  const result = resultOf(study);
  const locked = lockedIn(study);
  const heard = [...new Set(locked.flatMap(({ seats }) => seats))].sort();
  const reported = (result.byListener ?? []).map(({ listener }) => String(listener)).sort();
  const missing = locked.reduce((sum, trial) => sum + trial.missing.length, 0);
  const faults: string[] = [];
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
  const checked = everyLocked(study).filter(({ kind }) => kind !== 'main');
  const voids = sessions.flatMap(({ ended }) => ended).length - counted - checked.length;
  const apart = checked.length === 0 ? '' : `, ${checked.length} check trials`;
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
  const faults = [
    ...says
      .filter(([, said, is]) => said !== is)
      .map(([what, said, is]) => `The result speaks of ${String(said)} ${what}, the record of ${is}.`),
    ...checkTrialFaults(study, checked),
  ];
  if (opened !== counted + checked.length + voids + stillOpen)
    faults.push(
      `${opened} trials were opened; ${counted} counted${apart}, ${voids} void and ${stillOpen} left open do not make them up.`,
    );
  const ended = of('session-finished') + of('session-abandoned');
  if (ended !== sessions.filter(({ phase }) => phase === 'finished' || phase === 'abandoned').length)
    faults.push('The ends of sessions on the record do not match its sessions.');
  return {
    faults,
    held: `${opened} trials opened: ${counted} counted${apart}, ${voids} void, ${stillOpen} left open. ${due} answers due: ${due - missing} given, ${missing} missing.`,
  };
}
