import { binomialCoefficient } from './binomial-coefficient.ts';
import { requireWhole } from './domain.ts';
import { fractionToNumber } from './fraction.ts';

export interface RunsTest {
  /** Chance of at most this many runs: small when right and wrong answers cluster. */
  readonly pFew: number;
  /** Chance of at least this many: small when they alternate. */
  readonly pMany: number;
  /** Twice the smaller, at most 1. */
  readonly pTwoSided: number;
  readonly mean: number;
  readonly variance: number;
}

/**
 * How often right and wrong answers in random order would fall into so few, or so many, unbroken runs.
 *
 * A check of the session, for fatigue, learning or a fault; never a claim.
 *
 * @param right right answers, whole, 0 ... 5000
 * @param wrong wrong answers, whole, 0 ... 5000; at least one answer in all
 * @param runs  unbroken runs seen, whole, 1 ... as many as the counts allow
 * @returns exact tails, mean and variance, counted in whole numbers
 * @throws RangeError when an argument is outside its domain
 * @example runsTest(8, 8, 4).pFew // 57/6435 = 0.0089 ; every arrangement counted
 * @see Wald & Wolfowitz, "On a test whether two samples are from the same population", Annals of Mathematical Statistics
 *   11 (1940), 147-162
 */
export function runsTest(right: number, wrong: number, runs: number): RunsTest {
  requireWhole('right', right, 0, 5000);
  requireWhole('wrong', wrong, 0, 5000);
  const all = right + wrong;
  requireWhole('answers', all, 1, 10_000);
  const fewest = right === 0 || wrong === 0 ? 1 : 2;
  const most = 2 * Math.min(right, wrong) + (right === wrong ? 0 : 1);
  requireWhole('runs', runs, fewest, most);
  const ofRight = pieces(right);
  const ofWrong = pieces(wrong);
  const share = (from: number, to: number) => {
    let numerator = 0n;
    for (let count = from; count <= to; count++) numerator += arrangements(ofRight, ofWrong, count);
    return fractionToNumber({ numerator, denominator: binomialCoefficient(all, right) });
  };
  const pFew = share(fewest, runs);
  const pMany = share(runs, most);
  const product = 2 * right * wrong;
  return {
    pFew,
    pMany,
    pTwoSided: Math.min(1, 2 * Math.min(pFew, pMany)),
    mean: 1 + product / all,
    variance: all === 1 ? 0 : (product * (product - all)) / (all * all * (all - 1)),
  };
}

/** In how many ways so many answers of a kind fall into 0, 1, 2 ... unbroken parts, none of them empty. */
function pieces(answers: number): bigint[] {
  if (answers === 0) return [1n];
  const ways = [0n, 1n];
  for (let parts = 2; parts <= answers; parts++)
    ways.push(((ways[parts - 1] ?? 0n) * BigInt(answers - parts + 1)) / BigInt(parts - 1));
  return ways;
}

/** In how many orders the answers fall into exactly so many runs: the kinds take turns, and either may begin. */
function arrangements(ofRight: readonly bigint[], ofWrong: readonly bigint[], runs: number): bigint {
  const both = (right: number, wrong: number) => (ofRight[right] ?? 0n) * (ofWrong[wrong] ?? 0n);
  const half = Math.floor(runs / 2);
  if (runs % 2 === 0) return 2n * both(half, half);
  return both(half + 1, half) + both(half, half + 1);
}
