import { binomialLogProbability } from '../statistics/binomial-log-probability.ts';
import { sharedPresentationTest } from '../statistics/shared-presentation-test.ts';
import { chanceOf, type ForcedChoice } from './forced-choice.ts';
import { type ForcedChoiceTrial, sharedTrialsOf } from './forced-choice-trials.ts';
import { hasOwnDraws } from './own-draws.ts';

/**
 * Where the number of right answers falls if every answer is a guess: the distribution behind the registered p, for
 * a chart.
 *
 * @param question the answers among which one is right
 * @param trials   all locked trials
 * @returns every possible count with its chance; the chances add up to 1
 * @throws RangeError when a trial is outside its domain
 * @example for one listener, two labels and two trials: 0, 1 and 2 with chances 1/4, 1/2 and 1/4 ; R: dbinom(0:2, 2, 0.5)
 * @see analyseForcedChoice for which test applies
 */
export function forcedChoiceNullDistribution(
  question: Pick<ForcedChoice, 'labels'>,
  trials: readonly ForcedChoiceTrial[],
): { count: number; chance: number }[] {
  if (hasOwnDraws(trials)) {
    const answers = trials.filter((trial) => trial.answers.length === 1).length;
    return Array.from({ length: answers + 1 }, (_, count) => ({
      count,
      chance: Math.exp(binomialLogProbability(count, answers, chanceOf(question))),
    }));
  }
  return sharedPresentationTest(sharedTrialsOf(trials, question.labels), 'greater').nullDistribution.map(
    ({ matching, probability }) => ({
      count: matching,
      chance: probability,
    }),
  );
}
