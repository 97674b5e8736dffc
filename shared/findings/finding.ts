import { z } from 'zod';
import { evenChance } from '../statistics/chance.ts';
import { detectableRate } from '../statistics/detectable-rate.ts';
import { equationOfP, formatShare } from './format-probability.ts';
import type { RegisteredResult } from './registered-result.ts';

/** The one sentence that a registered analysis comes to, and what may and may not be said of it. */
export const finding = z.strictObject({
  /** The row of docs/spec/statistics.md's table of findings. */
  row: z.enum(['0', '1', '2', '5']),
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
  /** Why the study was closed before its registered number, or null. */
  readonly endedEarly: string | null;
  /** What the result holds for: rig and chain, in the protocol's words. */
  readonly setting: string;
};

/** A confidence as it was chosen, such as 97.5%, not rounded to a whole percentage. */
const confidenceText = (confidence: string) => `${Number((100 * Number(confidence)).toPrecision(6))}%`;
const times = (count: number, one: string) => `${count} ${one}${count === 1 ? '' : 's'}`;

function subjectOf({ listeners, test }: RegisteredResult): string {
  if (listeners === 1) return 'One listener';
  return test === 'shared-presentations' ? 'At least one panel member' : 'At least one of these listeners';
}

function countOf({ correct, answers, p, alpha }: RegisteredResult): string {
  return `${correct} of ${answers} right, ${equationOfP(Number(p.value), Number(alpha))}, one-sided level ${alpha}`;
}

function namedListeners({ byListener, isSignificant, listeners }: RegisteredResult): string[] {
  if (!isSignificant || listeners < 2) return [];
  const named = byListener.filter(({ isAboveGuessing }) => isAboveGuessing).map(({ listener }) => listener);
  if (named.length === 0) return ['The panel as a whole scored above chance; no single listener can be named.'];
  return [`Above guessing on their own, adjusted by Holm’s rule: ${named.join(', ')}.`];
}

/** A listener above guessing where the registered test of all answers found nothing: a hint, not a result. */
function hints({ byListener, isSignificant, listeners }: RegisteredResult): string[] {
  if (isSignificant || listeners < 2) return [];
  const hinting = byListener.filter(({ isAboveGuessing }) => isAboveGuessing).map(({ listener }) => listener);
  if (hinting.length === 0) return [];
  return [`Exploratory: ${hinting.join(', ')} scored above guessing; this needs a new pre-registered test.`];
}

/** Limits over several listeners' own draws are about these answers, not about people. */
function average({ listeners }: RegisteredResult): string {
  return listeners > 1 ? ' These figures are the average over this panel’s answers, not about people in general.' : '';
}

/** How large the effect is, with the one-sided limit that belongs to a one-sided test. */
function effect(result: RegisteredResult): string[] {
  if (result.estimates === null)
    return ['The listeners heard the same presentations, so no rate is stated for their answers together.'];
  const { rate, interval, oneSidedLower } = result.estimates.aboveGuessing;
  const range = `${formatShare(Number(interval.lower), 'down')} to ${formatShare(Number(interval.upper), 'up')}`;
  const lower = `one-sided ${confidenceText(oneSidedLower.confidence)} lower limit ${formatShare(Number(oneSidedLower.limit), 'down')}`;
  return [
    `Share of answers above guessing: ${formatShare(Number(rate), 'nearest')} (95% interval ${range}; ${lower}).${average(result)}`,
  ];
}

/** What a result that found nothing leaves open. */
function openQuestion(result: RegisteredResult): string {
  const { estimates, answers, alpha, test } = result;
  if (answers === 0) return 'No answers were counted.';
  if (test === 'shared-presentations' || estimates === null)
    return 'No upper limit for the above-chance rate is valid for a group in this version, so none is given.';
  const { confidence, limit } = estimates.aboveGuessing.oneSidedUpper;
  const rate = detectableRate(answers, evenChance, Number(alpha), 0.8);
  const found =
    rate === null
      ? ''
      : ` It could have found a listener who is right ${formatShare(rate, 'up')} of the time, with 80% power.`;
  const open = `An above-chance rate up to ${formatShare(Number(limit), 'up')} is not excluded (one-sided ${confidenceText(confidence)} limit).`;
  return `${Number(limit) > 0 ? open : 'Scores were lower than guessing usually gives.'}${found}${average(result)}`;
}

const levelUnknown = 'Level at the load was not recorded in Fairlead; loudness may explain a difference.';
const neverSaid = [
  'that either cable is better',
  'that nobody can hear a difference',
  'that it holds for other systems, listeners or music',
];

function bodyOf(
  result: RegisteredResult,
  { cables, gate }: FindingContext,
): Pick<Finding, 'row' | 'headline' | 'maySay'> {
  const [first, second] = cables;
  if (!gate.commitmentsHold || !gate.allTrialsAccounted)
    return { row: '0', headline: 'This study does not meet its protocol; its numbers support no claim.', maySay: null };
  if (!gate.isBlind)
    return { row: '0', headline: 'This study was not blind; its numbers support no claim.', maySay: null };
  if (result.isBelowGuessing)
    return {
      row: '1',
      headline:
        'Scores were below chance more than guessing explains; the sessions must be checked for swapped labels. No claim.',
      maySay: null,
    };
  if (!result.isSignificant)
    return {
      row: '5',
      headline: `Inconclusive. The test did not detect a difference between ${first} and ${second}, and does not exclude one.`,
      maySay:
        result.answers === 0
          ? null
          : `A registered blind test did not detect a difference between ${first} and ${second} (${countOf(result)}); it does not exclude one.`,
    };
  const subject = subjectOf(result);
  return {
    row: '2',
    headline: `${subject} told ${first} from ${second} more often than guessing allows.`,
    maySay: `In a registered blind test with ${times(result.listeners, 'listener')}, ${subject.toLowerCase()} told ${first} from ${second} more often than guessing allows (${countOf(result)}). Level at the load was not recorded; loudness may explain the difference.`,
  };
}

/**
 * The finding of an ABX study: exactly one headline, what modifies it, and what may be said.
 *
 * The rows are those of the table in docs/spec/statistics.md that this analysis can reach: 0 the record does not hold,
 * 1 below chance, 2 a difference, 5 inconclusive.
 *
 * @param result  the registered result, as on the record
 * @param context what it was found about, and what the record shows
 */
export function findingOf(result: RegisteredResult, context: FindingContext): Finding {
  const body = bodyOf(result, context);
  const early =
    context.endedEarly === null
      ? []
      : [`Ended early while blind, at ${times(result.trials, 'trial')}: ${context.endedEarly}`];
  const missing = result.missing === 0 ? [] : [`${times(result.missing, 'answer')} missing, counted as wrong.`];
  const unreachable = result.canReachAlpha
    ? []
    : ['With so few trials no result could have reached the registered level.'];
  const open = body.row === '5' ? [openQuestion(result), ...hints(result)] : [];
  return {
    ...body,
    modifiers: [
      ...(body.row === '2' ? [...effect(result), ...namedListeners(result)] : []),
      ...open,
      ...unreachable,
      ...early,
      ...missing,
      levelUnknown,
    ],
    scope: `It holds for these cables, these listeners, this programme and this system: ${context.setting}`,
    mustNotSay: neverSaid,
  };
}
