import { assignmentTest } from '../statistics/assignment-test.ts';
import { parseDecimal } from '../statistics/decimal.ts';
import { requireBetween, requireWhole } from '../statistics/domain.ts';
import { compareFractions, type Fraction, fractionToNumber } from '../statistics/fraction.ts';
import { holm } from '../statistics/holm.ts';
import { sameDifferentLimits, sameDifferentSensitivity } from '../statistics/same-different.ts';
import { recordInterval } from './interval-with-missing.ts';
import { hasOwnDraws, requireDistinct } from './own-draws.ts';
import { ownDrawLimits, panelLimits, type RateLimits } from './rate-limits.ts';
import { recordDecimal, recordDecimalOfFraction, recordLimit } from './record-decimal.ts';
import { suspectTail } from './result-frame.ts';
import type { SameDifferentListener, SameDifferentResult } from './same-different-result.ts';
import { type AnswersOn, answersOn, assignedTrials, type SameDifferentTrial } from './same-different-trials.ts';
import { coursesOf, type SessionCheck, sessionChecks } from './session-checks.ts';

export interface SameDifferentData {
  /** The registered one-sided level as a decimal, strictly between 0 and 1: "0.05". */
  readonly alpha: string;
  /** Seats per session in the protocol, whole, at least 1. */
  readonly listenersPerSession: number;
  /** All locked trials of all sessions, abandoned ones included. */
  readonly trials: readonly SameDifferentTrial[];
}

const confidence = 0.95;

/**
 * The registered analysis of same-different: was "different" said on different trials more often than the draw explains?
 *
 * The statistic is the number of hits, answers "different" on different trials. It is compared with all assignments that
 * have as many different trials, answers held fixed and whole trials moved: for one listener that is Fisher's exact test.
 * Without different trials, or without same ones, p is 1. A missing answer counts as wrong on either kind of trial; the
 * lower tail leaves it out. Rates, limits and d′ are given where every answer has a draw of its own.
 *
 * @param data level, seats per session and trials, as the record and the opened draw give them
 * @returns the result in the form that goes on the record
 * @throws RangeError when the level is no decimal between 0 and 1, or trials or listeners come twice
 * @example for one listener with 7 hits in 8 different and 2 false alarms in 8 same trials: p 29/1430 = 0.0203
 *   ; R: fisher.test(matrix(c(7, 1, 2, 6), 2), alternative = "greater")$p.value
 * @see assignmentTest and sameDifferentSensitivity for the sources; ASTM E2139, Same-Different Test (from memory)
 */
export function analyseSameDifferent({ alpha, listenersPerSession, trials }: SameDifferentData): SameDifferentResult {
  const level = parseDecimal(alpha);
  requireBetween('alpha', fractionToNumber(level), 0, 1, 'open');
  requireWhole('listenersPerSession', listenersPerSession, 1, 1000);
  requireDistinct(trials);

  const assigned = assignedTrials(trials, 'counted as wrong');
  const test = assignmentTest(assigned);
  const { lowerTail } = assignmentTest(assignedTrials(trials, 'left out'));
  const isOwnDraws = hasOwnDraws(trials);
  const [onDifferent, onSame] = [answersOn(trials, true), answersOn(trials, false)];
  const byListener = listenersOf(trials, level);
  const differentTrials = trials.filter(({ isDifferent }) => isDifferent).length;

  return {
    method: 'same-different',
    randomisation: 'independent fair draw per trial',
    stopping: 'fixed number of trials',
    missingAnswers: 'counted as wrong',
    alternative: 'greater',
    test: 'fixed-different-trials',
    alpha,
    listenersPerSession,
    sessions: new Set(trials.map(({ session }) => session)).size,
    trials: trials.length,
    listeners: byListener.length,
    answers: onDifferent.answers + onSame.answers,
    missing: onDifferent.missing + onSame.missing,
    differentTrials,
    onDifferent,
    onSame,
    p: {
      numerator: test.upperTail.numerator.toString(),
      denominator: test.upperTail.denominator.toString(),
      value: recordDecimalOfFraction(test.upperTail),
    },
    isSignificant: compareFractions(test.upperTail, level) <= 0,
    lowerTail: recordDecimalOfFraction(lowerTail),
    isBelowGuessing: compareFractions(lowerTail, suspectTail) <= 0,
    coins: test.ways.length > 1 ? trials.length : 0,
    leastAttainableP: recordDecimalOfFraction(test.leastAttainable),
    canReachAlpha: compareFractions(test.leastAttainable, level) <= 0,
    critical: isOwnDraws ? criticalOf(test, level) : null,
    byListener,
    estimates: estimatesOf(trials, isOwnDraws),
    checks: checksOf(trials),
  };
}

