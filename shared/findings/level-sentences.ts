import { dbText, hertzText } from '../levels/level-words.ts';
import { type LevelsFound, mayExplain } from '../levels/levels-found.ts';

const list = (numbers: readonly number[]) =>
  numbers.length === 1 ? `session ${numbers[0]}` : `sessions ${numbers.join(', ')}`;

/** Why nothing is known of the level at all, or null. */
function unknownOf(levels: LevelsFound | undefined): string | null {
  if (levels === undefined) return 'was not recorded in Fairlead';
  if (levels.unmeasured.length > 0) return `was not measured in ${list(levels.unmeasured)}`;
  return levels.betweenCablesMilliDb === null ? 'was not measured' : null;
}

/** How far apart the cables were, or how well matched. */
function matchOf(levels: LevelsFound): string {
  const text = dbText(levels.betweenCablesMilliDb ?? 0);
  if (mayExplain(levels)) {
    const how = levels.handling === 'as-supplied' ? ', as supplied,' : '';
    return `The cables${how} differed by ${text} in level at the load; loudness may explain the result.`;
  }
  return levels.handling === 'as-supplied'
    ? `Levels at the load, with the cables as supplied, were within ${text}.`
    : `Levels at the load were matched within ${text}.`;
}

/**
 * What a finding says of level (docs/spec/statistics.md, T-rules on level): how well it was matched, or that loudness may
 * explain the result.
 *
 * @param levels undefined where the protocol registers no measurement
 * @param found  what loudness may explain: "a difference", "a preference"
 */
export function levelModifiers(levels: LevelsFound | undefined, found: string): string[] {
  const unknown = unknownOf(levels);
  if (unknown !== null || levels === undefined) return [`Level at the load ${unknown}; loudness may explain ${found}.`];
  const { response, withinCableMilliDb, toleranceMilliDb } = levels;
  return [
    matchOf(levels),
    ...(response !== null && response.milliDb > toleranceMilliDb
      ? [
          `Their response, relative to 1 kHz, differed by up to ${dbText(response.milliDb)}, at ${hertzText(response.frequencyHz)}.`,
        ]
      : []),
    ...(withinCableMilliDb !== null && withinCableMilliDb > toleranceMilliDb
      ? [`Specimens of one cable differed by up to ${dbText(withinCableMilliDb)} in level.`]
      : []),
    ...levels.drifted.map(
      ({ session, milliDb }) => `Level moved by ${dbText(milliDb)} over session ${session}, more than 0.1 dB.`,
    ),
  ];
}

/** The same in the sentence for use outside, which never leaves it out. */
export function levelClaim(levels: LevelsFound | undefined, found: string): string {
  const unknown = unknownOf(levels);
  if (unknown !== null || levels === undefined)
    return `Level at the load ${levels === undefined ? 'was not recorded' : unknown}; loudness may explain ${found}.`;
  return matchOf(levels);
}
