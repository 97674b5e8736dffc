import { besideDifference, besideNothing, cautionOutside, hasFailed } from './check-words.ts';
import { courseModifiers, type Finding, type FindingContext, scopeOf, times } from './finding.ts';
import { type FindingRow, type Found, firstRow } from './finding-row.ts';
import { equationOfP } from './format-probability.ts';
import { levelClaim, levelModifiers } from './level-sentences.ts';
import type { ResultFrame } from './result-frame.ts';
import { checkModifiers, type SessionCheck } from './session-checks.ts';

/** What every registered result says that looks for a difference. */
export type DifferenceResult = ResultFrame & {
  readonly missingAnswers: string;
  readonly isBelowGuessing: boolean;
  readonly byListener: readonly { readonly listener: string; readonly isAboveGuessing: boolean }[];
  /** There only where a margin is registered. */
  readonly margin?: { readonly share: string; readonly confidence: string; readonly isBelow: boolean } | undefined;
  /** There only where people in general can be spoken of, were it not for what they answered. */
  readonly people?: { readonly samplingFrame: string; readonly isAboveGuessing: boolean } | null | undefined;
  readonly checks: readonly SessionCheck[];
};

/** What a test is after, in its method's words. */
export interface SoughtWords<R extends DifferenceResult> {
  /** After the listeners: "told A from B". */
  told(result: R, cables: FindingContext['cables']): string;
  /** What the test looked for: "a difference between A and B". */
  sought(result: R, cables: FindingContext['cables']): string;
  /** What scores below chance must not be taken for, or nothing. */
  readonly below?: string;
  /** What a result that found nothing must not be taken for: "that nobody can hear a difference". */
  readonly notShown: string;
}

/** What a method that looks for a difference says in its own words. */
export interface DifferenceWords<R extends DifferenceResult> extends SoughtWords<R> {
  /** The counts behind p: "12 of 16 right". */
  counted(result: R): string;
  /** How large the effect is. */
  effect(result: R): string;
  /** What a result that found nothing leaves open. */
  open(result: R): string;
  /** That guessing explains the answers better, where it does by far, or nothing. */
  evidence(result: R): string | null;
  /** The registered margin: "the share of answers above guessing is below 20%". */
  belowMargin(result: R): string;
}

/** A test that looks for any difference between the two cables. */
export const anyDifference: SoughtWords<DifferenceResult> = {
  told: (_result, [first, second]) => `told ${first} from ${second}`,
  sought: (_result, [first, second]) => `a difference between ${first} and ${second}`,
  notShown: 'that nobody can hear a difference',
};

/** Row 8: whom a difference is said of. Listeners who came one at a time, each answer with a draw of its own, are no panel. */
function subjectOf({ listeners, test, answers, trials, people }: DifferenceResult): string {
  if (listeners === 1) return 'One listener';
  if (people?.isAboveGuessing) return `Listeners in general, of whom these were a sample (${people.samplingFrame}),`;
  return test === 'shared-presentations' || answers > trials
    ? 'At least one panel member'
    : 'At least one of these listeners';
}

/** The same inside a sentence. */
const inside = (words: string) => `${words.charAt(0).toLowerCase()}${words.slice(1)}`;

/** Rows 8 and 9: who may be named. */
function namedListeners({ byListener, listeners }: DifferenceResult): string[] {
  if (listeners < 2) return [];
  const named = byListener.filter(({ isAboveGuessing }) => isAboveGuessing).map(({ listener }) => listener);
  if (named.length === 0) return ['The panel as a whole scored above chance; no single listener can be named.'];
  return [`Above guessing on their own, adjusted by Holm’s rule: ${named.join(', ')}.`];
}

/** A listener above guessing where the registered test of all answers found nothing: a hint, not a result. */
function hints({ byListener, listeners }: DifferenceResult): string[] {
  if (listeners < 2) return [];
  const hinting = byListener.filter(({ isAboveGuessing }) => isAboveGuessing).map(({ listener }) => listener);
  if (hinting.length === 0) return [];
  return [`Exploratory: ${hinting.join(', ')} scored above guessing; this needs a new pre-registered test.`];
}

/** What a difference found says of listeners in general: nothing, unless row 8 allows it. */
const framedBy = (row: string, { people }: DifferenceResult) =>
  (row === '2' || row === '3') && people?.isAboveGuessing === true ? people.samplingFrame : null;

const neverSaid = (notShown: string, frame: string | null) => [
  'that either cable is better',
  notShown,
  `that it holds for other systems${frame === null ? ', listeners' : ''} or music`,
];

const isBelowMargin = ({ margin }: DifferenceResult) => margin?.isBelow === true;

