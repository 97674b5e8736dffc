import type { Chance } from '../statistics/chance.ts';
import { exactBinomialUpperTail } from '../statistics/exact-binomial.ts';
import { type Fraction, fractionToNumber } from '../statistics/fraction.ts';
import { holm } from '../statistics/holm.ts';
import type { ListenerResult } from './forced-choice-result.ts';
import type { ForcedChoiceTrial } from './forced-choice-trials.ts';
import { intervalWithMissing } from './interval-with-missing.ts';
import { recordDecimal } from './record-decimal.ts';

/**
 * Each listener's own result, in the order of their labels.
 *
 * One listener gives one answer per trial, so their own answers face independent draws and the exact binomial holds
 * for each of them, in a group too. The adjustment runs over all who had an answer due, also those who left.
 *
 * @param trials all locked trials
 * @param level  the registered level
 * @param chance chance of a right answer by guessing
 * @returns counts, exact p, Holm-adjusted p and a 95 % interval of the rate of right answers, per listener
 * @example a listener with 9 of 12 right, alone: p = 299/4096 = 0.0730 ; R: pbinom(8, 12, 0.5, lower.tail = FALSE)
 * @see holm and exactBinomialUpperTail for the sources
 */
export function listenerResults(
  trials: readonly ForcedChoiceTrial[],
  level: Fraction,
  chance: Chance,
): ListenerResult[] {
  const counts = [...countsByListener(trials)].sort(([a], [b]) => (a < b ? -1 : 1));
  const pValues = counts.map(([, { correct, answers }]) =>
    fractionToNumber(exactBinomialUpperTail(correct, answers, chance)),
  );
  const alpha = fractionToNumber(level);
  const adjusted = holm(pValues);
  return counts.map(([listener, { answers, missing, correct }], index) => ({
    listener,
    answers,
    missing,
    correct,
    p: recordDecimal(pValues[index] ?? 1),
    holmP: recordDecimal(adjusted[index] ?? 1),
    isAboveGuessing: (adjusted[index] ?? 1) <= alpha,
    interval: intervalWithMissing(correct, missing, answers),
  }));
}

interface Counts {
  answers: number;
  missing: number;
  correct: number;
}

function countsByListener(trials: readonly ForcedChoiceTrial[]): Map<string, Counts> {
  const counts = new Map<string, Counts>();
  for (const { right, answers } of trials) {
    for (const { listener, choice } of answers) {
      const before = counts.get(listener) ?? { answers: 0, missing: 0, correct: 0 };
      counts.set(listener, {
        answers: before.answers + 1,
        missing: before.missing + (choice === null ? 1 : 0),
        correct: before.correct + (choice === right ? 1 : 0),
      });
    }
  }
  return counts;
}
