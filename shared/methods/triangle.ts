import { anyDifference } from '../findings/difference-finding.ts';
import type { ForcedChoice } from '../findings/forced-choice.ts';
import type { ForcedChoiceResult } from '../findings/forced-choice-result.ts';
import { oddByDistance } from '../statistics/psychometric.ts';
import { fittedAtFirst, oneAndOther, spokenPlace } from './familiarisation.ts';
import { forcedChoiceScoring } from './forced-choice-method.ts';
import type { Method } from './method.ts';

const places: readonly string[] = ['first', 'second', 'third'];

/** The place that stands alone: in ABA it is the second. */
function oddIn(order: string): string {
  const odd = places.find((_, index) => order.split(order.charAt(index)).length === 2);
  if (odd === undefined) throw new RangeError(`${order} has no odd one`);
  return odd;
}

export const triangleQuestion: ForcedChoice = {
  method: 'triangle',
  labels: places,
  rules: { differencing: { psychometric: oddByDistance, words: 'if by differences' } },
};

const scoring = forcedChoiceScoring({
  question: triangleQuestion,
  rightOf: oddIn,
  words: anyDifference,
  smallEffect: 'Two matched cables rarely give more than',
});

/**
 * Triangle: three presentations, two of one cable and one of the other; the listener says which was the odd one. A trial's
 * truth is one of the six orders, A being the protocol's first cable.
 */
export const triangle: Method<ForcedChoiceResult> = {
  ...scoring,
  id: 'triangle',
  name: 'Triangle',
  explanation:
    'You hear three, one after the other. Two are the same cable, one is another. You say which was the odd one.',
  settings: [],
  attribute: null,

  truths: ['AAB', 'ABA', 'BAA', 'BBA', 'BAB', 'ABB'],
  presentations: places,
  familiarisation: oneAndOther,
  fitted: (presentation, order, firstSide) => {
    if (order === null) return fittedAtFirst(presentation === 'one', firstSide);
    return order.charAt(places.indexOf(presentation)) === 'A' ? 0 : 1;
  },
  fitterCouldSee: 'Whoever fits the cables could still see from their codes which of the three was the odd one.',
  separate: {
    what: 'each of the three',
    stillSeen:
      'Each of the three was fitted under a code of its own. From the four codes whoever fits them could still narrow the odd one down to two of the three places, and not tell which of the two it was.',
    // Which specimen stands for the cable that comes once, and in which order those of the other come.
    deals: 4,
    specimen: (presentation, order, deal) => {
      if (order === null) return 0;
      const alone = deal < 2 ? 0 : 1;
      const odd = oddIn(order);
      if (presentation === odd) return alone;
      const isFirst = places.find((place) => place !== odd) === presentation;
      return isFirst === (deal % 2 === 0) ? 0 : 1;
    },
  },
  onRequest: null,

  spoken: spokenPlace,
  question: () => 'Which one was the odd one?',
  announcement: 'Next you say which of the three was the odd one.',
  options: () =>
    places.map((value, index) => ({
      value,
      letter: String(index + 1),
      sentence: `The ${value} was the odd one`,
      short: `the ${value}`,
    })),

  trials: {
    ...scoring.trials,
    legend:
      'Filled rings are locked trials, struck ones are void; in the tables the answers that found the odd one are bold. Which one was odd and what was answered was hidden from everybody until closing.',
    session: (firstSide, cables) => `In the familiarisation ${cables[firstSide]} was heard first.`,
    when: (answer) => `the odd one came ${answer}`,
    named: () => 'the odd one',
    drawnHeader: 'Odd one',
    drawn: (order, cables) =>
      `the ${oddIn(order)}, ${cables[order.charAt(places.indexOf(oddIn(order))) === 'A' ? 0 : 1]}`,
    answeredHeader: ({ short }) => `Answered ${short}`,
  },
  source: 'ISO 4120, Sensory analysis: Triangle test (year from memory); Ura (1960) and Ennis (1993) for d′',
};
