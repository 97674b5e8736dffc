import { analyseForcedChoice } from '../findings/analyse-forced-choice.ts';
import { differenceFinding, type SoughtWords } from '../findings/difference-finding.ts';
import { chanceOf, type ForcedChoice } from '../findings/forced-choice.ts';
import { forcedChoiceCounts, leftOpenAtChance } from '../findings/forced-choice-counts.ts';
import { forcedChoiceNullDistribution } from '../findings/forced-choice-null-distribution.ts';
import { forcedChoicePortrait } from '../findings/forced-choice-portrait.ts';
import type { ForcedChoiceResult } from '../findings/forced-choice-result.ts';
import { forcedChoiceWords } from '../findings/forced-choice-words.ts';
import { percentOf } from '../findings/portrait-words.ts';
import { marginText } from '../protocol/registered-analysis.ts';
import { oneSidedPlan } from '../statistics/planned-test.ts';
import { dueAnswers } from './due-answers.ts';
import type { Method, ScoredAnswer, ScoredTrial, TrialWords } from './method.ts';

type Scoring = Pick<
  Method<ForcedChoiceResult>,
  | 'takesNoSteps'
  | 'registered'
  | 'margin'
  | 'planned'
  | 'sensitivity'
  | 'analyse'
  | 'nullDistribution'
  | 'finding'
  | 'plan'
  | 'portray'
> & { readonly trials: Pick<TrialWords, 'isRight' | 'answerFor' | 'countHeader' | 'count' | 'rates'> };

/** What a method says beside the words that all methods with one right answer share. */
type Asked = {
  readonly question: ForcedChoice;
  /** The answer that a trial's truth makes right. */
  rightOf(truth: string): string;
  readonly words: SoughtWords<ForcedChoiceResult>;
  /** "Two matched cables rarely give more than", before the rate of a small effect. */
  readonly smallEffect: string;
};

/** The scoring half of a method with one right answer: one analysis for them all, at the chance of its labels. */
export function forcedChoiceScoring({ question, rightOf, words, smallEffect }: Asked): Scoring {
  const forcedChoiceTrial = ({ session, trial, truth, answers }: ScoredTrial) => ({
    session,
    trial,
    right: rightOf(truth),
    answers,
  });
  const isRight = (choice: string, truth: string) => choice === rightOf(truth);
  const rightIn = (answers: readonly ScoredAnswer[], truth: string) =>
    answers.filter(({ choice }) => choice !== null && isRight(choice, truth)).length;
  return {
    takesNoSteps: () => null,
    registered: ({ marginPercent }) => ({
      name: `${question.method}/1`,
      alternative: 'greater',
      ...(marginPercent === undefined
        ? { missing: 'counted as wrong' }
        : { missing: 'counted as wrong, as right against the margin', margin: marginText(marginPercent) }),
    }),
    margin: {
      label: 'Share of answers above guessing, below',
      mostPercent: 90,
      shows: (percent) => `that fewer than ${percent}\u00a0% of answers are above guessing`,
      counts: 'trials',
      most: (count) => `at most ${count} right`,
    },
    planned: oneSidedPlan(chanceOf(question)),
    sensitivity: Object.values(question.rules),
    analyse: ({ analysis: { alpha, margin }, listenersPerSession, attribute, samplingFrame }, trials) =>
      analyseForcedChoice(question, {
        alpha,
        listenersPerSession,
        attribute,
        margin,
        samplingFrame,
        trials: trials.map(forcedChoiceTrial),
      }),
    nullDistribution: (trials) => forcedChoiceNullDistribution(question, trials.map(forcedChoiceTrial)),
    finding: (result, context) => differenceFinding(result, context, { ...forcedChoiceWords, ...words }),
    plan: {
      aim: { label: 'Find listeners who are right', rate: 'Right' },
      couldFind: (rate) => `a listener who is right ${percentOf(rate, 'up')} of the time`,
      leftOpen: (trials) => leftOpenAtChance(trials, chanceOf(question)),
      counts: forcedChoiceCounts(chanceOf(question)),
      needed: (count) => `${count} right`,
      underNull: 'are needed. If nobody hears a difference,',
      unfixed: null,
      found: 'a difference',
      atRate: (rate) => `${percentOf(rate)} right`,
      counted: 'right answers',
      guessing: 'Guessing is right',
      extreme: 'even with every answer right, guessing does as well',
      smallEffect,
      notShown: 'A test that finds nothing does not show that there is nothing.',
      caution: () => null,
    },
    trials: {
      isRight,
      answerFor: rightOf,
      countHeader: () => 'Right',
      count: (answers, truth) => `${rightIn(answers, truth)} of ${answers.length}`,
      rates: () => [{ label: 'Right', due: (trial) => dueAnswers(trial, (choice) => choice === rightOf(trial.truth)) }],
    },
    portray: (result) => forcedChoicePortrait(question, result),
  };
}
