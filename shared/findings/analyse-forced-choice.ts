import { type BetaPrior, bayesFactor, middlePrior, uniformPrior } from '../statistics/bayes-factor.ts';
import type { Chance } from '../statistics/chance.ts';
import { criticalCount } from '../statistics/critical-count.ts';
import { parseDecimal } from '../statistics/decimal.ts';
import { requireBetween, requireWhole } from '../statistics/domain.ts';
import { exactBinomialUpperTail } from '../statistics/exact-binomial.ts';
import { compareFractions, type Fraction, fractionToNumber, reduceFraction } from '../statistics/fraction.ts';
import { marginConfidence, similarityPlan } from '../statistics/planned-margin.ts';
import { sharedEvidence } from '../statistics/shared-evidence.ts';
import {
  type SharedPresentationTest,
  type SharedTrial,
  sharedPresentationTest,
} from '../statistics/shared-presentation-test.ts';
import { amongListenersOf } from './among-listeners.ts';
import { chanceOf, type ForcedChoice } from './forced-choice.ts';
import type { ForcedChoiceResult, RateEstimates } from './forced-choice-result.ts';
import { type ForcedChoiceTrial, sharedTrialsOf } from './forced-choice-trials.ts';
import { listenerResults } from './listener-results.ts';
import { hasOwnDraws, requireDistinct } from './own-draws.ts';
import { peopleEstimatesOf } from './people-estimates.ts';
import { rateEstimates } from './rate-estimates.ts';
import { type DueAnswer, ownDrawLimits, panelLimits } from './rate-limits.ts';
import { recordDecimal, recordDecimalOfFraction } from './record-decimal.ts';
import { suspectTail } from './result-frame.ts';
import { coursesOf, sessionChecks } from './session-checks.ts';

export interface ForcedChoiceData {
  /** The registered one-sided level as a decimal, strictly between 0 and 1: "0.05". */
  readonly alpha: string;
  /** Seats per session in the protocol, whole, at least 1. */
  readonly listenersPerSession: number;
  /** All locked trials of all sessions, abandoned ones included. */
  readonly trials: readonly ForcedChoiceTrial[];
  /** Of what the first cable was to have more, where the method asks for it. */
  readonly attribute?: string | undefined;
  /** The share above guessing that the protocol registers as margin, as a decimal strictly between 0 and 1: "0.2". */
  readonly margin?: string | undefined;
  /** Whom the protocol says the listeners are drawn from. */
  readonly samplingFrame?: string | undefined;
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
  { alpha, listenersPerSession, trials, attribute, margin, samplingFrame }: ForcedChoiceData,
): ForcedChoiceResult {
  const chance = chanceOf(question);
  const level = parseDecimal(alpha);
  requireBetween('alpha', fractionToNumber(level), 0, 1, 'open');
  requireWhole('listenersPerSession', listenersPerSession, 1, 1000);
  requireDistinct(trials);

  const counted = sharedTrialsOf(trials, question.labels);
  const shared = sharedPresentationTest(counted, 'greater');
  const isOwnDraws = hasOwnDraws(trials);
  const test = isOwnDraws ? binomialOf(shared, level, chance) : sharedOf(shared);
  const byListener = listenerResults(trials, level, chance);
  const due = dueAnswers(trials);
  const estimates = estimatesOf(question, alpha, shared, isOwnDraws ? null : due);

  return {
    method: question.method,
    randomisation: 'independent fair draw per trial',
    stopping: 'fixed number of trials',
    missingAnswers: margin === undefined ? 'counted as wrong' : 'counted as wrong, as right against the margin',
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
    estimates,
    people: samplingFrame === undefined ? null : peopleEstimatesOf(byListener, due, isOwnDraws, chance, samplingFrame),
    ...(margin === undefined ? {} : { margin: marginOf(margin, shared, estimates, chance) }),
    guessingFactor: shared.answers === 0 ? null : guessingFactorOf(counted, shared, isOwnDraws, chance),
    amongListeners: isOwnDraws ? amongListenersOf(byListener, chance, fractionToNumber(level)) : null,
    checks: sessionChecks(coursesOf(trials), question.labels),
  };
}

/** Every answer that was due, in order, as limits over clusters read them. */
function dueAnswers(trials: readonly ForcedChoiceTrial[]): DueAnswer[] {
  return trials.flatMap(({ session, trial, right, answers }) =>
    answers.map(({ listener, choice }) => ({
      listener,
      trial: `${session}/${trial}`,
      counts: choice === null ? null : choice === right,
    })),
  );
}

function estimatesOf(
  question: ForcedChoice,
  alpha: string,
  { matching, missing, answers }: SharedPresentationTest,
  /** The answers of a group; null where every answer has a draw of its own. */
  due: readonly DueAnswer[] | null,
): RateEstimates | null {
  if (answers === 0) return null;
  const limits = due === null ? ownDrawLimits({ counted: matching, missing, due: answers }) : panelLimits(due);
  if (limits === null) return null;
  return {
    basis: due === null ? 'own draws' : 'trials',
    ...rateEstimates(matching / answers, limits, alpha, question),
  };
}

/** With own draws the exact test decides, in whole numbers; in a group the limit over trials does. */
function marginOf(
  margin: string,
  { matching, missing, answers }: SharedPresentationTest,
  estimates: RateEstimates | null,
  chance: Chance,
): ForcedChoiceResult['margin'] {
  const share = fractionToNumber(parseDecimal(margin));
  requireBetween('margin', share, 0, 1, 'open');
  const isBelow =
    estimates !== null &&
    (estimates.basis === 'own draws'
      ? matching + missing <= (similarityPlan(chance).critical(answers, share)?.count ?? -1)
      : Number(estimates.aboveGuessing.oneSidedUpper.limit) < share);
  return { share: recordDecimal(share), confidence: recordDecimal(marginConfidence), isBelow };
}

/** Missing answers count as right: silence must not speak for guessing. */
function guessingFactorOf(
  counted: readonly SharedTrial[],
  { matching, missing, answers }: SharedPresentationTest,
  isOwnDraws: boolean,
  chance: ReturnType<typeof chanceOf>,
): ForcedChoiceResult['guessingFactor'] {
  const factor = (log: number) => recordDecimal(Math.exp(-log));
  if (!isOwnDraws) return { uniform: factor(sharedEvidence(counted, chance.denominator)), middle: null };
  const by = (prior: BetaPrior) => factor(bayesFactor(matching + missing, answers, chance, prior).logFactorAbove);
  return { uniform: by(uniformPrior), middle: by(middlePrior) };
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
