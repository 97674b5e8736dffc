import { courseModifiers, type Finding, type FindingContext, notKept, scopeOf, times } from './finding.ts';
import { equationOfP } from './format-probability.ts';
import type { ResultFrame } from './result-frame.ts';

/** What every registered result says that looks for a difference. */
export type DifferenceResult = ResultFrame & {
  readonly missingAnswers: string;
  readonly isBelowGuessing: boolean;
  readonly byListener: readonly { readonly listener: string; readonly isAboveGuessing: boolean }[];
};

/** What a test is after, in its method's words. */
export interface SoughtWords<R extends DifferenceResult> {
  /** After the listeners: "told A from B". */
  told(result: R, cables: FindingContext['cables']): string;
  /** What the test looked for: "a difference between A and B". */
  sought(result: R, cables: FindingContext['cables']): string;
  /** What scores below chance must not be taken for, or nothing. */
  readonly below?: string;
}

/** What a method that looks for a difference says in its own words. */
export interface DifferenceWords<R extends DifferenceResult> extends SoughtWords<R> {
  /** The counts behind p: "12 of 16 right". */
  counted(result: R): string;
  /** How large the effect is. */
  effect(result: R): string;
  /** What a result that found nothing leaves open. */
  open(result: R): string;
}

/** A test that looks for any difference between the two cables. */
export const anyDifference: SoughtWords<DifferenceResult> = {
  told: (_result, [first, second]) => `told ${first} from ${second}`,
  sought: (_result, [first, second]) => `a difference between ${first} and ${second}`,
};

/** Listeners who came one at a time, each answer with a draw of its own, are no panel. */
function subjectOf({ listeners, test, answers, trials }: DifferenceResult): string {
  if (listeners === 1) return 'One listener';
  return test === 'shared-presentations' || answers > trials
    ? 'At least one panel member'
    : 'At least one of these listeners';
}

function namedListeners({ byListener, isSignificant, listeners }: DifferenceResult): string[] {
  if (!isSignificant || listeners < 2) return [];
  const named = byListener.filter(({ isAboveGuessing }) => isAboveGuessing).map(({ listener }) => listener);
  if (named.length === 0) return ['The panel as a whole scored above chance; no single listener can be named.'];
  return [`Above guessing on their own, adjusted by Holm’s rule: ${named.join(', ')}.`];
}

/** A listener above guessing where the registered test of all answers found nothing: a hint, not a result. */
function hints({ byListener, isSignificant, listeners }: DifferenceResult): string[] {
  if (isSignificant || listeners < 2) return [];
  const hinting = byListener.filter(({ isAboveGuessing }) => isAboveGuessing).map(({ listener }) => listener);
  if (hinting.length === 0) return [];
  return [`Exploratory: ${hinting.join(', ')} scored above guessing; this needs a new pre-registered test.`];
}

const levelUnknown = 'Level at the load was not recorded in Fairlead; loudness may explain a difference.';
const neverSaid = [
  'that either cable is better',
  'that nobody can hear a difference',
  'that it holds for other systems, listeners or music',
];

function bodyOf<R extends DifferenceResult>(
  result: R,
  context: FindingContext,
  words: DifferenceWords<R>,
): Pick<Finding, 'row' | 'headline' | 'maySay'> {
  const sought = words.sought(result, context.cables);
  const { p, alpha } = result;
  const counted = `${words.counted(result)}, ${equationOfP(Number(p.value), Number(alpha))}, one-sided level ${alpha}`;
  const barred = notKept(context);
  if (barred !== null) return barred;
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
      headline: `Inconclusive. The test did not detect ${sought}, and does not exclude it.`,
      maySay:
        result.answers === 0
          ? null
          : `A registered blind test did not detect ${sought} (${counted}); it does not exclude it.`,
    };
  const subject = subjectOf(result);
  const told = `${words.told(result, context.cables)} more often than guessing allows`;
  return {
    row: '2',
    headline: `${subject} ${told}.`,
    maySay: `In a registered blind test with ${times(result.listeners, 'listener')}, ${subject.toLowerCase()} ${told} (${counted}). Level at the load was not recorded; loudness may explain the difference.`,
  };
}

/**
 * The finding of a method that looks for a difference: exactly one headline, what modifies it, and what may be said.
 *
 * The rows are those of the table in docs/spec/statistics.md that this analysis can reach: 0 the record does not hold,
 * 1 below chance, 2 a difference, 5 inconclusive.
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
  const body = bodyOf(result, context, words);
  return {
    ...body,
    modifiers: [
      ...(body.row === '1' && words.below !== undefined ? [words.below] : []),
      ...(body.row === '2' ? [words.effect(result), ...namedListeners(result)] : []),
      ...(body.row === '5' ? [words.open(result), ...hints(result)] : []),
      ...courseModifiers(result, { tooFew: 'trials', missing: result.missingAnswers }, context),
      levelUnknown,
    ],
    scope: scopeOf(context),
    mustNotSay: neverSaid,
  };
}
