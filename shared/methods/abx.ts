import { anyDifference } from '../findings/difference-finding.ts';
import type { ForcedChoice } from '../findings/forced-choice.ts';
import type { ForcedChoiceResult } from '../findings/forced-choice-result.ts';
import { matchingByDistance, matchingByMidpoint } from '../statistics/psychometric.ts';
import { forcedChoiceScoring } from './forced-choice-method.ts';
import type { Method } from './method.ts';

const side = (label: string | null): 'A' | 'B' => {
  if (label === 'A' || label === 'B') return label;
  throw new RangeError(`${label} is neither A nor B`);
};

export const abxQuestion: ForcedChoice = {
  method: 'abx',
  labels: ['A', 'B'],
  rules: {
    differencing: { psychometric: matchingByDistance, words: 'if by differences' },
    independent: { psychometric: matchingByMidpoint, words: 'if each is judged by itself' },
  },
};

const scoring = forcedChoiceScoring({
  question: abxQuestion,
  rightOf: (truth) => truth,
  words: anyDifference,
  smallEffect: 'Two matched cables rarely give more than',
});

/** ABX: A and B are presented and named, X is one of them; the listener says which. */
export const abx: Method<ForcedChoiceResult> = {
  ...scoring,
  id: 'abx',
  name: 'ABX',
  explanation: 'You hear A, then B, then X. X is one of the two. You say which.',
  settings: [],
  attribute: null,

  truths: ['A', 'B'],
  presentations: ['A', 'B', 'X'],
  familiarisation: ['A', 'B'],
  fitted: (presentation, truth, firstSide) => {
    const isA = side(presentation === 'X' ? truth : presentation) === 'A';
    return isA === (firstSide === 0) ? 0 : 1;
  },
  fitterCouldSee: 'Whoever fits X could still see whether its code is that of A.',
  separate: {
    what: 'X',
    stillSeen:
      'X had specimens and codes of its own, so that no code of X was ever that of A or B. Whoever fits the cables could still see in which trials X was the same cable, and not which one it was.',
    deals: 1,
    specimen: (presentation) => (presentation === 'X' ? 1 : 0),
  },
  onRequest: {
    explanation:
      'In each trial you ask for A, B or X, as often as you need and the trial allows. X is one of the two. You say which.',
    announcement: 'Next you ask again, or answer.',
    fitterCouldSee:
      'Whoever fits the cables saw codes and never what was asked for. How often either code was asked for could still tell which one X was.',
    stillSeen:
      'What the listener asked for, whoever fits the cables never saw; how often each code was asked for, they did.',
  },

  spoken: (presentation) => presentation,
  question: () => 'Which one did X match?',
  announcement: 'Next you say which one it matches.',
  options: () => [
    { value: 'A', letter: 'A', sentence: 'X was the same as A', short: 'A' },
    { value: 'B', letter: 'B', sentence: 'X was the same as B', short: 'B' },
  ],

  trials: {
    ...scoring.trials,
    legend:
      'Filled rings are locked trials, struck ones are void; in the tables the answers that matched X are bold. What X was and what was answered was hidden from everybody until closing.',
    session: (firstSide, cables) => `A was ${cables[firstSide]}, B was ${cables[firstSide === 0 ? 1 : 0]}.`,
    when: (answer) => `X was ${answer}`,
    named: () => null,
    drawnHeader: 'X was',
    drawn: (truth) => truth,
    answeredHeader: ({ value }) => `Answered ${value}`,
  },
  source:
    'Macmillan and Creelman, Detection Theory: A User’s Guide, 2nd ed. (2005); Kaplan, Macmillan and Creelman (1978)',
};
