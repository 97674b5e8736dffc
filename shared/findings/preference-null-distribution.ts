import { sharedPresentationTest } from '../statistics/shared-presentation-test.ts';
import { type PreferenceTrial, preferenceSharedTrials } from './preference-trials.ts';

/**
 * Where the count of answers falls if nobody prefers either: the distribution behind the registered p, for a chart.
 *
 * It is the count for whichever cable has more answers, the first one at an even split. The two-sided test is symmetric,
 * so that counting for the other cable only turns the picture round.
 *
 * @param trials all locked trials
 * @returns every possible count with its chance, ascending; the chances add up to 1
 * @throws RangeError when a trial is outside its domain
 * @example for one listener who preferred one cable in both of two trials: 0, 1 and 2 with chances 1/4, 1/2 and 1/4
 *   ; R: dbinom(0:2, 2, 0.5)
 * @see analysePreference for the test
 */
export function preferenceNullDistribution(trials: readonly PreferenceTrial[]): { count: number; chance: number }[] {
  const { matching, answers, nullDistribution } = sharedPresentationTest(preferenceSharedTrials(trials), 'two-sided');
  const forFirst = nullDistribution.map(({ matching: count, probability }) => ({ count, chance: probability }));
  if (2 * matching >= answers) return forFirst;
  return forFirst.map(({ count, chance }) => ({ count: answers - count, chance })).reverse();
}
