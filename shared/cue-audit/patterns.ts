import type { Method } from '../methods/method.ts';
import { binomialTest } from '../statistics/binomial-test.ts';
import { redrawTest } from '../statistics/redraw-test.ts';
import { runsTest } from '../statistics/runs-test.ts';
import type { CueTrial } from './cue-trials.ts';
import { labelOf, labelsOf } from './labels.ts';

// Cues that are no times: what was drawn before, and the order of a listener's own answers.

export type Pattern = {
  readonly listener: string | null;
  readonly p: number;
  /** How often it came, and how often by chance. */
  readonly observed: number;
  readonly expected: number;
  /** How far answers go with it, and with what was drawn, each in standard deviations under its own null. */
  readonly z: number;
  readonly truthZ: number;
};

/** Trials with the one before them in their session, where both locked one after the other. */
function pairsOf(trials: readonly CueTrial[]): [CueTrial, CueTrial][] {
  return trials.flatMap((trial, index): [CueTrial, CueTrial][] => {
    const before = trials[index - 1];
    return before !== undefined && before.session === trial.session ? [[before, trial]] : [];
  });
}

/** Whether what was drawn came again, or changed, more often than fair draws do: exactly binomial. */
export function drawRepeats(method: Method, trials: readonly CueTrial[]): Pattern | null {
  const pairs = pairsOf(trials);
  if (pairs.length === 0) return null;
  const repeats = pairs.filter(([a, b]) => labelOf(method, a.truth) === labelOf(method, b.truth)).length;
  const labels = labelsOf(method).length;
  const { p } = binomialTest(repeats, pairs.length, { numerator: 1, denominator: labels }, 'two-sided');
  return { listener: null, p, observed: repeats, expected: pairs.length / labels, z: 0, truthZ: 0 };
}

/** How far answers go with what was drawn, in standard deviations over all draws. */
export function truthZOf(method: Method, trials: readonly CueTrial[], listener: string | null = null): number {
  const labels = labelsOf(method);
  const { observed, mean, deviation } = redrawTest(
    trials.map(({ truth, answers }) => ({
      scores: method.truths.map((one) => countOf(answers, labelOf(method, one), listener)),
      drawn: method.truths.indexOf(truth),
    })),
  );
  if (deviation === 0 || labels.length === 0) return 0;
  return (observed - mean) / deviation;
}

function countOf(answers: CueTrial['answers'], label: string, listener: string | null): number {
  return answers.filter((answer) => answer.choice === label && (listener === null || answer.listener === listener))
    .length;
}

/**
 * Whether answers name what was right in the trial before: as they would if somebody learnt it, and stayed with an answer
 * that had been right or left one that had been wrong. The trial before is drawn anew, one draw for all listeners.
 */
export function followsPreviousTruth(method: Method, trials: readonly CueTrial[]): Pattern | null {
  const pairs = pairsOf(trials);
  if (pairs.length === 0) return null;
  const { observed, mean, deviation, p } = redrawTest(
    pairs.map(([before, { answers }]) => ({
      scores: method.truths.map((one) => countOf(answers, labelOf(method, one), null)),
      drawn: method.truths.indexOf(before.truth),
    })),
  );
  const z = deviation === 0 ? 0 : (observed - mean) / deviation;
  return { listener: null, p, observed, expected: mean, z, truthZ: truthZOf(method, trials) };
}

/**
 * Whether a listener's answers alternate, or stay, more than the same answers in another order would: runs of each
 * listener's most frequent answer against the others, counted exactly. The smallest p is adjusted for how many courses there
 * are by Bonferroni.
 */
export function alternation(method: Method, trials: readonly CueTrial[]): Pattern | null {
  const found: Pattern[] = [];
  for (const session of new Set(trials.map((trial) => trial.session))) {
    const own = trials.filter((trial) => trial.session === session);
    for (const listener of new Set(own.flatMap(({ answers }) => answers.map((answer) => answer.listener)))) {
      const course = own.flatMap(({ answers }) => answers.find((one) => one.listener === listener)?.choice ?? []);
      const pattern = alternationOf(course);
      if (pattern !== null) found.push({ ...pattern, listener, truthZ: truthZOf(method, own, listener) });
    }
  }
  const [first, ...others] = found;
  if (first === undefined) return null;
  const least = others.reduce((one, other) => (other.p < one.p ? other : one), first);
  return { ...least, p: Math.min(1, least.p * found.length) };
}

function alternationOf(course: readonly string[]): Pattern | null {
  if (course.length < 2) return null;
  const times = new Map<string, number>();
  for (const choice of course) times.set(choice, (times.get(choice) ?? 0) + 1);
  const [most] = [...times].sort(([a, m], [b, n]) => n - m || (a < b ? -1 : 1))[0] ?? [''];
  const marks = course.map((choice) => choice === most);
  const yes = marks.filter((mark) => mark).length;
  if (yes === marks.length) return null;
  const runs = 1 + marks.filter((mark, index) => index > 0 && mark !== marks[index - 1]).length;
  const { pTwoSided, mean, variance } = runsTest(yes, marks.length - yes, runs);
  const z = variance === 0 ? 0 : (runs - mean) / Math.sqrt(variance);
  return { listener: null, p: pTwoSided, observed: runs - 1, expected: mean - 1, z, truthZ: 0 };
}
