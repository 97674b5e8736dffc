import { evenChance } from '../statistics/chance.ts';
import { criticalCount } from '../statistics/critical-count.ts';
import { parseDecimal } from '../statistics/decimal.ts';
import { requireBetween, requireWhole } from '../statistics/domain.ts';
import { exactBinomialUpperTail } from '../statistics/exact-binomial.ts';
import { compareFractions, type Fraction, fractionToNumber, reduceFraction } from '../statistics/fraction.ts';
import { type SharedPresentationTest, sharedPresentationTest } from '../statistics/shared-presentation-test.ts';
import type { AbxResult } from './abx-result.ts';
import { type AbxTrial, sharedTrialsOf } from './abx-trials.ts';
import { listenerResults } from './listener-results.ts';
import { hasOwnDraws, requireDistinct } from './own-draws.ts';
import { pooledEstimatesOf } from './pooled-estimates-of.ts';
import { recordDecimal, recordDecimalOfFraction } from './record-decimal.ts';

export interface AbxData {
  /** The registered one-sided level as a decimal, strictly between 0 and 1: "0.05". */
  readonly alpha: string;
  /** Seats per session in the protocol, whole, at least 1. */
  readonly listenersPerSession: number;
  /** All locked trials of all sessions, abandoned ones included. */
  readonly trials: readonly AbxTrial[];
}

/** At this lower tail or below, scores are too low for guessing and the labels are suspect. */
const suspectTail: Fraction = { numerator: 1n, denominator: 100n };

/**
 * The registered analysis of an ABX study: did the answers match X more often than guessing explains?
 *
 * One listener at a time: every answer has a draw of its own, and the test is the exact one-sided binomial over all
 * answers due, missing ones wrong. Several listeners at a presentation: the shared-presentation test. Both compare an
 * exact fraction with the level, so a tie is a tie. The lower tail leaves missing answers out: silence is no sign of
 * swapped labels.
 *
 * @param data level, seats per session and trials, as the record and the opened draw give them
 * @returns the result in the form that goes on the record
 * @throws RangeError when the level is no decimal between 0 and 1, or trials or listeners come twice
 * @example for one listener with 12 of 16 right, alpha "0.05": p 2517/65536 = 0.0384, significant
 *   ; R: binom.test(12, 16, alternative = "greater")
 * @see binomialTest and sharedPresentationTest for the tests and their sources
 */
export function analyseAbx({ alpha, listenersPerSession, trials }: AbxData): AbxResult {
  const level = parseDecimal(alpha);
  requireBetween('alpha', fractionToNumber(level), 0, 1, 'open');
  requireWhole('listenersPerSession', listenersPerSession, 1, 1000);
  requireDistinct(trials);

  const shared = sharedPresentationTest(sharedTrialsOf(trials), 'greater');
  const isOwnDraws = hasOwnDraws(trials);
  const test = isOwnDraws ? binomialOf(shared, level) : sharedOf(shared);
  const byListener = listenerResults(trials, level);

  return {
    method: 'abx',
    randomisation: 'independent fair draw per trial',
    stopping: 'fixed number of trials',
    missingAnswers: 'counted as wrong',
    alternative: 'greater',
    test: test.name,
    chance: evenChance,
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
    estimates: isOwnDraws && shared.answers > 0 ? pooledEstimatesOf(shared, alpha) : null,
  };
}

interface Test {
  readonly name: AbxResult['test'];
  readonly p: Fraction;
  readonly coins: number;
  readonly least: Fraction;
  readonly critical: AbxResult['critical'];
}

function binomialOf({ matching, answers }: SharedPresentationTest, level: Fraction): Test {
  const critical = answers === 0 ? null : criticalCount(answers, evenChance, fractionToNumber(level));
  return {
    name: 'exact-binomial',
    p: reduceFraction(exactBinomialUpperTail(matching, answers, evenChance)),
    coins: answers,
    least: { numerator: 1n, denominator: 2n ** BigInt(answers) },
    critical: critical && { count: critical.count, attainedSize: recordDecimal(critical.attainedSize) },
  };
}

function sharedOf({ pFraction, coins, leastAttainable }: SharedPresentationTest): Test {
  return { name: 'shared-presentations', p: pFraction, coins, least: leastAttainable, critical: null };
}
