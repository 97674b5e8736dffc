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
import type { PreferenceResult } from './preference-result.ts';

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

const levelUnknown = 'Level at the load was not recorded in Fairlead; loudness may explain a preference.';

/** How large the preference is, where every answer had a draw of its own. */
function effect({ estimates, preferred, favours, decided, listeners }: PreferenceResult, cables: Names): string {
  if (estimates === null)
    return 'The listeners heard the same presentations, so no interval is stated for their answers together.';
  const side = favours ?? 0;
  const { lower, upper, confidence } = estimates.interval;
  const [from, to] = side === 0 ? [Number(lower), Number(upper)] : [1 - Number(upper), 1 - Number(lower)];
  const share = formatShare(preferred[side] / decided, 'nearest');
  const range = `${formatShare(from, 'down')} to ${formatShare(to, 'up')}`;
  const average =
    listeners > 1 ? ' These figures are the average over this panel’s answers, not about people in general.' : '';
  return `Share of ${cables[side]} among the answers that preferred one: ${share} (${confidenceText(confidence)} interval ${range}).${average}`;
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

function nothingShown(result: PreferenceResult, cables: Names): string[] {
  if (result.decided === 0) return ['No answer preferred either.'];
  return [
    'It does not show that both are liked equally.',
    ...(result.estimates === null ? [] : [effect(result, cables)]),
    ...named(result, cables),
  ];
}

function bodyOf(
  result: PreferenceResult,
  context: FindingContext,
): Pick<Finding, 'row' | 'headline' | 'maySay' | 'modifiers'> {
  const { cables } = context;
  const barred = notKept(context);
  if (barred !== null) return { ...barred, modifiers: [] };
  const { favours } = result;
  if (!result.isSignificant || favours === null) {
    const shown = `between ${cables[0]} and ${cables[1]}`;
    const ties = result.noPreference === 'not offered' ? '' : `, no preference ${result.undecided}`;
    const counts = `${cables[0]} ${result.preferred[0]}, ${cables[1]} ${result.preferred[1]}${ties}`;
    return {
      row: 'none',
      headline: `No preference was shown ${shown}.`,
      maySay:
        result.decided === 0
          ? null
          : `A registered blind test showed no preference ${shown} (answers: ${counts}; ${testOf(result)}); it does not show that both are liked equally.`,
      modifiers: nothingShown(result, cables),
    };
  }
  const other = cables[favours === 0 ? 1 : 0];
  const headline = `${panelOf(result)} answers favoured ${cables[favours]} over ${other}`;
  const inside = `${headline.charAt(0).toLowerCase()}${headline.slice(1)}`;
  return {
    row: '10',
    headline: `${headline}: ${countOf(result)}.`,
    maySay: `In a registered blind test, ${inside} (${countOf(result)}; ${testOf(result)}). Level at the load was not recorded; loudness may explain the preference.`,
    modifiers: [effect(result, cables), ...people(result, favours, cables), ...named(result, cables)],
  };
}

/**
 * The finding of a paired preference: exactly one headline, what modifies it, and what may be said.
 *
 * The rows are those of the table in docs/spec/statistics.md that this analysis can reach: 0 the record does not hold,
 * 10 a preference, none otherwise. A preference is never called better, and never audible: that was not asked.
 *
 * @param result  the registered result, as on the record
 * @param context what it was found about, and what the record shows
 */
export function preferenceFinding(result: PreferenceResult, context: FindingContext): Finding {
  const { modifiers, ...body } = bodyOf(result, context);
  return {
    ...body,
    modifiers: [
      ...modifiers,
      ...courseModifiers(result, { tooFew: 'answers that prefer one', missing: result.missingAnswers }, context),
      levelUnknown,
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
