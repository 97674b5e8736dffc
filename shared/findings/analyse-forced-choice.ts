import { criticalCount } from '../statistics/critical-count.ts';
import { parseDecimal } from '../statistics/decimal.ts';
import { requireBetween, requireWhole } from '../statistics/domain.ts';
import { exactBinomialUpperTail } from '../statistics/exact-binomial.ts';
import { compareFractions, type Fraction, fractionToNumber, reduceFraction } from '../statistics/fraction.ts';
import { type SharedPresentationTest, sharedPresentationTest } from '../statistics/shared-presentation-test.ts';
import { chanceOf, type ForcedChoice } from './forced-choice.ts';
import type { ForcedChoiceResult } from './forced-choice-result.ts';
import { type ForcedChoiceTrial, sharedTrialsOf } from './forced-choice-trials.ts';
import { listenerResults } from './listener-results.ts';
import { hasOwnDraws, requireDistinct } from './own-draws.ts';
import { pooledEstimatesOf } from './pooled-estimates-of.ts';
import { recordDecimal, recordDecimalOfFraction } from './record-decimal.ts';
import { suspectTail } from './result-frame.ts';

export interface ForcedChoiceData {
  /** The registered one-sided level as a decimal, strictly between 0 and 1: "0.05". */
  readonly alpha: string;
  /** Seats per session in the protocol, whole, at least 1. */
  readonly listenersPerSession: number;
  /** All locked trials of all sessions, abandoned ones included. */
  readonly trials: readonly ForcedChoiceTrial[];
  /** Of what the first cable was to have more, where the method asks for it. */
  readonly attribute?: string | undefined;
}

/**
 * The registered analysis of a method with one right answer: were the answers right more often than guessing explains?
 *
 * One listener at a time: every answer has a draw of its own, and the test is the exact one-sided binomial over all
 * answers due, missing ones wrong. Several listeners at a presentation: the shared-presentation test. Both compare an
 * exact fraction with the level, so a tie is a tie. The lower tail leaves missing answers out: silence is no sign of
 * swapped labels.
 *
 * @param question method, labels, of which one is right, and rules by which d′ is stated
 * @param data     level, seats per session and trials, as the record and the opened draw give them
 * @returns the result in the form that goes on the record
 * @throws RangeError when the level is no decimal between 0 and 1, trials or listeners come twice, or an answer
 *   is none of the labels
 * @example for one listener with 12 of 16 right in ABX, alpha "0.05": p 2517/65536 = 0.0384, significant
 *   ; R: binom.test(12, 16, alternative = "greater")
 * @see binomialTest and sharedPresentationTest for the tests and their sources
 */
export function analyseForcedChoice(
  question: ForcedChoice,
  { alpha, listenersPerSession, trials, attribute }: ForcedChoiceData,
): ForcedChoiceResult {
  const chance = chanceOf(question);
  const level = parseDecimal(alpha);
  requireBetween('alpha', fractionToNumber(level), 0, 1, 'open');
  requireWhole('listenersPerSession', listenersPerSession, 1, 1000);
  requireDistinct(trials);

  const shared = sharedPresentationTest(sharedTrialsOf(trials, question.labels), 'greater');
  const isOwnDraws = hasOwnDraws(trials);
  const test = isOwnDraws ? binomialOf(shared, level, chance) : sharedOf(shared);
  const byListener = listenerResults(trials, level, chance);

  return {
    method: question.method,
    randomisation: 'independent fair draw per trial',
    stopping: 'fixed number of trials',
    missingAnswers: 'counted as wrong',
    alternative: 'greater',
    ...(attribute === undefined ? {} : { attribute }),
    test: test.name,
    chance: { numerator: 1, denominator: chance.denominator },
    alpha,
    listenersPerSession,
    sessions: new Set(trials.map(({ session }) => session)).size,
    trials: trials.length,
    listeners: byListener.length,
    answers: shared.answers,
    missing: shared.missing,
    correct: shared.matching,
    p: {
      numerator: test.p.numerator.toString(),
      denominator: test.p.denominator.toString(),
      value: recordDecimalOfFraction(test.p),
    },
    isSignificant: compareFractions(test.p, level) <= 0,
    lowerTail: recordDecimalOfFraction(shared.lowerTail),
    isBelowGuessing: compareFractions(shared.lowerTail, suspectTail) <= 0,
    coins: test.coins,
    leastAttainableP: recordDecimalOfFraction(test.least),
    canReachAlpha: compareFractions(test.least, level) <= 0,
    critical: test.critical,
    byListener,
    estimates: isOwnDraws && shared.answers > 0 ? pooledEstimatesOf(shared, alpha, question) : null,
  };
}

interface Test {
  readonly name: ForcedChoiceResult['test'];
  readonly p: Fraction;
  readonly coins: number;
  readonly least: Fraction;
  readonly critical: ForcedChoiceResult['critical'];
}

function binomialOf(
  { matching, answers }: SharedPresentationTest,
  level: Fraction,
  chance: ReturnType<typeof chanceOf>,
): Test {
  const critical = answers === 0 ? null : criticalCount(answers, chance, fractionToNumber(level));
  return {
    name: 'exact-binomial',
    p: reduceFraction(exactBinomialUpperTail(matching, answers, chance)),
    coins: answers,
    least: { numerator: 1n, denominator: BigInt(chance.denominator) ** BigInt(answers) },
    critical: critical && { count: critical.count, attainedSize: recordDecimal(critical.attainedSize) },
  };
}

function sharedOf({ pFraction, coins, leastAttainable }: SharedPresentationTest): Test {
  return { name: 'shared-presentations', p: pFraction, coins, least: leastAttainable, critical: null };
}
