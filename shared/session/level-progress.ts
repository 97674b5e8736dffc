import type { LevelCheckName } from '../levels/measured-levels.ts';
import { isWithin, type LevelGrade } from '../levels/registered-levels.ts';
import { nextTrial } from './progress.ts';
import type { SessionState } from './state.ts';

/** How one measurement of levels came out; what was measured is not part of a session's state. */
export type LevelStanding = {
  readonly check: LevelCheckName;
  readonly at: number;
  /** Null where it was left out, for a reason. */
  readonly grade: LevelGrade | null;
  readonly isDrifted: boolean | null;
};

/** Whether a measurement was within what is registered, and has stayed where it was; null where it was left out. */
export const isIn = ({ grade, isDrifted }: LevelStanding): boolean | null =>
  grade === null ? null : isWithin(grade) && isDrifted !== true;

/** The latest standing of a check, or null when it was neither made nor left out. */
export const standingOf = ({ levels }: SessionState, check: LevelCheckName): LevelStanding | null =>
  levels.findLast((standing) => standing.check === check) ?? null;

const halfOf = ({ plan }: SessionState) => Math.ceil(plan.trials / 2);

/** Whether nothing of the session has been heard yet. */
const isBeforeListening = ({ phase, familiarisations, trial }: SessionState) =>
  phase === 'planned' ||
  phase === 'seating' ||
  phase === 'revealing' ||
  (phase === 'running' && familiarisations === 0 && trial === null);

/** Whether a check can be made now, by where the session is. */
export function canMeasure(state: SessionState, check: LevelCheckName): boolean {
  const { phase, familiarisations, trial, ended } = state;
  if (state.plan.levels === undefined) return false;
  if (check === 'before') return isBeforeListening(state);
  if (check === 'half-time') return phase === 'running' && familiarisations > 0 && trial === null;
  if (phase === 'finished' || phase === 'abandoned') return ended.length > 0;
  return phase === 'running' && familiarisations > 0 && trial === null && nextTrial(state) === null;
}

/** The check that is due now and neither made nor left out, or null. */
export function levelCheckDue(state: SessionState): LevelCheckName | null {
  const isOpen = (check: LevelCheckName) => canMeasure(state, check) && standingOf(state, check) === null;
  if (isOpen('before')) return 'before';
  const locked = state.ended.filter(({ outcome }) => outcome === 'locked').length;
  if (isOpen('half-time') && locked >= halfOf(state) && nextTrial(state) !== null) return 'half-time';
  return isOpen('after') ? 'after' : null;
}

/** Why the session cannot start as its levels are, or null where it can: the gate of level-compensated studies. */
export function whyLevelsBar(state: SessionState): string | null {
  const { levels } = state.plan;
  if (levels === undefined) return null;
  const before = standingOf(state, 'before');
  if (before === null || before.grade === null)
    return 'The levels at the load are not measured yet. The session starts after that.';
  if (levels.handling === 'level-compensated' && before.grade === 'fail')
    return 'The levels are out by more than 0.2 dB, and the protocol says that they are matched. Match them and measure again; then the session can start.';
  return null;
}
