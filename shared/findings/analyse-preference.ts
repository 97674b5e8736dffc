import { evenChance } from '../statistics/chance.ts';
import { parseDecimal } from '../statistics/decimal.ts';
import { requireBetween, requireWhole } from '../statistics/domain.ts';
import { compareFractions, type Fraction, fractionToNumber } from '../statistics/fraction.ts';
import { equivalencePlan, marginConfidence } from '../statistics/planned-margin.ts';
import { sharedPresentationTest } from '../statistics/shared-presentation-test.ts';
import { exactTwoSidedEven, twoSidedCriticalCount } from '../statistics/two-sided-even.ts';
import { favoured, listenerPreferences, shareInterval } from './listener-preferences.ts';
import { hasOwnDraws, requireDistinct } from './own-draws.ts';
import type { ListenerPreference, PreferenceResult } from './preference-result.ts';
import { type PreferenceTrial, preferenceSharedTrials, preferredCable } from './preference-trials.ts';
import { panelLimits } from './rate-limits.ts';
import { recordDecimal, recordDecimalOfFraction } from './record-decimal.ts';
import { type AnswerCourse, coursesOf, sessionChecks } from './session-checks.ts';

export interface PreferenceData {
  /** The registered two-sided level as a decimal, strictly between 0 and 1: "0.05". */
  readonly alpha: string;
  /** Seats per session in the protocol, whole, at least 1. */
  readonly listenersPerSession: number;
  /** Whether "no preference" was among the answers. */
  readonly offersNoPreference: boolean;
  /** The margin about one half that the protocol registers, as a decimal strictly between 0 and 1/2: "0.2". */
  readonly margin?: string | undefined;
  /** All locked trials of all sessions, abandoned ones included. */
  readonly trials: readonly PreferenceTrial[];
}

/**
 * The registered analysis of a paired preference: did the answers favour one cable more than the draw explains?
 *
 * The test runs over the answers that preferred one. Those without a preference and missing ones are left out and
 * stated: they are in no count, and the draw of a trial without any other answer is no coin. The draws of what came first
 * give the count for the protocol's first cable its distribution, answers held fixed; p is the chance of a count as
 * far from its mean on either side. With one answer per trial this is the exact two-sided binomial test.
 *
 * @param data level, seats per session and trials, as the record and the opened draw give them
 * @returns the result in the form that goes on the record
 * @throws RangeError when the level is no decimal between 0 and 1, or trials or listeners come twice
 * @example for one listener who preferred the first cable 12 times and the second 3 times: p 9/256 = 0.0352
 *   ; R: binom.test(12, 15)$p.value
 * @see sharedPresentationTest and exactTwoSidedEven for the tests and their sources; ISO 5495, Sensory analysis - Paired
 *   comparison test, for the two-sided test; Christensen, Lee & Brockhoff, Food Quality and Preference 24 (2012),
 *   119-128, on answers without a preference
 */
export function analysePreference(data: PreferenceData): PreferenceResult {
  const { alpha, listenersPerSession, offersNoPreference, margin, trials } = data;
  const level = parseDecimal(alpha);
  const alphaNumber = fractionToNumber(level);
  requireBetween('alpha', alphaNumber, 0, 1, 'open');
  requireWhole('listenersPerSession', listenersPerSession, 1, 1000);
  requireDistinct(trials);
  const given = trials.flatMap(({ answers }) => answers);
  const undecided = given.filter(({ choice }) => choice === 'none').length;
  if (undecided > 0 && !offersNoPreference) throw new RangeError('"no preference" was not among the answers');

  const test = sharedPresentationTest(preferenceSharedTrials(trials), 'two-sided');
  const decided = test.answers;
  const preferred: [number, number] = [test.matching, decided - test.matching];
  const isOwnDraws = hasOwnDraws(trials);
  const critical = isOwnDraws && decided > 0 ? twoSidedCriticalCount(decided, alphaNumber) : null;
  const isSignificant = compareFractions(test.pFraction, level) <= 0;
  const byListener = listenerPreferences(trials, level);
  const majorities = majoritiesOf(byListener, isSignificant ? favoured(preferred) : null, level);

  return {
    method: 'paired-preference',
    randomisation: 'independent fair draw per trial',
    stopping: 'fixed number of trials',
    missingAnswers: 'left out',
    alternative: 'two-sided',
    noPreference: offersNoPreference ? 'offered, left out of the test' : 'not offered',
    test: isOwnDraws ? 'exact-binomial' : 'shared-presentations',
    chance: evenChance,
    alpha,
    listenersPerSession,
    sessions: new Set(trials.map(({ session }) => session)).size,
    trials: trials.length,
    listeners: byListener.length,
    answers: given.length,
    missing: given.filter(({ choice }) => choice === null).length,
    undecided,
    decided,
    preferred,
    favours: favoured(preferred),
    heardFirst: given.filter(({ choice }) => choice === 'first').length,
    p: {
      numerator: test.pFraction.numerator.toString(),
      denominator: test.pFraction.denominator.toString(),
      value: recordDecimalOfFraction(test.pFraction),
    },
    isSignificant,
    coins: test.coins,
    leastAttainableP: recordDecimalOfFraction(test.leastAttainable),
    canReachAlpha: compareFractions(test.leastAttainable, level) <= 0,
    critical: critical && { count: critical.count, attainedSize: recordDecimal(critical.attainedSize) },
    byListener,
    majorities,
    estimates: estimatesOf(trials, preferred, isOwnDraws, alphaNumber),
    ...(margin === undefined ? {} : { margin: marginOf(margin, majorities) }),
    checks: sessionChecks(placesOf(trials), ['first', 'second'], ['habit']),
  };
}

