import { z } from 'zod';
import type { LevelsFound } from '../levels/levels-found.ts';
import type { KnownDifferences } from './check-result.ts';
import type { ResultFrame } from './result-frame.ts';

/** The one sentence that a registered analysis comes to, and what may and may not be said of it. */
export const finding = z.strictObject({
  /** The row of docs/spec/statistics.md's table of findings. */
  row: z.string(),
  headline: z.string(),
  modifiers: z.array(z.string()),
  scope: z.string(),
  /** The sentence that the finding licenses for use outside, or null when it licenses none. */
  maySay: z.string().nullable(),
  mustNotSay: z.array(z.string()),
});
export type Finding = z.output<typeof finding>;

export type FindingContext = {
  /** The names of the two cables, first and second as in the protocol. */
  readonly cables: readonly [string, string];
  /** What the record shows: each must hold, or the numbers support nothing. */
  readonly gate: {
    readonly commitmentsHold: boolean;
    readonly allTrialsAccounted: boolean;
    /** Whether listeners could not know what they heard: the blinding rung is above *open*. */
    readonly isBlind: boolean;
  };
  /** What the check trials showed of these listeners in this set-up; null or left out where no step was registered. */
  readonly known?: KnownDifferences | null | undefined;
  /** Why the study was closed before its registered number, or null. */
  readonly endedEarly: string | null;
  /** How the cables matched in level; left out where the protocol registers no measurement. */
  readonly levels?: LevelsFound | undefined;
  /** What the result holds for: rig and chain, in the protocol's words. */
  readonly setting: string;
};

/** Row 0, which comes before every other: where the record does not hold, no number says anything. */
export function notKept({ gate }: FindingContext): { row: '0'; headline: string; maySay: null } | null {
  if (!gate.commitmentsHold || !gate.allTrialsAccounted)
    return {
      row: '0',
      headline: 'This study does not meet its protocol; its numbers support no claim.',
      maySay: null,
    };
  if (!gate.isBlind)
    return { row: '0', headline: 'This study was not blind; its numbers support no claim.', maySay: null };
  return null;
}

/** "1 trial", "16 trials". */
export const times = (count: number, one: string) => `${count} ${one}${count === 1 ? '' : 's'}`;

/** A confidence as it was chosen, such as 97.5%, not rounded to a whole percentage. */
export const confidenceText = (confidence: string) => `${Number((100 * Number(confidence)).toPrecision(6))}%`;

/** What every method's finding says of how its count came about. */
export function courseModifiers(
  { canReachAlpha, trials, missing }: ResultFrame,
  words: { readonly tooFew: string; readonly missing: string },
  { endedEarly }: FindingContext,
): string[] {
  return [
    ...(canReachAlpha ? [] : [`With so few ${words.tooFew} no result could have reached the registered level.`]),
    ...(endedEarly === null ? [] : [`Ended early while blind, at ${times(trials, 'trial')}: ${endedEarly}`]),
    ...(missing === 0 ? [] : [`${times(missing, 'answer')} missing, ${words.missing}.`]),
  ];
}

export const scopeOf = ({ setting }: FindingContext, listeners = 'these listeners'): string =>
  `It holds for these cables, ${listeners}, this programme and this system: ${setting}`;

/** Limits over several listeners' own draws are about these answers, not about people. */
export function averageWords({ listeners }: Pick<ResultFrame, 'listeners'>): string {
  return listeners > 1 ? ' These figures are the average over this panel’s answers, not about people in general.' : '';
}
