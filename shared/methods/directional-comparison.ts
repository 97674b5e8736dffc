import type { ForcedChoice } from '../findings/forced-choice.ts';
import type { ForcedChoiceResult } from '../findings/forced-choice-result.ts';
import { moreOfAttribute } from '../statistics/psychometric.ts';
import { fittedAtFirst, oneAndOther, spokenPlace } from './familiarisation.ts';
import { forcedChoiceScoring } from './forced-choice-method.ts';
import type { Method, MethodChoices } from './method.ts';

const places = ['first', 'second'] as const;

export const directionalQuestion: ForcedChoice = {
  method: 'directional-comparison',
  labels: places,
  rules: { 'more-of-it': { psychometric: moreOfAttribute, words: 'if the one with more of it is chosen' } },
};

const scoring = forcedChoiceScoring({
  question: directionalQuestion,
  rightOf: (truth) => truth,
  words: {
    told: ({ attribute }, [first, second]) => `found more ${attribute} in ${first} than in ${second}`,
    sought: ({ attribute }, [first, second]) => `more ${attribute} in ${first} than in ${second}`,
    notShown: 'that nobody can hear which has more of it, or that they sound alike in anything else',
    below:
      'The direction was registered before the first trial: that the other cable has more of it is no finding of this test.',
  },
  smallEffect: 'A slight difference gives perhaps',
});

/** A check cable is quieter than the reference, so that there is a right answer only where level is asked for. */
const levelWords = /\b(loud(er|ness)?|level|volume)\b/i;

const questionOf = ({ attribute = '' }: MethodChoices) => `Which one had more ${attribute}?`;

/**
 * Directional paired comparison (2-AFC): both cables are heard in an order drawn for every trial; the listener says which
 * has more of an attribute. Which one should have more is fixed in the protocol: its first cable. A trial's truth is the
 * place at which that cable was heard.
 */
export const directionalComparison: Method<ForcedChoiceResult> = {
  ...scoring,
  id: 'directional-comparison',
  name: 'Directional paired comparison',
  explanation:
    'You hear two cables, one after the other, in an order that is drawn anew each time. You say which one has more of what you are asked for.',
  settings: [],
  attribute: {
    label: 'More of what?',
    hint: 'A word or two that listeners read: “Which one had more bass?” Which cable should have more of it is chosen below; that direction is sealed with the protocol and told to nobody who listens.',
    firstCable: 'The cable that should have more',
  },

  truths: places,
  presentations: places,
  familiarisation: oneAndOther,
  fitted: (presentation, truth, firstSide) => {
    if (truth === null) return fittedAtFirst(presentation === 'one', firstSide);
    return presentation === truth ? 0 : 1;
  },
  fitterCouldSee: 'Whoever fits the cables could still see which code came first in a trial.',
  separate: null,
  onRequest: null,

  spoken: spokenPlace,
  question: questionOf,
  announcement: 'Next you say which of the two had more of it.',
  options: () =>
    places.map((value, index) => ({
      value,
      letter: String(index + 1),
      sentence: `The ${value} had more`,
      short: `the ${value}`,
    })),

  takesNoSteps: ({ attribute = '' }) =>
    levelWords.test(attribute)
      ? null
      : 'A step is a difference in level: it can be scored only where louder, loudness, level or volume is asked for',
  registered: (choices) => ({ ...scoring.registered(choices), direction: 'more in the first cable' }),
  plan: {
    ...scoring.plan,
    underNull: 'are needed. If nobody hears which has more,',
    found: 'which has more',
    caution: ({ attribute = '' }) => ({
      title: 'The direction is fixed.',
      words: `Right is the answer that finds more ${attribute === '' ? 'of it' : attribute} in the first cable. However clearly listeners find more in the other, this test does not show it.`,
    }),
  },
  trials: {
    ...scoring.trials,
    legend:
      'Filled rings are locked trials, struck ones are void; in the tables the answers in the registered direction are bold. Which cable came first and what was answered was hidden from everybody until closing.',
    session: (firstSide, cables) => `In the familiarisation ${cables[firstSide]} was heard first.`,
    when: (answer, [first]) => `${first} came ${answer}`,
    named: ([first]) => first,
    drawnHeader: 'Heard first',
    drawn: (truth, cables) => cables[truth === 'first' ? 0 : 1],
    answeredHeader: ({ short }) => `More in ${short}`,
  },
  source:
    'ISO 5495, Sensory analysis: Paired comparison test (year from memory); Green and Swets, Signal Detection Theory and Psychophysics (1966)',
};
