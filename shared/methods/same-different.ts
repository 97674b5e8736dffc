import { analyseSameDifferent } from '../findings/analyse-same-different.ts';
import { differenceFinding } from '../findings/difference-finding.ts';
import { percentOf } from '../findings/portrait-words.ts';
import { sameDifferentLeftOpen } from '../findings/same-different-left-open.ts';
import { sameDifferentPortrait } from '../findings/same-different-portrait.ts';
import type { SameDifferentResult } from '../findings/same-different-result.ts';
import { assignedTrials, type SameDifferentTrial } from '../findings/same-different-trials.ts';
import { sameDifferentWords } from '../findings/same-different-words.ts';
import { assignmentTest } from '../statistics/assignment-test.ts';
import { fractionToNumber } from '../statistics/fraction.ts';
import { sameDifferentPlan } from '../statistics/same-different.ts';
import { unbiasedByDifference } from '../statistics/unbiased-same-different.ts';
import { dueAnswers } from './due-answers.ts';
import { fittedAtFirst, oneAndOther, spokenPlace } from './familiarisation.ts';
import type { AnswerOption, Method, ScoredTrial } from './method.ts';

const isPairDifferent = (pair: string) => pair.charAt(0) !== pair.charAt(1);

const choiceOf = (choice: string | null): SameDifferentTrial['answers'][number]['choice'] => {
  if (choice === null || choice === 'same' || choice === 'different') return choice;
  throw new RangeError(`${choice} is neither same nor different`);
};

const pairTrial = ({ session, trial, truth, answers }: ScoredTrial): SameDifferentTrial => ({
  session,
  trial,
  isDifferent: isPairDifferent(truth),
  answers: answers.map(({ listener, choice }) => ({ listener, choice: choiceOf(choice) })),
});

const saidDifferent = (trial: ScoredTrial) => dueAnswers(trial, (choice) => choice === 'different');

const answer = (value: string, letter: string, sentence: string): AnswerOption => ({
  value,
  letter,
  sentence,
  short: value,
});

/**
 * Same-different: two fittings, of one cable twice or of both; the listener says whether they were the same. A trial's truth
 * is one of four pairs, each as likely, A being the protocol's first cable: a pair is a different one in half of them.
 */
export const sameDifferent: Method<SameDifferentResult> = {
  id: 'same-different',
  name: 'Same-different',
  explanation:
    'You hear two, one after the other. They are the same cable, or two different ones. You say which of the two it was.',
  settings: [],
  attribute: null,

  truths: ['AA', 'BB', 'AB', 'BA'],
  presentations: ['first', 'second'],
  familiarisation: oneAndOther,
  fitted: (presentation, pair, firstSide) => {
    if (pair === null) return fittedAtFirst(presentation === 'one', firstSide);
    return pair.charAt(presentation === 'first' ? 0 : 1) === 'A' ? 0 : 1;
  },
  fitterCouldSee: 'Whoever fits the cables could still see from their codes whether a pair was the same.',
  separate: {
    what: 'the second of a pair',
    stillSeen:
      'The second of a pair had specimens and codes of its own, so that no code came twice in a trial. Whoever fits the cables could still see which trials were of one kind and which of the other, and not which kind was the same.',
    deals: 1,
    specimen: (presentation) => (presentation === 'second' ? 1 : 0),
  },
  onRequest: null,

  spoken: spokenPlace,
  question: () => 'Were the two the same?',
  announcement: 'Next you say whether the two were the same.',
  options: () => [answer('same', '=', 'They were the same'), answer('different', '≠', 'They were different')],

  takesNoSteps: () => null,
  registered: () => ({ name: 'same-different/1', alternative: 'greater', missing: 'counted as wrong' }),
  margin: null,
  planned: sameDifferentPlan,
  sensitivity: [{ psychometric: unbiasedByDifference, words: 'if percepts are compared by differences' }],
  analyse: ({ analysis: { alpha }, listenersPerSession }, trials) =>
    analyseSameDifferent({ alpha, listenersPerSession, trials: trials.map(pairTrial) }),
  nullDistribution: (trials) => {
    const { ways, assignments } = assignmentTest(assignedTrials(trials.map(pairTrial), 'counted as wrong'));
    return ways.map(({ hits, count }) => ({
      count: hits,
      chance: fractionToNumber({ numerator: count, denominator: assignments }),
    }));
  },
  finding: (result, context) => differenceFinding(result, context, sameDifferentWords),

  plan: {
    aim: { label: 'Find listeners who say “different” on different trials', rate: 'Hits' },
    couldFind: (rate) =>
      `a listener with ${percentOf(rate, 'up')} hits and ${percentOf(1 - rate, 'down')} false alarms`,
    leftOpen: sameDifferentLeftOpen,
    counts: null,
    needed: (count) => `${count} hits`,
    underNull: 'are needed. If nobody hears a difference,',
    unfixed:
      'How many hits are needed (“different” on different trials) depends on how many trials the coins make different and on how often “different” is said at all; the registered test works it out at closing, exactly.',
    found: 'a difference',
    atRate: (rate) => `${percentOf(rate)} hits, ${percentOf(1 - rate)} false alarms`,
    counted: 'hits',
    guessing: null,
    extreme: 'even with every answer fitting the pair, guessing does as well',
    smallEffect: 'Two matched cables rarely give more than',
    notShown: 'A test that finds nothing does not show that there is nothing.',
    caution: () => null,
  },
  trials: {
    legend:
      'Filled rings are locked trials, struck ones are void. Whether a pair was the same and what was answered was hidden from everybody until closing.',
    session: (firstSide, cables) => `In the familiarisation ${cables[firstSide]} was heard first.`,
    when: (answer) => (answer === 'same' ? 'the pair was the same' : 'the pair was different'),
    named: () => null,
    answerFor: (pair) => (isPairDifferent(pair) ? 'different' : 'same'),
    drawnHeader: 'The pair was',
    drawn: (pair, cables) => {
      const [first, second] = [...pair].map((letter) => cables[letter === 'A' ? 0 : 1]);
      return isPairDifferent(pair) ? `different: ${first}, ${second}` : `the same: ${first}`;
    },
    answeredHeader: ({ value }) => `Said ${value}`,
    isRight: null,
    countHeader: () => 'Said different',
    count: (answers) => `${answers.filter(({ choice }) => choice === 'different').length} of ${answers.length}`,
    rates: () => [
      { label: 'Hits', due: (trial) => (isPairDifferent(trial.truth) ? saidDifferent(trial) : []) },
      { label: 'False alarms', due: (trial) => (isPairDifferent(trial.truth) ? [] : saidDifferent(trial)) },
    ],
  },
  portray: sameDifferentPortrait,
  source:
    'ASTM E2139, Same-Different Test (from memory); Christensen and Brockhoff, Food Quality and Preference 20 (2009), 514-520',
};
