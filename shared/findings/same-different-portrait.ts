import type { Portrait } from '../methods/portrait.ts';
import { equationOfP, formatProbability } from './format-probability.ts';
import { basisWords, noInterval, testWords } from './portrait-words.ts';
import type { SameDifferentListener, SameDifferentResult } from './same-different-result.ts';
import type { AnswersOn } from './same-different-trials.ts';
import { sensitivityFace } from './same-different-words.ts';
import { portrayChecks } from './session-checks.ts';

/** What the report of same-different shows: hits and false alarms side by side, p with its test, d′ only where it is valid. */
export function sameDifferentPortrait(result: SameDifferentResult): Portrait {
  const { onDifferent, onSame, p, alpha, test, critical, estimates, differentTrials } = result;
  return {
    figures: [
      { value: `${onDifferent.different} / ${onDifferent.answers}`, label: 'hits: “different” on different trials' },
      { value: `${onSame.different} / ${onSame.answers}`, label: 'false alarms: “different” on same trials' },
      { value: equationOfP(Number(p.value), Number(alpha)), label: `${testWords[test]}, one-sided` },
      ...(estimates ? [sensitivity(estimates)] : []),
    ],
    note: estimates ? `${basisWords(estimates)}${biasWords(estimates)}` : noInterval,
    conditions: critical ? [{ label: 'Hits needed, with these answers', value: String(critical.count) }] : [],
    distribution: {
      title: `Where ${onDifferent.different} hits fall if nobody hears a difference`,
      lede: ledeOf(result),
      observed: onDifferent.different,
      quantity: `“Different” on ${differentTrials} different trials`,
      ...(critical ? { limit: critical.count } : {}),
      chanceOf: 'Chance by guessing',
    },
    listeners: listenersOf(result),
    checks: portrayChecks(result.checks),
  };
}

type Estimates = NonNullable<SameDifferentResult['estimates']>;

function sensitivity({ dPrime: { dPrime, lower, upper } }: Estimates): Portrait['figures'][number] {
  const value = dPrime === 'Infinity' ? '∞' : sensitivityFace(dPrime);
  return { value, label: `d′ by differences, 95 % limits ${sensitivityFace(lower)} to ${sensitivityFace(upper)}` };
}

/** A readiness to say "different" raises hits and false alarms alike; it is the bias, and d′ is free of it. */
function biasWords({ dPrime: { criterion } }: Estimates): string {
  const bias =
    criterion === 'Infinity'
      ? 'no same pair was called different, so that no end to the criterion can be told'
      : `two percepts were called different from about ${sensitivityFace(criterion)} standard deviations apart (the criterion, which is the bias)`;
  return `d′ depends on the model that percepts are compared by differences and decides nothing: ${bias}. A percentage of right answers would mix hits with the habit of saying “different”, so none is given.`;
}

function ledeOf({ trials, differentTrials, answers }: SameDifferentResult): string[] {
  const whole =
    answers > trials
      ? ' Whole trials are moved, because all listeners of a session heard the same pairs; answers that agree out of habit then find nothing.'
      : ' For one listener this is Fisher’s exact test.';
  return [
    `Of ${trials} trials ${differentTrials} turned out different. The registered test keeps the answers as they are, takes every choice of ${differentTrials} trials as the different ones, and asks how often a choice collects as many hits as the real one.${whole}`,
    'Each bar is the chance of that many hits over all choices. An answer that did not come counts as wrong: as “same” on a different trial, as “different” on a same one.',
  ];
}

const of = ({ different, answers }: AnswersOn) => (answers === 0 ? 'none due' : `${different} of ${answers}`);

/** Listeners side by side, and adjusted for how many of them there are. */
function listenersOf({ byListener }: SameDifferentResult): Portrait['listeners'] {
  return {
    lede: [
      'One listener gives one answer per trial, so Fisher’s exact test holds for each of them. Only somebody whose p still reaches the level after Holm’s adjustment for all listeners may be named. Intervals are Clopper-Pearson, 95 %.',
    ],
    columns: ['Hits', 'False alarms', 'Missing', 'Exact p', 'p by Holm'].map((header) => ({ header, isFigure: true })),
    rows: byListener.map(({ listener, onDifferent, onSame, missing, p, holmP, isAboveGuessing }) => ({
      listener,
      cells: [
        of(onDifferent),
        of(onSame),
        String(missing),
        formatProbability(Number(p)),
        formatProbability(Number(holmP)),
      ],
      named: isAboveGuessing ? 'yes' : null,
    })),
    chart: {
      caption: 'Rates of hits and of false alarms by listener, with 95 % Clopper-Pearson intervals',
      quantity: 'Answers “different”',
      middle: null,
      rows: byListener.flatMap(ratesOf),
    },
  };
}

function ratesOf({ listener, onDifferent, onSame, hitInterval, falseAlarmInterval }: SameDifferentListener) {
  const row = (kind: string, { different, answers }: AnswersOn, interval: SameDifferentListener['hitInterval']) =>
    interval === null
      ? []
      : [
          {
            label: `${listener} ${kind}`,
            value: different / answers,
            low: Number(interval.lower),
            high: Number(interval.upper),
          },
        ];
  return [...row('hits', onDifferent, hitInterval), ...row('false', onSame, falseAlarmInterval)];
}
