import { logPoint } from './binomial-log-probability.ts';
import { chiSquareUpperTail } from './chi-square-tail.ts';
import { type ListenerScore, pooledScore } from './listener-scores.ts';

export interface BetaBinomialFit {
  /** Mean rate of right answers over listeners. */
  readonly rate: number;
  /** How much two answers of one listener resemble each other: 0 for a common rate, 1 for all right or all wrong. */
  readonly correlation: number;
  /** Natural logarithm of the likelihood there, and with a common rate. */
  readonly logLikelihood: number;
  readonly logLikelihoodCommon: number;
  /** Twice their difference. */
  readonly statistic: number;
  /** Half the chi-square tail on one degree, because the correlation cannot be negative; 1 where it is 0. */
  readonly p: number;
}

/** The spread at which the rate of listeners is searched: 0, then from nearly none to nearly all-or-none. */
const correlations = Array.from({ length: 121 }, (_, index) => (index / 120) ** 2 * 0.9999);

/**
 * Listeners whose rates scatter like a beta distribution, fitted by maximum likelihood, and whether a common rate would do.
 *
 * For each correlation the best rate is the root of a falling score. Over the correlations, which may have several
 * maxima, the slope is followed on a grid and halved to its root wherever it turns; the best is kept. For listeners with
 * draws of their own. From fewer than six nothing follows when the test finds nothing.
 *
 * @param scores one for each listener, at least two
 * @returns both parameters, likelihoods and the likelihood-ratio test of correlation 0
 * @throws RangeError when an argument is outside its domain
 * @example betaBinomialFit([8, 9, 14, 7, 10, 16, 8, 9, 12, 8].map((successes) => ({ successes, trials: 16 })))
 *   // rate 0.6366, correlation 0.0969, p 0.0131
 * @see Skellam, J. Royal Statistical Society B 10 (1948), 257-261; Self & Liang, JASA 82 (1987), 605-610, for the half
 */
export function betaBinomialFit(scores: readonly ListenerScore[]): BetaBinomialFit {
  const { rate: pooled } = pooledScore(scores, 2);
  const logLikelihoodCommon = scores.reduce((sum, score) => sum + logBinomial(score, pooled), 0);
  const common = { rate: pooled, correlation: 0, logLikelihood: logLikelihoodCommon };
  const isSettled = pooled === 0 || pooled === 1;
  const best = isSettled
    ? common
    : [...turningPoints(talliesOf(scores)), ...allOrNone(scores)].reduce(
        (found, candidate) => (candidate.logLikelihood > found.logLikelihood ? candidate : found),
        common,
      );
  const statistic = 2 * (best.logLikelihood - logLikelihoodCommon);
  const p = statistic > 0 ? 0.5 * chiSquareUpperTail(statistic, 1) : 1;
  return { ...best, logLikelihoodCommon, statistic, p };
}

interface Candidate {
  readonly rate: number;
  readonly correlation: number;
  readonly logLikelihood: number;
}

/**
 * How many listeners have more than 0, 1, 2 ... right answers, wrong ones, trials: answer i of a listener has odds
 * rate + i theta after i like it, so listeners with as many share a term.
 */
interface Tallies {
  readonly right: readonly number[];
  readonly wrong: readonly number[];
  readonly trials: readonly number[];
  /** Logarithm of the number of orders in which the counts can come about. */
  readonly logOrders: number;
}

function talliesOf(scores: readonly ListenerScore[]): Tallies {
  return {
    right: exceeding(scores.map(({ successes }) => successes)),
    wrong: exceeding(scores.map(({ successes, trials }) => trials - successes)),
    trials: exceeding(scores.map(({ trials }) => trials)),
    logOrders: scores.reduce(
      (sum, { successes, trials }) => sum + logPoint(successes, trials, 0.5, 0.5) + trials * Math.LN2,
      0,
    ),
  };
}

function exceeding(counts: readonly number[]): number[] {
  const tally = new Array<number>(Math.max(...counts)).fill(0);
  for (const count of counts) if (count > 0) tally[count - 1] = (tally[count - 1] ?? 0) + 1;
  for (let index = tally.length - 2; index >= 0; index--) tally[index] = (tally[index] ?? 0) + (tally[index + 1] ?? 0);
  return tally;
}

function turningPoints(tallies: Tallies): Candidate[] {
  const slope = (correlation: number) => {
    const theta = correlation / (1 - correlation);
    return slopeInTheta(tallies, bestRate(tallies, theta), theta);
  };
  const slopes = correlations.map(slope);
  return correlations.flatMap((low, index) => {
    const high = correlations[index + 1];
    if (high === undefined || !((slopes[index] ?? 0) > 0 && (slopes[index + 1] ?? 0) <= 0)) return [];
    const correlation = halve(low, high, (middle) => slope(middle) > 0);
    const theta = correlation / (1 - correlation);
    const rate = bestRate(tallies, theta);
    return [{ rate, correlation, logLikelihood: logLikelihoodAt(tallies, rate, theta) }];
  });
}

/** Every listener all right or all wrong: the likelihood rises up to correlation 1, where it is that of single answers. */
function allOrNone(scores: readonly ListenerScore[]): Candidate[] {
  if (scores.some(({ successes, trials }) => successes !== 0 && successes !== trials)) return [];
  if (scores.every(({ trials }) => trials === 1)) return [];
  const right = scores.filter(({ successes }) => successes > 0).length;
  const rate = right / scores.length;
  const logLikelihood = right * Math.log(rate) + (scores.length - right) * Math.log1p(-rate);
  return [{ rate, correlation: 1, logLikelihood }];
}

/** theta = correlation / (1 - correlation). */
function logLikelihoodAt({ right, wrong, trials, logOrders }: Tallies, rate: number, theta: number): number {
  const rights = weigh(right, (i) => Math.log(rate + i * theta));
  const wrongs = weigh(wrong, (i) => Math.log(1 - rate + i * theta));
  return logOrders + rights + wrongs - weigh(trials, (i) => Math.log1p(i * theta));
}

function slopeInTheta({ right, wrong, trials }: Tallies, rate: number, theta: number): number {
  const rights = weigh(right, (i) => i / (rate + i * theta));
  const wrongs = weigh(wrong, (i) => i / (1 - rate + i * theta));
  return rights + wrongs - weigh(trials, (i) => i / (1 + i * theta));
}

function bestRate({ right, wrong }: Tallies, theta: number): number {
  const slope = (rate: number) =>
    weigh(right, (i) => 1 / (rate + i * theta)) - weigh(wrong, (i) => 1 / (1 - rate + i * theta));
  return halve(0, 1, (middle) => slope(middle) > 0);
}

function halve(from: number, to: number, isBelow: (middle: number) => boolean): number {
  let low = from;
  let high = to;
  for (let step = 0; step < 60; step++) {
    const middle = low + (high - low) / 2;
    if (middle <= low || middle >= high) break;
    if (isBelow(middle)) low = middle;
    else high = middle;
  }
  return low + (high - low) / 2;
}

function weigh(tally: readonly number[], term: (index: number) => number): number {
  let sum = 0;
  for (let index = 0; index < tally.length; index++) sum += (tally[index] ?? 0) * term(index);
  return sum;
}

function logBinomial({ successes, trials }: ListenerScore, rate: number): number {
  if (rate === 0 || rate === 1) return 0;
  return logPoint(successes, trials, rate, 1 - rate);
}
