import { judgeLevels } from '../levels/compare-levels.ts';
import { firstLevels, levelsInRecord } from '../levels/levels-in-record.ts';
import type { StudyReading } from './study-reading.ts';

/** What is wrong with the levels on the record: that one was judged otherwise than the registered rule judges it. */
export function levelFaultsIn(study: StudyReading): string[] {
  const recorded = levelsInRecord(study.entries());
  const registered = study.protocol().conduct.levels;
  if (registered === undefined)
    return recorded.length === 0 ? [] : ['Levels are on the record, and the protocol registers none.'];
  const plans = new Map(study.sessions().map(({ session, plan }) => [session, plan.levels]));
  return recorded.flatMap((one) => {
    // A session that was measured and then planned anew was judged by the plan before.
    const replanned = study
      .entries()
      .some(
        ({ kind, payload, sequence }) =>
          kind === 'session-replanned' && payload.session === one.session && sequence > one.sequence,
      );
    if (replanned) return [];
    const judged = judgeLevels(one, firstLevels(recorded, one), plans.get(one.session) ?? registered);
    const isAsSaid = judged.grade === one.grade && judged.isDrifted === one.isDrifted;
    return isAsSaid ? [] : [`Entry ${one.sequence} judges its levels otherwise than the registered rule does.`];
  });
}
