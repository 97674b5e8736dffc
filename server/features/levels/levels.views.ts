import type { LevelsPage, LevelsTaken } from '#shared/contracts/levels.ts';
import type { RecordedLevels } from '#shared/levels/levels-in-record.ts';
import { type LevelCheckName, levelChecks } from '#shared/levels/measured-levels.ts';
import { canMeasure, isIn, levelCheckDue, whyLevelsBar } from '#shared/session/level-progress.ts';
import type { SessionState } from '#shared/session/state.ts';
import type { Session } from '../sessions/session.entity.ts';

export type LevelsSource = {
  readonly session: Session;
  readonly title: string;
  readonly state: SessionState;
  readonly recorded: readonly RecordedLevels[];
  readonly measurer: LevelsPage['measurer'];
  readonly names: ReadonlyMap<string, string>;
  readonly duty: LevelsPage['duty'];
  readonly codes: readonly string[];
  readonly codesAreDrawn: boolean;
  /** Whose figures whoever asks may see: their own, or everybody's after closing. */
  readonly maySee: (recorded: RecordedLevels) => boolean;
};

function openChecks(state: SessionState): LevelCheckName[] {
  const due = levelCheckDue(state);
  const open = levelChecks.filter((check) => canMeasure(state, check));
  return due === null ? open : [due, ...open.filter((check) => check !== due)];
}

/** Every check in the order in which it was made; the figures field by field, and only where they may be seen. */
function takenOf({ state, recorded, names, maySee }: LevelsSource): LevelsTaken[] {
  // A session that was planned anew has forgotten what was measured before; the record has not.
  const own = recorded.slice(recorded.length - state.levels.filter(({ grade }) => grade !== null).length);
  return state.levels.map((standing) => {
    const at = new Date(standing.at).toISOString();
    const one = standing.grade === null ? undefined : own.shift();
    return {
      check: standing.check,
      at,
      isIn: isIn(standing),
      by: one === undefined ? null : (names.get(one.by) ?? 'unknown'),
      measured:
        one === undefined || !maySee(one)
          ? null
          : { check: one.check, unit: one.unit, instrument: one.instrument, rows: one.rows },
    };
  });
}

export function levelsPageView(source: LevelsSource): LevelsPage {
  const { session, title, state, measurer, names, duty, codes, codesAreDrawn } = source;
  return {
    sessionId: session.id,
    studyId: session.studyId,
    title,
    session: session.number,
    phase: session.phase,
    registered: state.plan.levels ?? null,
    measurer,
    proctor: names.get(session.proctorId) ?? 'unknown',
    duty,
    codes: [...codes],
    codesAreDrawn,
    open: openChecks(state),
    due: levelCheckDue(state),
    bar: state.familiarisations > 0 || session.phase === 'abandoned' ? null : whyLevelsBar(state),
    taken: takenOf(source),
  };
}
