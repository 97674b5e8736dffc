import { abxNullDistribution } from '../findings/abx-null-distribution.ts';
import { analyseAbx } from '../findings/analyse-abx.ts';
import type { Method, ScoredTrial } from './method.ts';

const side = (label: string): 'A' | 'B' => {
  if (label === 'A' || label === 'B') return label;
  throw new RangeError(`${label} is neither A nor B`);
};

const abxTrial = ({ session, trial, truth, answers }: ScoredTrial) => ({
  session,
  trial,
  truth: side(truth),
  answers: answers.map(({ listener, choice }) => ({ listener, choice: choice === null ? null : side(choice) })),
});

/** ABX: A and B are presented and named, X is one of them; the listener says which. */
export const abx: Method = {
  id: 'abx',
  name: 'ABX',
  explanation: 'You hear A, then B, then X. X is one of the two. You say which.',
  sides: ['A', 'B'],
  truths: ['A', 'B'],
  presentations: ['A', 'B', 'X'],
  familiarisation: ['A', 'B'],
  fittedSide: (presentation, truth) => (presentation === 'X' ? truth : presentation),
  question: 'Which one did X match?',
  options: [
    { value: 'A', letter: 'A', sentence: 'X was the same as A' },
    { value: 'B', letter: 'B', sentence: 'X was the same as B' },
  ],
  isRight: (choice, truth) => choice === truth,
  chance: { numerator: 1, denominator: 2 },
  analyse: ({ alpha, listenersPerSession }, trials) =>
    analyseAbx({ alpha, listenersPerSession, trials: trials.map(abxTrial) }),
  nullDistribution: (trials) => abxNullDistribution(trials.map(abxTrial)),
  source:
    'Macmillan and Creelman, Detection Theory: A User’s Guide, 2nd ed. (2005); Kaplan, Macmillan and Creelman (1978)',
};