function estimatesOf(
  trials: readonly PreferenceTrial[],
  preferred: readonly [number, number],
  isOwnDraws: boolean,
  alpha: number,
): PreferenceResult['estimates'] {
  const decided = preferred[0] + preferred[1];
  const interval = isOwnDraws ? shareInterval(preferred, alpha) : panelInterval(trials, 1 - alpha);
  if (interval === null) return null;
  return { basis: isOwnDraws ? 'own draws' : 'trials', share: recordDecimal(preferred[0] / decided), interval };
}

/** Trials are counted, for the panel heard the same; answers without a preference are left out as in the test. */
function panelInterval(trials: readonly PreferenceTrial[], confidence: number): ListenerPreference['interval'] {
  const limits = panelLimits(
    trials.flatMap(({ session, trial, truth, answers }) =>
      answers.flatMap(({ listener, choice }) => {
        const cable = preferredCable(truth, choice);
        return cable === null ? [] : [{ listener, trial: `${session}/${trial}`, counts: cable === 0 }];
      }),
    ),
  );
  if (limits === null) return null;
  const { lower, upper } = limits.interval(confidence);
  return { confidence: recordDecimal(confidence), lower: recordDecimal(lower), upper: recordDecimal(upper) };
}

/** People are counted, each by their own majority; those who are evenly split are left out, as in the sign test. */
function marginOf(margin: string, { preferred }: PreferenceResult['majorities']): PreferenceResult['margin'] {
  const share = fractionToNumber(parseDecimal(margin));
  requireBetween('margin', share, 0, 0.5, 'open');
  const people = preferred[0] + preferred[1];
  const most = people === 0 ? null : equivalencePlan.critical(people, share);
  const isWithin = most !== null && Math.max(...preferred) <= most.count;
  return { share: recordDecimal(share), confidence: recordDecimal(marginConfidence), isWithin };
}

/** Which place each listener preferred, in order. Nothing is right here; only the habit is asked. */
function placesOf(trials: readonly PreferenceTrial[]): AnswerCourse[] {
  return coursesOf(
    trials.map(({ truth, answers, ...trial }) => ({
      ...trial,
      right: truth,
      answers: answers.map(({ listener, choice }) => ({ listener, choice: choice === 'none' ? null : choice })),
    })),
  );
}

/**
 * Listeners by the cable that most of their own answers preferred. Repeated answers are not people: people who are split
 * half and half, each of them consistent, give a small p over answers. That more people prefer a cable may be said only
 * where both the registered test and the sign test over people reach the level, on the same side.
 */
function majoritiesOf(
  byListener: readonly ListenerPreference[],
  found: 0 | 1 | null,
  level: Fraction,
): PreferenceResult['majorities'] {
  const sides = byListener.map(({ preferred }) => favoured(preferred));
  const of = (side: 0 | 1) => sides.filter((own) => own === side).length;
  const preferred: [number, number] = [of(0), of(1)];
  const p = exactTwoSidedEven(preferred[0], preferred[0] + preferred[1]);
  return {
    preferred,
    even: sides.length - preferred[0] - preferred[1],
    p: recordDecimalOfFraction(p),
    holdsForPeople: found !== null && favoured(preferred) === found && compareFractions(p, level) <= 0,
  };
}
