import type { Portrait } from '../methods/portrait.ts';
import { amongWords } from './among-words.ts';
import type { ForcedChoice } from './forced-choice.ts';
import type { ForcedChoiceResult, RateEstimates } from './forced-choice-result.ts';
import { equationOfP, formatProbability } from './format-probability.ts';
import { basisWords, noInterval, percentOf, testWords } from './portrait-words.ts';
import { portrayChecks } from './session-checks.ts';

/** What the report of a method with one right answer shows: the count, p with its test, and an effect only where one is valid. */
export function forcedChoicePortrait({ rules }: Pick<ForcedChoice, 'rules'>, result: ForcedChoiceResult): Portrait {
  const { correct, answers, p, alpha, test, critical, estimates } = result;
  return {
    figures: [
      { value: `${correct} / ${answers}`, label: 'answers right' },
      { value: equationOfP(Number(p.value), Number(alpha)), label: `${testWords[test]}, one-sided` },
      ...(estimates ? [effect(estimates)] : []),
      ...upperLimit(result),
    ],
    note: estimates ? `${basisWords(estimates)}${sensitivityWords(rules, estimates)}` : noInterval,
    conditions: [
      ...(critical ? [{ label: 'Right answers needed', value: String(critical.count) }] : []),
      ...marginFacts(result),
    ],
    distribution: {
      title: `Where ${correct} falls if every answer is a guess`,
      lede: ledeOf(result),
      observed: correct,
      quantity: `Right answers out of ${answers}`,
      ...(critical ? { limit: critical.count } : {}),
      chanceOf: 'Chance by guessing',
    },
    listeners: listenersOf(result),
    checks: portrayChecks(result.checks),
  };
}

/** The registered margin and what came of it. */
function marginFacts({ margin }: ForcedChoiceResult): Portrait['conditions'] {
  if (margin === undefined) return [];
  return [
    { label: 'Margin', value: `${percentOf(margin.share)} above guessing, ${margin.isBelow ? 'kept' : 'not shown'}` },
  ];
}

/** What the margin is held against. */
function upperLimit({ margin, estimates }: ForcedChoiceResult): Portrait['figures'] {
  if (margin === undefined || estimates === null) return [];
  const { limit } = estimates.aboveGuessing.oneSidedUpper;
  return [
    {
      value: percentOf(limit, 'up'),
      label: `upper limit, one-sided 95\u00a0%, for a margin of ${percentOf(margin.share)}`,
    },
  ];
}

function effect({ aboveGuessing: { rate, interval } }: RateEstimates): Portrait['figures'][number] {
  const limits = `${percentOf(interval.lower, 'down')} to ${percentOf(interval.upper, 'up')}`;
  return { value: percentOf(rate), label: `of answers above guessing, 95 % interval ${limits}` };
}

/** Every reading that the method has; each depends on its model and decides nothing. */
function sensitivityWords(rules: ForcedChoice['rules'], { dPrime: readings }: RateEstimates): string {
  const face = ({ dPrime, lower, upper }: RateEstimates['dPrime'][string]) =>
    `${figureOf(dPrime)} (95 % interval ${figureOf(lower)} to ${figureOf(upper)})`;
  const faces = Object.entries(readings).map(([name, reading]) => `${face(reading)} ${rules[name]?.words ?? name}`);
  return `Expressed as d′, which depends on how listeners compare and decides nothing: ${faces.join(', ')}.`;
}

function figureOf(limit: string): string {
  return limit === 'Infinity' ? 'no upper limit' : Number(limit).toFixed(2);
}

function ledeOf({ test, coins, critical }: ForcedChoiceResult): string[] {
  if (test === 'shared-presentations')
    return [
      `All listeners of a session heard the same presentations, so there was one coin per trial and not one per answer; answers that agree out of habit would make a plain binomial test find differences that nobody hears. The registered test therefore keeps the answers as they are, re-draws what was right in all ${coins.toLocaleString('en')} trials that could change the count, and asks how often a fresh draw fits the answers as well as the real one.`,
      'Each bar is the chance of that many right answers over all draws.',
    ];
  const limit = critical === null ? '' : ` The registered limit was ${critical.count}.`;
  return [`Each bar is the chance of that many right answers by guessing.${limit}`];
}

/** Listeners side by side: each against guessing, and adjusted for how many of them there are. */
function listenersOf({ byListener, chance, amongListeners }: ForcedChoiceResult): Portrait['listeners'] {
  const figure = (header: string) => ({ header, isFigure: true });
  return {
    lede: [
      'One listener gives one answer per trial, so the binomial test is exact for each of them. Only somebody whose p still reaches the level after Holm’s adjustment for all listeners may be named. Intervals are Clopper-Pearson, 95 %.',
      ...amongWords(amongListeners, byListener.length),
    ],
    columns: ['Right', 'Missing', 'Exact p', 'p by Holm', 'Rate, 95 % interval'].map(figure),
    rows: byListener.map(({ listener, correct, answers, missing, p, holmP, interval, isAboveGuessing }) => ({
      listener,
      cells: [
        `${correct} of ${answers}`,
        String(missing),
        formatProbability(Number(p)),
        formatProbability(Number(holmP)),
        `${Math.round((correct / answers) * 100)} %, ${percentOf(interval.lower, 'down')} to ${percentOf(interval.upper, 'up')}`,
      ],
      named: isAboveGuessing ? 'yes' : null,
    })),
    chart: {
      middle: { value: chance.numerator / chance.denominator, words: 'guessing' },
      caption: 'Rate of right answers by listener, with 95 % Clopper-Pearson intervals',
      quantity: 'Right answers',
      rows: byListener.map(({ listener, correct, answers, interval }) => ({
        label: listener,
        value: answers === 0 ? 0 : correct / answers,
        low: Number(interval.lower),
        high: Number(interval.upper),
      })),
    },
  };
}
