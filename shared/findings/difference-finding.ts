import { detectableRate } from '../statistics/detectable-rate.ts';
import {
  confidenceText,
  courseModifiers,
  type Finding,
  type FindingContext,
  notKept,
  scopeOf,
  times,
} from './finding.ts';
import type { ForcedChoiceResult } from './forced-choice-result.ts';
import { equationOfP, formatShare } from './format-probability.ts';

/** What a method with one right answer says in its own words. */
export interface DifferenceWords {
  /** After the listeners: "told A from B". */
  told(result: ForcedChoiceResult, cables: FindingContext['cables']): string;
  /** What the test looked for: "a difference between A and B". */
  sought(result: ForcedChoiceResult, cables: FindingContext['cables']): string;
  /** What scores below chance must not be taken for, or nothing. */
  readonly below?: string;
}

function subjectOf({ listeners, test }: ForcedChoiceResult): string {
  if (listeners === 1) return 'One listener';
  return test === 'shared-presentations' ? 'At least one panel member' : 'At least one of these listeners';
}

function countOf({ correct, answers, p, alpha }: ForcedChoiceResult): string {
  return `${correct} of ${answers} right, ${equationOfP(Number(p.value), Number(alpha))}, one-sided level ${alpha}`;
}

function namedListeners({ byListener, isSignificant, listeners }: ForcedChoiceResult): string[] {
  if (!isSignificant || listeners < 2) return [];
  const named = byListener.filter(({ isAboveGuessing }) => isAboveGuessing).map(({ listener }) => listener);
  if (named.length === 0) return ['The panel as a whole scored above chance; no single listener can be named.'];
  return [`Above guessing on their own, adjusted by Holm’s rule: ${named.join(', ')}.`];
}

/** A listener above guessing where the registered test of all answers found nothing: a hint, not a result. */
function hints({ byListener, isSignificant, listeners }: ForcedChoiceResult): string[] {
  if (isSignificant || listeners < 2) return [];
  const hinting = byListener.filter(({ isAboveGuessing }) => isAboveGuessing).map(({ listener }) => listener);
  if (hinting.length === 0) return [];
  return [`Exploratory: ${hinting.join(', ')} scored above guessing; this needs a new pre-registered test.`];
}

/** Limits over several listeners' own draws are about these answers, not about people. */
function average({ listeners }: ForcedChoiceResult): string {
  return listeners > 1 ? ' These figures are the average over this panel’s answers, not about people in general.' : '';
}

/** How large the effect is, with the one-sided limit that belongs to a one-sided test. */
function effect(result: ForcedChoiceResult): string[] {
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
function openQuestion(result: ForcedChoiceResult): string {
  const { estimates, answers, alpha, test, chance } = result;
  if (answers === 0) return 'No answers were counted.';
  if (test === 'shared-presentations' || estimates === null)
    return 'No upper limit for the above-chance rate is valid for a group in this version, so none is given.';
  const { confidence, limit } = estimates.aboveGuessing.oneSidedUpper;
  const rate = detectableRate(answers, chance, Number(alpha), 0.8);
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
  result: ForcedChoiceResult,
  context: FindingContext,
  words: DifferenceWords,
): Pick<Finding, 'row' | 'headline' | 'maySay'> {
  const sought = words.sought(result, context.cables);
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
      headline: `Inconclusive. The test did not detect ${sought}, and does not exclude one.`,
      maySay:
        result.answers === 0
          ? null
          : `A registered blind test did not detect ${sought} (${countOf(result)}); it does not exclude one.`,
    };
  const subject = subjectOf(result);
  const told = `${words.told(result, context.cables)} more often than guessing allows`;
  return {
    row: '2',
    headline: `${subject} ${told}.`,
    maySay: `In a registered blind test with ${times(result.listeners, 'listener')}, ${subject.toLowerCase()} ${told} (${countOf(result)}). Level at the load was not recorded; loudness may explain the difference.`,
  };
}

/**
 * The finding of a method with one right answer: exactly one headline, what modifies it, and what may be said.
 *
 * The rows are those of the table in docs/spec/statistics.md that this analysis can reach: 0 the record does not hold,
 * 1 below chance, 2 a difference, 5 inconclusive.
 *
 * @param result  the registered result, as on the record
 * @param context what it was found about, and what the record shows
 * @param words   the method's own
 */
export function differenceFinding(
  result: ForcedChoiceResult,
  context: FindingContext,
  words: DifferenceWords,
): Finding {
  const body = bodyOf(result, context, words);
  return {
    ...body,
    modifiers: [
      ...(body.row === '1' && words.below !== undefined ? [words.below] : []),
      ...(body.row === '2' ? [...effect(result), ...namedListeners(result)] : []),
      ...(body.row === '5' ? [openQuestion(result), ...hints(result)] : []),
      ...courseModifiers(result, { tooFew: 'trials', missing: result.missingAnswers }, context),
      levelUnknown,
    ],
    scope: scopeOf(context),
    mustNotSay: neverSaid,
  };
}
