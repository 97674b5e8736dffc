import type { ProctorView } from '../contracts/proctor-live.ts';
import { isIn, levelCheckDue, whyLevelsBar } from './level-progress.ts';
import type { SessionState } from './state.ts';

/** What the console shows of levels: in or out, and nothing else. */
export function levelsFor(state: SessionState): ProctorView['levels'] {
  const { levels } = state.plan;
  if (levels === undefined) return null;
  const hasStarted = state.familiarisations > 0 || state.trial !== null;
  return {
    handling: levels.handling,
    checks: state.levels.map((standing) => ({ check: standing.check, at: standing.at, isIn: isIn(standing) })),
    due: levelCheckDue(state),
    bar: hasStarted || state.phase === 'finished' || state.phase === 'abandoned' ? null : whyLevelsBar(state),
  };
}
