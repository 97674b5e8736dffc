import { abxFinding } from '../findings/abx-finding.ts';
import { abxNullDistribution } from '../findings/abx-null-distribution.ts';
import { abxPortrait } from '../findings/abx-portrait.ts';
import type { AbxResult } from '../findings/abx-result.ts';
import { analyseAbx } from '../findings/analyse-abx.ts';
import type { Method, ScoredTrial } from './method.ts';

const side = (label: string | null): 'A' | 'B' => {
  if (label === 'A' || label === 'B') return label;
  throw new RangeError(`${label} is neither A nor B`);
};

const abxTrial = ({ session, trial, truth, answers }: ScoredTrial) => ({
  session,
  trial,
  truth: side(truth),
  answers: answers.map(({ listener, choice }) => ({ listener, choice: choice === null ? null : side(choice) })),
});

const isRight = (choice: string, truth: string) => choice === truth;

/** ABX: A and B are presented and named, X is one of them; the listener says which. */
export const abx: Method<AbxResult> = {
  id: 'abx',
  name: 'ABX',
  explanation: 'You hear A, then B, then X. X is one of the two. You say which.',
  settings: [],

  truths: ['A', 'B'],
  presentations: ['A', 'B', 'X'],
  familiarisation: ['A', 'B'],
  fitted: (presentation, truth, firstSide) => {
    const isA = side(presentation === 'X' ? truth : presentation) === 'A';
    return isA === (firstSide === 0) ? 0 : 1;
  },
  fitterCouldSee: 'Whoever fits X could still see whether its code is that of A.',

  spoken: (presentation) => presentation,
  question: 'Which one did X match?',
  announcement: 'Next you say which one it matches.',
  options: () => [
    { value: 'A', letter: 'A', sentence: 'X was the same as A', short: 'A' },
    { value: 'B', letter: 'B', sentence: 'X was the same as B', short: 'B' },
  ],

  registered: () => ({ name: 'abx/1', alternative: 'greater', missing: 'counted as wrong' }),
  chance: { numerator: 1, denominator: 2 },
  analyse: ({ analysis: { alpha }, listenersPerSession }, trials) =>
    analyseAbx({ alpha, listenersPerSession, trials: trials.map(abxTrial) }),
  nullDistribution: (trials) => abxNullDistribution(trials.map(abxTrial)),
  finding: abxFinding,

  plan: {
    needed: (count) => `${count} right`,
    underNull: 'are needed. If nobody hears a difference,',
    found: 'a difference',
    atRate: 'right',
    counted: 'right answers',
    guessing: 'Guessing is right',
    extreme: 'even with every answer right, guessing does as well',
    smallEffect: 'Two matched cables rarely give more than',
    notShown: 'A test that finds nothing does not show that there is nothing.',
    caution: () => null,
  },
  trials: {
    legend:
      'Filled rings are locked trials, struck ones are void; in the tables the answers that matched X are bold. What X was and what was answered was hidden from everybody until closing.',
    session: (firstSide, cables) => `A was ${cables[firstSide]}, B was ${cables[firstSide === 0 ? 1 : 0]}.`,
    drawnHeader: 'X was',
    drawn: (truth) => truth,
    answeredHeader: ({ value }) => `Answered ${value}`,
    isRight,
    countHeader: () => 'Matched',
    count: (answers, truth) =>
      `${answers.filter(({ choice }) => choice !== null && isRight(choice, truth)).length} of ${answers.length}`,
  },
  portray: abxPortrait,
  source:
    'Macmillan and Creelman, Detection Theory: A User’s Guide, 2nd ed. (2005); Kaplan, Macmillan and Creelman (1978)',
};
