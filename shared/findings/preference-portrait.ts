import type { CableNames } from '../methods/method.ts';
import type { Portrait } from '../methods/portrait.ts';
import { equationOfP, formatProbability } from './format-probability.ts';
import { basisWords, noInterval, percentOf, testWords } from './portrait-words.ts';
import type { ListenerPreference, PreferenceResult } from './preference-result.ts';
import { portrayChecks } from './session-checks.ts';

/** The cable that the figures are about: the favoured one, or the protocol's first at an even split. */
const leadOf = ({ favours }: PreferenceResult): 0 | 1 => favours ?? 0;

/** Limits of the first cable's share as limits of the lead's. */
function limitsOf({ lower, upper }: { lower: string; upper: string }, lead: 0 | 1): [number, number] {
  return lead === 0 ? [Number(lower), Number(upper)] : [1 - Number(upper), 1 - Number(lower)];
}

const rangeWords = ([low, high]: readonly [number, number]) => `${percentOf(low, 'down')} to ${percentOf(high, 'up')}`;
const confidenceOf = (confidence: string) => `${Number((Number(confidence) * 100).toPrecision(6))} %`;

/** What the report of a paired preference shows: answers per cable, p with its test, an interval only where one is valid. */
export function preferencePortrait(result: PreferenceResult, cables: CableNames): Portrait {
  const { preferred, decided, critical, estimates, margin } = result;
  const lead = leadOf(result);
  return {
    figures: figuresOf(result, cables),
    note: `${estimates ? basisWords(estimates) : `${noInterval} `}${orderWords(result)}`,
    conditions: [
      ...(critical ? [{ label: 'Needed for one cable', value: `${critical.count} of ${decided}` }] : []),
      ...(margin === undefined
        ? []
        : [
            {
              label: 'Margin, by people',
              value: `50\u00a0% ± ${percentOf(margin.share)}: ${margin.isWithin ? 'within it' : 'not shown'}`,
            },
          ]),
    ],
    distribution: {
      title: `Where ${preferred[lead]} falls if nobody prefers either`,
      lede: ledeOf(result, cables[lead]),
      observed: preferred[lead],
      quantity: `Answers for ${cables[lead]}, out of ${decided} that preferred one`,
      beyond: { low: Math.min(...preferred), high: Math.max(...preferred) },
      chanceOf: 'Chance without a preference',
    },
    listeners: listenersOf(result, cables),
    checks: portrayChecks(result.checks),
  };
}

function figuresOf(result: PreferenceResult, cables: CableNames): Portrait['figures'] {
  const { preferred, decided, undecided, noPreference, p, alpha, test, estimates } = result;
  const lead = leadOf(result);
  const other = lead === 0 ? 1 : 0;
  const share = estimates && {
    value: percentOf(preferred[lead] / decided),
    label: `of them for ${cables[lead]}, ${confidenceOf(estimates.interval.confidence)} interval ${rangeWords(limitsOf(estimates.interval, lead))}`,
  };
  return [
    { value: `${preferred[lead]} / ${decided}`, label: `answers preferred ${cables[lead]}` },
    { value: String(preferred[other]), label: `preferred ${cables[other]}` },
    ...(noPreference === 'not offered' ? [] : [{ value: String(undecided), label: 'no preference, left out' }]),
    { value: equationOfP(Number(p.value), Number(alpha)), label: `${testWords[test]}, two-sided` },
    ...(share ? [share] : []),
  ];
}

/** A habit of choosing the first is harmless, because what came first was drawn; it is worth knowing all the same. */
function orderWords({ heardFirst, decided }: PreferenceResult): string {
  return decided === 0
    ? 'No answer preferred either.'
    : `${heardFirst} of ${decided} preferred what was heard first; the order was drawn anew for every trial, so such a habit favours neither cable.`;
}

function ledeOf(result: PreferenceResult, name: string): string[] {
  const { test, coins, preferred, decided } = result;
  const far = `Tinted bars lie at least as far from the middle, ${decided / 2}, as ${preferred[leadOf(result)]} does, on either side; together they are p.`;
  if (test === 'shared-presentations')
    return [
      `All listeners of a session heard the same presentations, so there was one coin per trial and not one per answer; answers that agree out of habit would make a plain binomial test find preferences that nobody has. The registered test therefore keeps the answers as they are, re-draws which cable came first in all ${coins.toLocaleString('en')} trials that could change the count, and asks how often a fresh draw gives a count as uneven as the real one.`,
      `Each bar is the chance of that many answers for ${name} over all draws. ${far}`,
    ];
  return [`Each bar is the chance of that many answers for ${name} when an answer falls on either alike. ${far}`];
}

/** Listeners side by side: each against an even split, and adjusted for how many of them there are. */
function listenersOf(result: PreferenceResult, cables: CableNames): Portrait['listeners'] {
  const { byListener, noPreference, alpha } = result;
  const lead = leadOf(result);
  const confidence = confidenceOf(String(1 - Number(alpha)));
  const hasTies = noPreference !== 'not offered';
  const shareOf = ({ preferred }: ListenerPreference) => preferred[lead] / (preferred[0] + preferred[1]);
  return {
    lede: [
      `One listener gives one answer per trial, so the binomial test is exact for each of them. Only somebody whose p still reaches the level after Holm’s adjustment for all listeners may be named. Intervals are Clopper-Pearson, ${confidence}, of the share of ${cables[lead]} among the answers that preferred one.`,
    ],
    columns: [
      `For ${cables[0]}`,
      `For ${cables[1]}`,
      ...(hasTies ? ['No preference'] : []),
      'Missing',
      'Exact p',
      'p by Holm',
      `Share, ${confidence} interval`,
    ].map((header) => ({ header, isFigure: true })),
    rows: byListener.map((own) => ({
      listener: own.listener,
      cells: [
        String(own.preferred[0]),
        String(own.preferred[1]),
        ...(hasTies ? [String(own.undecided)] : []),
        String(own.missing),
        formatProbability(Number(own.p)),
        formatProbability(Number(own.holmP)),
        own.interval === null
          ? 'none preferred'
          : `${percentOf(shareOf(own))}, ${rangeWords(limitsOf(own.interval, lead))}`,
      ],
      named: own.favours === null ? null : `for ${cables[own.favours]}`,
    })),
    chart: {
      caption: `Share of answers for ${cables[lead]} by listener, with ${confidence} Clopper-Pearson intervals`,
      quantity: `Answers for ${cables[lead]}`,
      middle: { value: 0.5, words: 'no preference' },
      rows: byListener.flatMap((own) => {
        if (own.interval === null) return [];
        const [low, high] = limitsOf(own.interval, lead);
        return [{ label: own.listener, value: shareOf(own), low, high }];
      }),
    },
  };
}
