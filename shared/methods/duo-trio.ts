import { anyDifference } from '../findings/difference-finding.ts';
import type { ForcedChoice } from '../findings/forced-choice.ts';
import type { ForcedChoiceResult } from '../findings/forced-choice-result.ts';
import { matchingByDistance } from '../statistics/psychometric.ts';
import { fittedAtFirst, oneAndOther, spokenPlace } from './familiarisation.ts';
import { forcedChoiceScoring } from './forced-choice-method.ts';
import type { CablePlace, Method } from './method.ts';

const places = ['first', 'second'] as const;

/** The three cables of a trial in the order in which they are heard: reference, first, second. */
function heardIn(truth: string): readonly [CablePlace, CablePlace, CablePlace] {
  const cable = (letter: string): CablePlace => (letter === 'A' ? 0 : 1);
  return [cable(truth.charAt(0)), cable(truth.charAt(1)), cable(truth.charAt(2))];
}

/** Which sample is the reference again. */
function matchIn(truth: string): (typeof places)[number] {
  const [reference, first] = heardIn(truth);
  return reference === first ? 'first' : 'second';
}

export const duoTrioQuestion: ForcedChoice = {
  method: 'duo-trio',
  labels: places,
  rules: { differencing: { psychometric: matchingByDistance, words: 'if by differences' } },
};

const scoring = forcedChoiceScoring({
  question: duoTrioQuestion,
  rightOf: matchIn,
  words: anyDifference,
  smallEffect: 'Two matched cables rarely give more than',
});

/**
 * Duo-trio with a balanced reference: R is heard, then both cables, one of which is R again; the listener says which. A
 * trial's truth is what is heard as R, first and second; which cable is R is drawn for every trial. A is the protocol's
 * first cable.
 */
export const duoTrio: Method<ForcedChoiceResult> = {
  ...scoring,
  id: 'duo-trio',
  name: 'Duo-trio',
  explanation: 'You hear a reference, R, then two more. One of the two is the same as R. You say which.',
  settings: [],
  attribute: null,

  truths: ['AAB', 'ABA', 'BBA', 'BAB'],
  presentations: ['R', ...places],
  familiarisation: oneAndOther,
  fitted: (presentation, truth, firstSide) => {
    if (truth === null) return fittedAtFirst(presentation === 'one', firstSide);
    const [reference, first, second] = heardIn(truth);
    if (presentation === 'R') return reference;
    return presentation === 'first' ? first : second;
  },
  fitterCouldSee: 'Whoever fits the cables could still see from their codes which of the two was R again.',
  separate: {
    what: 'the reference, R,',
    stillSeen:
      'R had specimens and codes of its own, so that no code came twice in a trial. Whoever fits the cables could still see which trials had the same right answer, and not which answer it was.',
    deals: 1,
    specimen: (presentation) => (presentation === 'R' ? 1 : 0),
  },
  onRequest: null,

  spoken: (presentation) => (presentation === 'R' ? 'the reference, R' : spokenPlace(presentation)),
  question: () => 'Which one was the same as R?',
  announcement: 'Next you say which of the two was the same as R.',
  options: () =>
    places.map((value, index) => ({
      value,
      letter: String(index + 1),
      sentence: `The ${value} was the same as R`,
      short: `the ${value}`,
    })),

  trials: {
    ...scoring.trials,
    legend:
      'Filled rings are locked trials, struck ones are void; in the tables the answers that found R again are bold. What R was, where it came again and what was answered was hidden from everybody until closing.',
    session: (firstSide, cables) => `In the familiarisation ${cables[firstSide]} was heard first.`,
    when: (answer) => `R came again ${answer}`,
    named: () => 'the one that was R again',
    drawnHeader: 'R came again',
    drawn: (truth, cables) => `${matchIn(truth)}, R was ${cables[heardIn(truth)[0]]}`,
    answeredHeader: ({ short }) => `Answered ${short}`,
  },
  source: 'ISO 10399, Sensory analysis: Duo-trio test (year from memory); Ennis (1993) for d′',
};
