import { mostTrials } from './binomial-log-probability.ts';
import { evenChance } from './chance.ts';
import type { Interval } from './clopper-pearson.ts';
import { requireBetween, requireWhole } from './domain.ts';
import { normalQuantile } from './normal-quantile.ts';
import { normalUpperTail } from './normal-tail.ts';
import type { PlannedTest } from './planned-test.ts';

// Same-different: hits and false alarms, never a percentage of right answers.

export interface Sensitivity {
  /** 0 where hits are no more frequent than false alarms; Infinity where one of the rates leaves no upper end. */
  readonly dPrime: number;
  /** How far apart two percepts must lie to be called different, in standard deviations; the bias. */
  readonly criterion: number;
}

/** Answers "different" out of those due on trials of one kind. */
export type Rated = { readonly count: number; readonly trials: number };

const largestDPrime = 64;

/**
 * d′ and criterion τ behind hits and false alarms, if percepts are compared by their distance: "different" where
 * |x - y| > τ.
 *
 * "Same" is said to same pairs at 2Φ(τ/√2) - 1 and to different ones at Φ((τ - d′)/√2) - Φ((-τ - d′)/√2). The first gives
 * τ in closed form, the second then d′: the maximum-likelihood estimates. Where hits are no more frequent than false alarms
 * d′ is 0 and τ comes from all answers together.
 *
 * @param hits        answers "different" on different trials, of at least 1
 * @param falseAlarms answers "different" on same trials, of at least 1
 * @returns d′ and τ; τ is Infinity without any answer "different"
 * @throws RangeError when a count exceeds its trials or is negative
 * @example sameDifferentSensitivity({ count: 11, trials: 20 }, { count: 5, trials: 20 }) // d′ 1.7758, τ 1.6268
 * @see Christensen & Brockhoff, "Estimation and inference in the same-different test", Food Quality and Preference 20
 *   (2009), 514-520; Macmillan & Creelman, Detection Theory, 2nd ed. (2005), ch. 9
 */
export function sameDifferentSensitivity(hits: Rated, falseAlarms: Rated): Sensitivity {
  for (const { count, trials } of [hits, falseAlarms]) {
    requireWhole('trials', trials, 1, mostTrials);
    requireWhole('answers "different"', count, 0, trials);
  }
  const hitRate = hits.count / hits.trials;
  const falseAlarmRate = falseAlarms.count / falseAlarms.trials;
  if (hitRate <= falseAlarmRate)
    return { dPrime: 0, criterion: criterionOf((hits.count + falseAlarms.count) / (hits.trials + falseAlarms.trials)) };
  return { dPrime: dPrimeOf(hitRate, falseAlarmRate), criterion: criterionOf(falseAlarmRate) };
}

/** τ at which same pairs are called different so often. */
function criterionOf(rate: number): number {
  if (rate === 0) return Number.POSITIVE_INFINITY;
  return rate === 1 ? 0 : -Math.SQRT2 * normalQuantile(rate / 2);
}

/** d′ behind two rates; it rises with the one and falls with the other. */
function dPrimeOf(hitRate: number, falseAlarmRate: number): number {
  if (hitRate <= falseAlarmRate) return 0;
  if (hitRate === 1 || falseAlarmRate === 0) return Number.POSITIVE_INFINITY;
  const criterion = criterionOf(falseAlarmRate);
  const missRate = (dPrime: number) =>
    normalUpperTail((dPrime - criterion) / Math.SQRT2) - normalUpperTail((dPrime + criterion) / Math.SQRT2);
  let low = 0;
  let high = largestDPrime;
  for (;;) {
    const middle = low + (high - low) / 2;
    if (middle <= low || middle >= high) return middle;
    if (missRate(middle) > 1 - hitRate) low = middle;
    else high = middle;
  }
}

/**
 * Limits of d′ from limits of both rates: each rate has half of what may be missed, so that together they hold with the
 * confidence at least. d′ rises with hits and falls with false alarms, so that the corners give its ends.
 *
 * @param limitsOf   limits of one of the rates at a confidence: exact ones where draws are each answer's own
 * @param confidence strictly between 0 and 1, at least
 * @returns limits from 0 to Infinity
 * @throws RangeError when the confidence is outside its domain
 * @example 11 of 20 hits and 5 of 20 false alarms at 0.95: 0 ... 3.69 (rates 0.288 ... 0.793 and 0.073 ... 0.523)
 * @see Bonferroni's inequality for the two rates
 */
export function sameDifferentLimits(
  limitsOf: { readonly hits: (each: number) => Interval; readonly falseAlarms: (each: number) => Interval },
  confidence: number,
): Interval {
  requireBetween('confidence', confidence, 0, 1, 'open');
  const each = (1 + confidence) / 2;
  const hits = limitsOf.hits(each);
  const falseAlarms = limitsOf.falseAlarms(each);
  return { lower: dPrimeOf(hits.lower, falseAlarms.upper), upper: dPrimeOf(hits.upper, falseAlarms.lower) };
}