/** The fewest hits that reach the level with these answers, or null when none would. */
function criticalOf(
  { ways, assignments }: ReturnType<typeof assignmentTest>,
  level: Fraction,
): SameDifferentResult['critical'] {
  let tail = 0n;
  let found: SameDifferentResult['critical'] = null;
  for (const { hits, count } of ways.toReversed()) {
    tail += count;
    const size = { numerator: tail, denominator: assignments };
    if (compareFractions(size, level) > 0) break;
    found = { count: hits, attainedSize: recordDecimalOfFraction(size) };
  }
  return found;
}

/** False alarms count missing answers in; their upper limit is the one that stands against a claim. */
function rateInterval({ different, missing, answers }: AnswersOn) {
  if (answers === 0) return null;
  return recordInterval(ownDrawLimits({ counted: different, missing, due: answers }).interval(confidence));
}

/** Limits of the rate of "different" on trials of one kind: exact for own draws, over trials in a group. */
function limitsOn(trials: readonly SameDifferentTrial[], isDifferent: boolean, isOwnDraws: boolean): RateLimits | null {
  const { different, missing, answers } = answersOn(trials, isDifferent);
  if (answers === 0) return null;
  if (isOwnDraws) return ownDrawLimits({ counted: different, missing, due: answers });
  return panelLimits(
    trials
      .filter((trial) => trial.isDifferent === isDifferent)
      .flatMap(({ session, trial, answers: given }) =>
        given.map(({ listener, choice }) => ({
          listener,
          trial: `${session}/${trial}`,
          counts: choice === null ? null : choice === 'different',
        })),
      ),
  );
}

function estimatesOf(trials: readonly SameDifferentTrial[], isOwnDraws: boolean): SameDifferentResult['estimates'] {
  const hits = limitsOn(trials, true, isOwnDraws);
  const falseAlarms = limitsOn(trials, false, isOwnDraws);
  if (hits === null || falseAlarms === null) return null;
  const [onDifferent, onSame] = [answersOn(trials, true), answersOn(trials, false)];
  const falseAlarmCount = onSame.different + onSame.missing;
  const { dPrime, criterion } = sameDifferentSensitivity(
    { count: onDifferent.different, trials: onDifferent.answers },
    { count: falseAlarmCount, trials: onSame.answers },
  );
  const { lower, upper } = sameDifferentLimits({ hits: hits.interval, falseAlarms: falseAlarms.interval }, confidence);
  return {
    basis: isOwnDraws ? 'own draws' : 'trials',
    hitRate: recordDecimal(onDifferent.different / onDifferent.answers),
    hitInterval: recordInterval(hits.interval(confidence)),
    falseAlarmRate: recordDecimal(falseAlarmCount / onSame.answers),
    falseAlarmInterval: recordInterval(falseAlarms.interval(confidence)),
    dPrime: {
      dPrime: recordLimit(dPrime),
      lower: recordLimit(lower),
      upper: recordLimit(upper),
      criterion: recordLimit(criterion),
    },
  };
}

/** What each listener answered, in order; which answer comes more often is the criterion, and no fault. */
function checksOf(trials: readonly SameDifferentTrial[]): SessionCheck[] {
  const courses = coursesOf(
    trials.map(({ isDifferent, ...trial }) => ({ ...trial, right: isDifferent ? 'different' : 'same' })),
  );
  return sessionChecks(courses, ['same', 'different'], ['trend', 'runs']);
}

/** Each listener's own answers, which faced draws of their own; adjusted for all who had an answer due. */
function listenersOf(trials: readonly SameDifferentTrial[], level: Fraction): SameDifferentListener[] {
  const names = [...new Set(trials.flatMap(({ answers }) => answers.map(({ listener }) => listener)))].sort();
  const own = names.map((name) =>
    trials.flatMap((trial) => {
      const answers = trial.answers.filter(({ listener }) => listener === name);
      return answers.length === 0 ? [] : [{ ...trial, answers }];
    }),
  );
  const tails = own.map((of) => fractionToNumber(assignmentTest(assignedTrials(of, 'counted as wrong')).upperTail));
  const adjusted = holm(tails);
  const alpha = fractionToNumber(level);
  return names.map((listener, index) => {
    const [onDifferent, onSame] = [answersOn(own[index] ?? [], true), answersOn(own[index] ?? [], false)];
    return {
      listener,
      answers: onDifferent.answers + onSame.answers,
      missing: onDifferent.missing + onSame.missing,
      onDifferent,
      onSame,
      p: recordDecimal(tails[index] ?? 1),
      holmP: recordDecimal(adjusted[index] ?? 1),
      isAboveGuessing: (adjusted[index] ?? 1) <= alpha,
      hitInterval: rateInterval(onDifferent),
      falseAlarmInterval: rateInterval(onSame),
    };
  });
}
