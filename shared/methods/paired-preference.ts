import { analysePreference } from '../findings/analyse-preference.ts';
import { percentOf } from '../findings/portrait-words.ts';
import { leftOpenAtEven, preferenceCounts } from '../findings/preference-counts.ts';
import { preferenceFinding } from '../findings/preference-finding.ts';
import { preferenceNullDistribution } from '../findings/preference-null-distribution.ts';
import { preferencePortrait } from '../findings/preference-portrait.ts';
import type { PreferenceResult } from '../findings/preference-result.ts';
import { type PreferenceChoice, preferredCable } from '../findings/preference-trials.ts';
import { marginText } from '../protocol/registered-analysis.ts';
import { twoSidedPlan } from '../statistics/planned-test.ts';
import { dueAnswers } from './due-answers.ts';
import { fittedAtFirst, spokenPlace } from './familiarisation.ts';
import type { AnswerOption, Method, MethodChoices, ScoredAnswer, ScoredTrial } from './method.ts';

const noPreference = 'no-preference';
const offersNone = ({ methodSettings = [] }: MethodChoices) => methodSettings.includes(noPreference);

const place = (label: string): 'first' | 'second' => {
  if (label === 'first' || label === 'second') return label;
  throw new RangeError(`${label} is neither first nor second`);
};

const choiceOf = (choice: string | null): PreferenceChoice =>
  choice === null || choice === 'none' ? choice : place(choice);

const pair = ({ session, trial, truth, answers }: ScoredTrial) => ({
  session,
  trial,
  truth: place(truth),
  answers: answers.map(({ listener, choice }) => ({ listener, choice: choiceOf(choice) })),
});

const ofPlace = (value: 'first' | 'second', letter: string): AnswerOption => ({
  value,
  letter,
  sentence: value === 'first' ? 'The first' : 'The second',
  short: `the ${value}`,
});
const ofNone: AnswerOption = { value: 'none', letter: '–', sentence: 'No preference', short: 'no preference' };

const forFirstCable = (answers: readonly ScoredAnswer[], truth: string) =>
  answers.filter(({ choice }) => preferredCable(place(truth), choiceOf(choice)) === 0).length;

/**
 * Paired preference: both cables are heard, in an order drawn for every trial; the listener says which one they prefer.
 * A trial's truth is the place at which the protocol's first cable was heard. Nothing is right or wrong.
 */
export const pairedPreference: Method<PreferenceResult> = {
  id: 'paired-preference',
  name: 'Paired preference',
  explanation:
    'You hear two cables, one after the other, in an order that is drawn anew each time. You say which you prefer.',
  settings: [
    {
      id: noPreference,
      label: 'Offer “no preference” as an answer',
      hint: 'Such answers are left out of the test and stated beside the result. Without it, every answer must prefer one.',
    },
  ],
  attribute: null,

  truths: ['first', 'second'],
  presentations: ['first', 'second'],
  familiarisation: ['first', 'second'],
  fitted: (presentation, truth, firstSide) => {
    if (truth === null) return fittedAtFirst(presentation === 'first', firstSide);
    return presentation === truth ? 0 : 1;
  },
  fitterCouldSee: 'Whoever fits the cables could still see which code came first in a trial.',
  separate: null,
  onRequest: null,

  spoken: spokenPlace,
  question: () => 'Which do you prefer?',
  announcement: 'Next you say which you prefer.',
  options: (choices) => [ofPlace('first', '1'), ofPlace('second', '2'), ...(offersNone(choices) ? [ofNone] : [])],

  takesNoSteps: () =>
    'In a preference no answer is right, so a step cannot be scored; the same with the same can be asked',
  registered: (choices) => ({
    name: 'paired-preference/1',
    alternative: 'two-sided',
    missing: 'left out',
    ...(offersNone(choices) ? { undecided: 'left out' } : {}),
    ...(choices.marginPercent === undefined ? {} : { margin: marginText(choices.marginPercent) }),
  }),
  margin: {
    label: 'Share of people who prefer either, 50 % plus or minus',
    mostPercent: 45,
    shows: (percent) => `that between ${50 - percent}\u00a0% and ${50 + percent}\u00a0% of people prefer either cable`,
    counts: 'listeners',
    most: (count, of) => `${of - count} to ${count} people for the same cable`,
  },
  planned: twoSidedPlan,
  sensitivity: [],
  analyse: ({ analysis: { alpha, undecided, margin }, listenersPerSession }, trials) =>
    analysePreference({
      alpha,
      listenersPerSession,
      margin,
      offersNoPreference: undecided !== undefined,
      trials: trials.map(pair),
    }),
  nullDistribution: (trials) => preferenceNullDistribution(trials.map(pair)),
  finding: preferenceFinding,

  plan: {
    aim: { label: 'Find a preference of', rate: 'For one cable' },
    couldFind: (rate) => `a preference of ${percentOf(rate, 'up')} for one cable`,
    leftOpen: leftOpenAtEven,
    counts: preferenceCounts,
    needed: (count) => `${count} for the same cable`,
    underNull: 'are needed, when every answer prefers one. If nobody prefers either,',
    unfixed: null,
    found: 'a preference',
    atRate: (rate) => `${percentOf(rate)} for one cable`,
    counted: 'answers for one cable',
    guessing: 'Without a preference an answer falls on either cable',
    extreme: 'even with every answer for the same cable, indifference does as well',
    smallEffect: 'A slight preference gives perhaps',
    notShown: 'A test that finds no preference does not show that both are liked equally.',
    caution: (choices) =>
      offersNone(choices)
        ? {
            title: '“No preference” is on offer.',
            words:
              'The figures hold when every answer prefers one. Every answer of “no preference” is left out and takes from them.',
          }
        : null,
  },
  trials: {
    legend:
      'Filled rings are locked trials, struck ones are void. Which cable came first and what was answered was hidden from everybody until closing. No answer is right or wrong.',
    session: (firstSide, cables) => `In the familiarisation ${cables[firstSide]} was heard first.`,
    when: (answer, [first]) => `${first} came ${answer}`,
    named: ([first]) => first,
    answerFor: (truth) => truth,
    drawnHeader: 'Heard first',
    drawn: (truth, cables) => cables[place(truth) === 'first' ? 0 : 1],
    answeredHeader: ({ value, short }) => (value === 'none' ? 'No preference' : `Preferred ${short}`),
    isRight: null,
    countHeader: (cables) => `For ${cables[0]}`,
    count: (answers, truth) =>
      `${forFirstCable(answers, truth)} of ${answers.filter(({ choice }) => choice !== null && choice !== 'none').length}`,
    rates: (cables) => [
      {
        label: `For ${cables[0]}`,
        due: (trial) =>
          dueAnswers(
            { ...trial, answers: trial.answers.filter(({ choice }) => choice !== null && choice !== 'none') },
            (choice) => preferredCable(place(trial.truth), choiceOf(choice)) === 0,
          ),
      },
    ],
  },
  portray: preferencePortrait,
  source:
    'ISO 5495, Sensory analysis: Paired comparison test (year from memory); Christensen, Lee and Brockhoff, Food Quality and Preference 24 (2012), 119-128, on “no preference”',
};
