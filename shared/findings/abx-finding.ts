import { evenChance } from '../statistics/chance.ts';
import { detectableRate } from '../statistics/detectable-rate.ts';
import type { AbxResult } from './abx-result.ts';
import {
  confidenceText,
  courseModifiers,
  type Finding,
  type FindingContext,
  notKept,
  scopeOf,
  times,
} from './finding.ts';
import { equationOfP, formatShare } from './format-probability.ts';

function subjectOf({ listeners, test }: AbxResult): string {
  if (listeners === 1) return 'One listener';
  return test === 'shared-presentations' ? 'At least one panel member' : 'At least one of these listeners';
}

function countOf({ correct, answers, p, alpha }: AbxResult): string {
  return `${correct} of ${answers} right, ${equationOfP(Number(p.value), Number(alpha))}, one-sided level ${alpha}`;
}

function namedListeners({ byListener, isSignificant, listeners }: AbxResult): string[] {
  if (!isSignificant || listeners < 2) return [];
  const named = byListener.filter(({ isAboveGuessing }) => isAboveGuessing).map(({ listener }) => listener);
  if (named.length === 0) return ['The panel as a whole scored above chance; no single listener can be named.'];
  return [`Above guessing on their own, adjusted by Holm’s rule: ${named.join(', ')}.`];
}

/** A listener above guessing where the registered test of all answers found nothing: a hint, not a result. */
function hints({ byListener, isSignificant, listeners }: AbxResult): string[] {
  if (isSignificant || listeners < 2) return [];
  const hinting = byListener.filter(({ isAboveGuessing }) => isAboveGuessing).map(({ listener }) => listener);
  if (hinting.length === 0) return [];
  return [`Exploratory: ${hinting.join(', ')} scored above guessing; this needs a new pre-registered test.`];
}

/** Limits over several listeners' own draws are about these answers, not about people. */
function average({ listeners }: AbxResult): string {
  return listeners > 1 ? ' These figures are the average over this panel’s answers, not about people in general.' : '';
}

/** How large the effect is, with the one-sided limit that belongs to a one-sided test. */
function effect(result: AbxResult): string[] {
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
function openQuestion(result: AbxResult): string {
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

function bodyOf(result: AbxResult, context: FindingContext): Pick<Finding, 'row' | 'headline' | 'maySay'> {
  const [first, second] = context.cables;
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
export function abxFinding(result: AbxResult, context: FindingContext): Finding {
  const body = bodyOf(result, context);
  return {
    ...body,
    modifiers: [
      ...(body.row === '2' ? [...effect(result), ...namedListeners(result)] : []),
      ...(body.row === '5' ? [openQuestion(result), ...hints(result)] : []),
      ...courseModifiers(result, { tooFew: 'trials', missing: result.missingAnswers }, context),
      levelUnknown,
    ],
    scope: scopeOf(context),
    mustNotSay: neverSaid,
  };
}
