import type { LevelJudgement } from '../levels/compare-levels.ts';
import { levelCheckWords, type MeasuredLevels } from '../levels/measured-levels.ts';
import { isWithin } from '../levels/registered-levels.ts';
import { Problem } from '../problem.ts';
import type { PayloadOf, SessionEvent, SessionEventKind } from './events.ts';
import { canMeasure, levelCheckDue, whyLevelsBar } from './level-progress.ts';
import type { SessionState } from './state.ts';

export type LevelCommand =
  | ({ kind: 'record-levels'; by: string; measured: MeasuredLevels } & LevelJudgement)
  | { kind: 'skip-levels'; reason: string };

type Emit = <K extends SessionEventKind>(kind: K, payload: Omit<PayloadOf<K>, 'session'>) => SessionEvent;

/** What departs from the protocol, in words without a figure: they are read before closing. */
function deviationsOf(state: SessionState, { measured, grade, isDrifted }: LevelCommand & { kind: 'record-levels' }) {
  const when = levelCheckWords[measured.check];
  const isMatched = state.plan.levels?.handling !== 'level-compensated' || isWithin(grade);
  return [
    ...(isMatched ? [] : [`Levels at the load ${when} were out of the registered tolerance.`]),
    ...(isDrifted === true ? [`Levels at the load ${when} had drifted since the start by more than 0.1 dB.`] : []),
  ];
}

/** A measurement, and whatever it shows to depart from the protocol. */
export function recordLevels(
  state: SessionState,
  command: LevelCommand & { kind: 'record-levels' },
  emit: Emit,
): SessionEvent[] {
  const { by, measured, grade, isDrifted } = command;
  if (state.plan.levels === undefined) throw new Problem('wrong-phase', 'This study registers no levels.');
  if (!canMeasure(state, measured.check))
    throw new Problem('wrong-phase', `Levels ${levelCheckWords[measured.check]} cannot be recorded now.`);
  return [
    emit('levels-measured', { by, ...measured, grade, isDrifted }),
    ...deviationsOf(state, command).map((text) => emit('deviation-recorded', { text })),
  ];
}

/** Goes on without the measurement at half time. The one before the session cannot be left out. */
export function skipLevels(state: SessionState, reason: string, emit: Emit): SessionEvent[] {
  if (levelCheckDue(state) !== 'half-time')
    throw new Problem('wrong-phase', 'Only the measurement at half time can be left out, once it is due.');
  const text = `Levels at the load ${levelCheckWords['half-time']} were not measured: ${reason}`;
  return [emit('levels-skipped', { check: 'half-time', reason }), emit('deviation-recorded', { text })];
}

/** @throws Problem where levels bar the session from starting */
export function requireLevels(state: SessionState): void {
  const why = whyLevelsBar(state);
  if (why !== null) throw new Problem('wrong-phase', why);
}

/** @throws Problem while the measurement at half time is due */
export function requireHalfTime(state: SessionState): void {
  if (levelCheckDue(state) === 'half-time')
    throw new Problem(
      'wrong-phase',
      'Half of the trials are over: the levels are due. Have them measured, or go on without and say why.',
    );
}