/** Rows 1 to 5, in the method's words. Row 3 stands before row 2, for where both fit the smaller claim is made. */
function rowsOf<R extends DifferenceResult>(words: DifferenceWords<R>): readonly FindingRow<R>[] {
  const test = (result: R) =>
    `${words.counted(result)}, ${equationOfP(Number(result.p.value), Number(result.alpha))}, one-sided level ${result.alpha}`;
  const told = ({ result, context }: Found<R>) =>
    `${words.told(result, context.cables)} more often than guessing allows`;
  const within = (result: R) => `${words.belowMargin(result)}, with ${confidenceOf(result)} confidence`;
  const panel = ({ listeners }: R) => (listeners > 1 ? ', on the average over this panel’s answers' : '');
  return [
    {
      row: '1',
      applies: ({ result }) => result.isBelowGuessing,
      headline: () =>
        'Scores were below chance more than guessing explains; the sessions must be checked for swapped labels. No claim.',
      modifiers: () => (words.below === undefined ? [] : [words.below]),
      maySay: () => null,
    },
    {
      row: '3',
      applies: ({ result, context }) => result.isSignificant && isBelowMargin(result) && !hasFailed(context.known),
      headline: (found) =>
        `A difference was detected, and it is small. ${subjectOf(found.result)} ${told(found)}; ${within(found.result)}${panel(found.result)}.`,
      modifiers: ({ result, context }) => [
        words.effect(result),
        ...namedListeners(result),
        ...besideDifference(context.known),
      ],
      maySay: (found) =>
        `In a registered blind test with ${times(found.result.listeners, 'listener')}, ${inside(subjectOf(found.result))} ${told(found)} (${test(found.result)}). The difference is small: ${within(found.result)}${panel(found.result)}. ${levelClaim(found.context.levels, 'the difference')}`,
    },
    {
      row: '2',
      applies: ({ result }) => result.isSignificant,
      headline: (found) => `${subjectOf(found.result)} ${told(found)}.`,
      modifiers: ({ result, context }) => [
        words.effect(result),
        ...marginOpen(result, words),
        ...namedListeners(result),
        ...besideDifference(context.known),
      ],
      maySay: (found) =>
        `In a registered blind test with ${times(found.result.listeners, 'listener')}, ${inside(subjectOf(found.result))} ${told(found)} (${test(found.result)}). ${levelClaim(found.context.levels, 'the difference')}${cautionOutside(found.context.known)}`,
    },
    {
      row: '4',
      applies: ({ result, context }) => isBelowMargin(result) && !hasFailed(context.known),
      headline: ({ result }) =>
        `${within(result).charAt(0).toUpperCase()}${within(result).slice(1)} under these conditions${panel(result)}.`,
      modifiers: ({ result, context }) => [
        words.effect(result),
        ...hints(result),
        ...besideNothing(context.known, false),
      ],
      maySay: ({ result, context: { cables } }) =>
        `In a registered blind test with ${times(result.listeners, 'listener')}, ${cables[0]} and ${cables[1]} were not told apart within the registered margin: ${within(result)}${panel(result)}, in this set-up (${words.counted(result)}).`,
    },
    {
      row: '5',
      applies: () => true,
      headline: ({ result, context }) =>
        `Inconclusive. The test did not detect ${words.sought(result, context.cables)}, and does not exclude it.`,
      modifiers: ({ result, context }) => [
        words.open(result),
        ...marginOpen(result, words),
        ...evidenceOf(result, words),
        ...hints(result),
        ...besideNothing(context.known, isBelowMargin(result)),
      ],
      maySay: ({ result, context }) =>
        result.answers === 0
          ? null
          : `A registered blind test did not detect ${words.sought(result, context.cables)} (${test(result)}); it does not exclude it.`,
    },
  ];
}

const confidenceOf = ({ margin }: DifferenceResult) => `${Math.round(Number(margin?.confidence ?? 0) * 100)}%`;

/** A margin that was registered and not shown is said to be so. */
function marginOpen<R extends DifferenceResult>(result: R, words: DifferenceWords<R>): string[] {
  return result.margin === undefined || result.margin.isBelow
    ? []
    : [`It was not shown that ${words.belowMargin(result)}.`];
}

function evidenceOf<R extends DifferenceResult>(result: R, words: DifferenceWords<R>): string[] {
  const evidence = words.evidence(result);
  return evidence === null ? [] : [evidence];
}

/** The rows that such a test can come to, in the order in which they are asked; row 0 stands before them. */
export const differenceRows = rowsOf({} as DifferenceWords<DifferenceResult>).map(({ row }) => row);

/**
 * The finding of a method that looks for a difference: exactly one headline, what modifies it, and what may be said.
 *
 * The rows are those of the table in docs/spec/statistics.md that this analysis can reach: 0 the record does not hold,
 * 1 below chance, 3 a small difference, 2 a difference, 4 below the margin, 5 inconclusive. Rows 8, 9 and 13 modify them.
 *
 * @param result  the registered result, as on the record
 * @param context what it was found about, and what the record shows
 * @param words   the method's own
 */
export function differenceFinding<R extends DifferenceResult>(
  result: R,
  context: FindingContext,
  words: DifferenceWords<R>,
): Finding {
  const body = firstRow(rowsOf(words), { result, context });
  const frame = framedBy(body.row, result);
  return {
    ...body,
    modifiers: [
      ...body.modifiers,
      ...(body.row === '0' ? [] : checkModifiers(result.checks)),
      ...courseModifiers(result, { tooFew: 'trials', missing: result.missingAnswers }, context),
      ...levelModifiers(context.levels, 'a difference'),
    ],
    scope: scopeOf(context, frame === null ? undefined : `listeners of whom these were a sample (${frame})`),
    mustNotSay: [
      ...neverSaid(words.notShown, frame),
      ...(hasFailed(context.known) ? ['that there is no difference, or a small one'] : []),
    ],
  };
}