/** Shares of all outcomes smaller than this are left out of a power: together they lie far below what is shown. */
const negligible = 1e-9;

/**
 * Chance that the test finds a listener, over the coins and the answers: the number of different trials is not fixed
 * beforehand, so that every possible one is taken with its chance, and for each number of false alarms the fewest hits that
 * reach the level.
 *
 * @param trials  answers of one listener, whole, 1 ... 100000
 * @param alpha   one-sided level, strictly between 0 and 1
 * @param hitRate true rate of hits, strictly between 0 and 1; false alarms at 1 - hitRate, so without bias
 * @returns the power, right to 1e-7
 * @example sameDifferentPower(16, 0.05, 0.8) // 0.5994 ; R: sum over dbinom(0:16, 16, 0.5) and both binomials of
 *   phyper(h - 1, m, 16 - m, h + f, lower.tail = FALSE) <= 0.05
 * @see assignmentTest for the test
 */
export function sameDifferentPower(trials: number, alpha: number, hitRate: number): number {
  requireWhole('trials', trials, 1, mostTrials);
  requireBetween('alpha', alpha, 0, 1, 'open');
  requireBetween('hitRate', hitRate, 0, 1, 'open');
  const choose = logsOfBinomials(trials);
  let power = 0;
  for (let different = 1; different < trials; different++) {
    const chance = Math.exp(choose(trials, different) - trials * Math.LN2);
    if (chance > negligible) power += chance * powerGiven(different, trials - different, alpha, hitRate, choose);
  }
  return power;
}

type LogChoose = (n: number, k: number) => number;

/** Logarithms of the binomial coefficients up to n, from a table of log factorials: for planning, right to 1e-11. */
function logsOfBinomials(most: number): LogChoose {
  const logs = [0];
  for (let n = 1; n <= most; n++) logs.push((logs[n - 1] ?? 0) + Math.log(n));
  return (n, k) => (logs[n] ?? 0) - (logs[k] ?? 0) - (logs[n - k] ?? 0);
}

function powerGiven(different: number, same: number, alpha: number, hitRate: number, choose: LogChoose): number {
  const point = (count: number, of: number, rate: number) =>
    Math.exp(choose(of, count) + count * Math.log(rate) + (of - count) * Math.log1p(-rate));
  const atLeast = new Array<number>(different + 2).fill(0);
  for (let hits = different; hits >= 0; hits--)
    atLeast[hits] = (atLeast[hits + 1] ?? 0) + point(hits, different, hitRate);
  let power = 0;
  let needed = 0;
  for (let falseAlarms = 0; falseAlarms <= same; falseAlarms++) {
    // One false alarm more never lowers the number of hits needed. A tie with the level reaches it.
    while (needed <= different && fisherUpperTail(needed, different, falseAlarms, same, choose) > alpha * (1 + 1e-9))
      needed++;
    if (needed > different) break;
    power += point(falseAlarms, same, 1 - hitRate) * (atLeast[needed] ?? 0);
  }
  return power;
}

/** Fisher's exact test, one-sided, in doubles: for planning alone. */
function fisherUpperTail(
  hits: number,
  different: number,
  falseAlarms: number,
  same: number,
  choose: LogChoose,
): number {
  const said = hits + falseAlarms;
  let term = Math.exp(choose(different, hits) + choose(same, falseAlarms) - choose(different + same, said));
  let sum = term;
  for (let k = hits + 1; k <= Math.min(different, said) && term > sum * 1e-16; k++) {
    term *= ((different - k + 1) * (said - k + 1)) / (k * (same - said + k));
    sum += term;
  }
  return sum;
}

/** How far the number of trials is looked for, and for how many more its power is watched. */
const searchedTo = 300;
const watched = 40;

function trialsNeeded(
  alpha: number,
  rate: number,
  targetPower: number,
): { nFirst: number | null; nSafe: number | null } {
  requireBetween('targetPower', targetPower, 0, 1, 'open');
  let first: number | null = null;
  let safe: number | null = null;
  for (let trials = 2; trials <= (safe === null ? searchedTo : Math.min(searchedTo, safe + watched)); trials++) {
    if (sameDifferentPower(trials, alpha, rate) < targetPower) safe = null;
    else {
      first ??= trials;
      safe ??= trials;
    }
  }
  return { nFirst: first, nSafe: safe };
}

/** The test as the planner asks it. No number of hits can be fixed: it depends on how often "different" is said. */
export const sameDifferentPlan: PlannedTest = {
  chance: null,
  labels: null,
  guessing: evenChance,
  rates: [0.6, 0.7, 0.8],
  critical: () => null,
  power: sameDifferentPower,
  leastPDenominator: (trials) => {
    let choices = 1n;
    for (let k = 1; k <= Math.floor(trials / 2); k++) choices = (choices * BigInt(trials - k + 1)) / BigInt(k);
    return choices;
  },
  needed: trialsNeeded,
  searchedTo,
  margin: null,
};
