import {
  averageWords,
  confidenceText,
  courseModifiers,
  type Finding,
  type FindingContext,
  scopeOf,
  times,
} from './finding.ts';
import { type FindingRow, type Found, firstRow } from './finding-row.ts';
import { equationOfP, formatShare } from './format-probability.ts';
import { levelClaim, levelModifiers } from './level-sentences.ts';
import type { PreferenceResult } from './preference-result.ts';
import { checkModifiers } from './session-checks.ts';

type Names = FindingContext['cables'];

const panelOf = ({ listeners }: PreferenceResult) => (listeners === 1 ? 'One listener’s' : 'This panel’s');

/** "12 of the 15 answers that preferred one, by 3 listeners; 2 stated no preference". */
function countOf({ preferred, favours, decided, listeners, undecided, noPreference }: PreferenceResult): string {
  const count = `${preferred[favours ?? 0]} of the ${times(decided, 'answer')} that preferred one, by ${times(listeners, 'listener')}`;
  return noPreference === 'not offered' ? count : `${count}; ${undecided} stated no preference`;
}

function testOf({ p, alpha }: PreferenceResult): string {
  return `${equationOfP(Number(p.value), Number(alpha))}, two-sided level ${alpha}`;
}

/** How large the preference is; in a group trials are counted. */
function effect({ estimates, preferred, favours, decided, listeners }: PreferenceResult, cables: Names): string {
  if (estimates === null)
    return 'No interval is stated: trials are counted, and they were too few or all came out alike.';
  const side = favours ?? 0;
  const { lower, upper, confidence } = estimates.interval;
  const [from, to] = side === 0 ? [Number(lower), Number(upper)] : [1 - Number(upper), 1 - Number(lower)];
  const share = formatShare(preferred[side] / decided, 'nearest');
  const range = `${formatShare(from, 'down')} to ${formatShare(to, 'up')}`;
  const basis = estimates.basis === 'trials' ? '; counted by trials, which the listeners shared' : '';
  return `Share of ${cables[side]} among the answers that preferred one: ${share} (${confidenceText(confidence)} interval ${range}${basis}).${averageWords({ listeners })}`;
}

/** Whether the count of answers may be turned into one of people. */
function people({ majorities, listeners, alpha }: PreferenceResult, favoured: 0 | 1, cables: Names): string[] {
  if (listeners < 2) return [];
  const { preferred, p, even, holdsForPeople } = majorities;
  const split = even === 0 ? '' : `, ${even} evenly`;
  const counted = `by their own majorities ${preferred[favoured]} of ${times(listeners, 'listener')} preferred ${cables[favoured]}${split} (sign test ${equationOfP(Number(p), Number(alpha))})`;
  return holdsForPeople
    ? [`More people preferred ${cables[favoured]}: ${counted}.`]
    : [`Repeated answers are not people: ${counted}, so nothing is said about how many people prefer it.`];
}

function named({ byListener, listeners, isSignificant }: PreferenceResult, cables: Names): string[] {
  if (listeners < 2) return [];
  const found = byListener.flatMap(({ listener, favours }) =>
    favours === null ? [] : [`${listener} preferred ${cables[favours]}`],
  );
  if (found.length === 0)
    return isSignificant ? ['The panel as a whole favoured one; no single listener can be named.'] : [];
  return isSignificant
    ? [`On their own, adjusted by Holm’s rule: ${found.join(', ')}.`]
    : [`Exploratory: ${found.join(', ')}; this needs a new pre-registered test.`];
}

/** "between 30% and 70%" */
function withinOf({ margin }: PreferenceResult): string {
  const share = Number(margin?.share ?? 0);
  return `between ${formatShare(0.5 - share, 'nearest')} and ${formatShare(0.5 + share, 'nearest')}`;
}

function majorityWords({ majorities: { preferred, even }, listeners }: PreferenceResult, cables: Names): string {
  const split = even === 0 ? '' : `, ${even} evenly and left out`;
  return `by their own majorities ${preferred[0]} of ${times(listeners, 'listener')} preferred ${cables[0]} and ${preferred[1]} ${cables[1]}${split}`;
}

/** A margin that was registered and not shown is said to be so. */
const marginOpen = (result: PreferenceResult) =>
  result.margin === undefined
    ? []
    : [`It was not shown that the share of people who prefer either lies ${withinOf(result)}.`];

