import type { CableNames } from '../methods/method.ts';
import type { Portrait } from '../methods/portrait.ts';
import { equationOfP, formatProbability } from './format-probability.ts';
import { noGroupInterval, percentOf, testWords } from './portrait-words.ts';
import type { PreferenceResult } from './preference-result.ts';

/** What the report of a paired preference shows: answers per cable, p with its test, an interval only where one is valid. */
export function preferencePortrait(result: PreferenceResult, cables: CableNames): Portrait {
  const { preferred, decided, undecided, noPreference, p, alpha, test, critical, estimates } = result;
  const range = estimates?.interval;
  return {
    figures: [
      { value: `${preferred[0]} : ${preferred[1]}`, label: `answers for ${cables[0]} and for ${cables[1]}` },
      ...(noPreference === 'not offered' ? [] : [{ value: String(undecided), label: 'no preference, left out' }]),
      { value: equationOfP(Number(p.value), Number(alpha)), label: `${testWords[test]}, two-sided` },
      ...(estimates && range
        ? [
            {
              value: percentOf(estimates.share),
              label: `of them for ${cables[0]}, ${confidenceOf(range.confidence)} interval ${percentOf(range.lower, 'down')} to ${percentOf(range.upper, 'up')}`,
            },
          ]
        : []),
    ],
    note: `${estimates ? '' : `${noGroupInterval} `}${orderWords(result)}`,
    conditions: critical ? [{ label: 'Needed for one cable', value: `${critical.count} of ${decided}` }] : [],
    distribution: {
      title: `Where ${preferred[0]} falls if nobody prefers either`,
      lede: ledeOf(result, cables),
      observed: preferred[0],
      quantity: `Answers for ${cables[0]}, out of ${decided} that preferred one`,
      beyond: { low: Math.min(...preferred), high: Math.max(...preferred) },
      chanceOf: 'Chance without a preference',
    },
    listeners: listenersOf(result, cables),
  };
}

const confidenceOf = (confidence: string) => `${Number((Number(confidence) * 100).toPrecision(6))} %`;

/** A habit of choosing the first is harmless, because what came first was drawn; it is worth knowing all the same. */
function orderWords({ heardFirst, decided }: PreferenceResult): string {
  return decided === 0
    ? 'No answer preferred either.'
    : `${heardFirst} of ${decided} preferred what was heard first; the order was drawn anew for every trial, so such a habit favours neither cable.`;
}

function ledeOf({ test, coins, preferred, decided }: PreferenceResult, cables: CableNames): string[] {
  const far = `Tinted bars lie at least as far from the middle, ${decided / 2}, as ${preferred[0]} does, on either side; together they are p.`;
  if (test === 'shared-presentations')
    return [
      `All listeners of a session heard the same presentations, so there was one coin per trial and not one per answer; answers that agree out of habit would make a plain binomial test find preferences that nobody has. The registered test therefore keeps the answers as they are, re-draws which cable came first in all ${coins.toLocaleString('en')} trials that could change the count, and asks how often a fresh draw gives a count as uneven as the real one.`,
      `Each bar is the chance of that many answers for ${cables[0]} over all draws. ${far}`,
    ];
  return [`Each bar is the chance of that many answers for ${cables[0]} when an answer falls on either alike. ${far}`];
}

/** Listeners side by side: each against an even split, and adjusted for how many of them there are. */
function listenersOf({ byListener, noPreference, alpha }: PreferenceResult, cables: CableNames): Portrait['listeners'] {
  const confidence = confidenceOf(String(1 - Number(alpha)));
  const hasTies = noPreference !== 'not offered';
  const shareOf = ([first, second]: readonly [number, number]) => first / (first + second);
  return {
    lede: `One listener gives one answer per trial, so the binomial test is exact for each of them. Only somebody whose p still reaches the level after Holm’s adjustment for all listeners may be named. Intervals are Clopper-Pearson, ${confidence}, of the share of ${cables[0]} among the answers that preferred one.`,
    columns: [
      `For ${cables[0]}`,
      `For ${cables[1]}`,
      ...(hasTies ? ['No preference'] : []),
      'Missing',
      'Exact p',
      'p by Holm',
      `Share, ${confidence} interval`,
    ].map((header) => ({ header, isFigure: true })),
    rows: byListener.map(({ listener, preferred, undecided, missing, p, holmP, interval, favours }) => ({
      listener,
      cells: [
        String(preferred[0]),
        String(preferred[1]),
        ...(hasTies ? [String(undecided)] : []),
        String(missing),
        formatProbability(Number(p)),
        formatProbability(Number(holmP)),
        interval === null
          ? 'none preferred'
          : `${percentOf(shareOf(preferred))}, ${percentOf(interval.lower, 'down')} to ${percentOf(interval.upper, 'up')}`,
      ],
      named: favours === null ? null : `for ${cables[favours]}`,
    })),
    chart: {
      caption: `Share of answers for ${cables[0]} by listener, with ${confidence} Clopper-Pearson intervals`,
      quantity: `Answers for ${cables[0]}`,
      middle: 'no preference',
      rows: byListener.flatMap(({ listener, preferred, interval }) =>
        interval === null
          ? []
          : [{ label: listener, value: shareOf(preferred), low: Number(interval.lower), high: Number(interval.upper) }],
      ),
    },
  };
}