const lowerFirst = (words: string) => `${words.charAt(0).toLowerCase()}${words.slice(1)}`;

const favouredWords = ({ result, context: { cables } }: Found<PreferenceResult>) => {
  const side = result.favours ?? 0;
  return `${panelOf(result)} answers favoured ${cables[side]} over ${cables[side === 0 ? 1 : 0]}`;
};

/** Rows 10 and 11 and what is left, in the order in which they are asked. */
const rows: readonly FindingRow<PreferenceResult>[] = [
  {
    row: '10',
    applies: ({ result }) => result.isSignificant && result.favours !== null,
    headline: (found) => `${favouredWords(found)}: ${countOf(found.result)}.`,
    modifiers: ({ result, context: { cables } }) => [
      effect(result, cables),
      ...people(result, result.favours ?? 0, cables),
      ...named(result, cables),
    ],
    maySay: (found) =>
      `In a registered blind test, ${lowerFirst(favouredWords(found))} (${countOf(found.result)}; ${testOf(found.result)}). ${levelClaim(found.context.levels, 'the preference')}`,
  },
  {
    row: '11',
    applies: ({ result }) => result.margin?.isWithin === true,
    headline: ({ result }) =>
      `The share of people who prefer either cable lies ${withinOf(result)}, with ${Math.round(Number(result.margin?.confidence) * 100)}% confidence.`,
    modifiers: ({ result, context: { cables } }) => [
      `It counts people and not answers: ${majorityWords(result, cables)}.`,
      ...(result.decided === 0 ? [] : [effect(result, cables)]),
      ...named(result, cables),
    ],
    maySay: ({ result, context: { cables } }) =>
      `In a registered blind test the share of people who prefer either ${cables[0]} or ${cables[1]} lay ${withinOf(result)}, with ${Math.round(Number(result.margin?.confidence) * 100)}% confidence (${majorityWords(result, cables)}).`,
  },
  {
    row: 'none',
    applies: () => true,
    headline: ({ context: { cables } }) => `No preference was shown between ${cables[0]} and ${cables[1]}.`,
    modifiers: ({ result, context: { cables } }) =>
      result.decided === 0
        ? ['No answer preferred either.']
        : [
            'It does not show that both are liked equally.',
            ...marginOpen(result),
            ...(result.estimates === null ? [] : [effect(result, cables)]),
            ...named(result, cables),
          ],
    maySay: ({ result, context: { cables } }) => {
      if (result.decided === 0) return null;
      const ties = result.noPreference === 'not offered' ? '' : `, no preference ${result.undecided}`;
      const counts = `${cables[0]} ${result.preferred[0]}, ${cables[1]} ${result.preferred[1]}${ties}`;
      return `A registered blind test showed no preference between ${cables[0]} and ${cables[1]} (answers: ${counts}; ${testOf(result)}); it does not show that both are liked equally.`;
    },
  },
];

/** The rows that such a test can come to, in the order in which they are asked; row 0 stands before them. */
export const preferenceRows = rows.map(({ row }) => row);

/**
 * The finding of a paired preference: exactly one headline, what modifies it, and what may be said.
 *
 * The rows are those of the table in docs/spec/statistics.md that this analysis can reach: 0 the record does not hold,
 * 10 a preference, 11 within the registered margin, none otherwise. A preference is never called better, and never
 * audible: that was not asked.
 *
 * @param result  the registered result, as on the record
 * @param context what it was found about, and what the record shows
 */
export function preferenceFinding(result: PreferenceResult, context: FindingContext): Finding {
  const body = firstRow(rows, { result, context });
  return {
    ...body,
    modifiers: [
      ...body.modifiers,
      ...(body.row === '0' ? [] : checkModifiers(result.checks)),
      ...courseModifiers(result, { tooFew: 'answers that prefer one', missing: result.missingAnswers }, context),
      ...levelModifiers(context.levels, 'a preference'),
    ],
    scope: scopeOf(context),
    mustNotSay: [
      'that either cable is better',
      'that a difference can be heard: this test does not ask it',
      ...(result.majorities.holdsForPeople ? [] : ['that more people prefer one of them']),
      ...(body.row === '10' ? [] : ['that both are liked equally']),
      'that it holds for other systems, listeners or music',
    ],
  };
}
