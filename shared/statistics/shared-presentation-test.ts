import { requireWhole } from './domain.ts';
import { type Fraction, fractionToLog, fractionToNumber, reduceFraction } from './fraction.ts';

/** One trial: every listener present heard the same presentations, so there is one draw, however many answers. */
export interface SharedTrial {
  /** How many answers chose each label, in the order of the labels; zeros where nobody answered. */
  readonly counts: readonly number[];
  /** Which label was right: the draw, as an index into counts. */
  readonly truth: number;
  /** Answers that were due and did not come: wrong whatever is drawn, so in the number of answers and in no count. */
  readonly missing: number;
}

export interface SharedPresentationTest {
  /** Answers that match the draw. */
  readonly matching: number;
  /** Answers that were due, missing ones included. */
  readonly answers: number;
  readonly missing: number;
  /** Chance of a draw that does at least as well for the alternative, the answers held fixed; in lowest terms. */
  readonly pFraction: Fraction;
  readonly p: number;
  readonly logP: number;
  /** Chance of a draw with at most this many matches, whatever the alternative. */
  readonly lowerTail: Fraction;
  /** Mean and variance of the matches over all draws. */
  readonly mean: number;
  readonly variance: number;
  /** Trials whose draw can change the number of matches; evenly split and empty ones cannot. */
  readonly coins: number;
  /** The smallest p that any draw could have given with these answers, in lowest terms. */
  readonly leastAttainable: Fraction;
  readonly leastAttainableP: number;
  /** Every possible number of matches from the smallest to the largest, with its chance over all draws. */
  readonly nullDistribution: readonly { readonly matching: number; readonly probability: number }[];
}

/** 'greater': more matches than the draw explains. 'two-sided': matches as far from their mean, on either side. */
export type SharedAlternative = 'greater' | 'two-sided';

/**
 * How often a fresh draw of what was presented would match the answers as well as the real draw did.
 *
 * Several listeners who hear the same presentation share one coin, so their answers are not independent guesses. Held
 * fixed, they give trial t the count c_t(x) under label x; under the null the matches are the sum of c_t(X_t) with
 * every X_t drawn fairly and independently. That distribution is convolved trial by trial in whole numbers. It holds
 * its level whatever the listeners share: habits, a nudge, a look at the neighbour. It needs a study without feedback.
 * With one answer per trial it is the binomial test.
 *
 * @param trials      all trials of all sessions, each with at least two labels; may be empty
 * @param alternative 'greater' or 'two-sided', fixed before the data
 * @returns counts, exact p, moments and the whole null distribution
 * @throws RangeError when a count is not whole and at least 0, or a truth is not one of its labels
 * @example sharedPresentationTest([{ counts: [3, 1], truth: 0, missing: 0 }, { counts: [0, 4], truth: 1, missing: 0 }],
 *   'greater').p // 1/4: of the four draws, AA gives 3 matches, AB 7, BA 1, BB 5; only AB reaches the 7 observed
 * @see Fisher, The Design of Experiments (1935), ch. II and III.21; Edgington & Onghena, Randomization Tests,
 *   4th ed. (2007), ch. 3, on drawing as the assignment was drawn
 */
export function sharedPresentationTest(
  trials: readonly SharedTrial[],
  alternative: SharedAlternative,
): SharedPresentationTest {
  for (const trial of trials) requireTrial(trial);
  const { lowest, ways } = convolve(trials);
  const draws = trials.reduce((product, { counts }) => product * BigInt(counts.length), 1n);
  const matching = trials.reduce((sum, { counts, truth }) => sum + (counts[truth] ?? 0), 0);
  const missing = trials.reduce((sum, trial) => sum + trial.missing, 0);
  const given = trials.reduce((sum, { counts }) => sum + sumOf(counts), 0);
  const mean = exactMean(trials);

  const waysWhere = (isCounted: (matches: number) => boolean) =>
    ways.reduce((sum, count, index) => (isCounted(lowest + index) ? sum + count : sum), 0n);
  const share = (numerator: bigint) => reduceFraction({ numerator, denominator: draws });
  const isExtreme = alternative === 'greater' ? (matches: number) => matches >= matching : atLeastAsFar(matching, mean);
  const pFraction = share(waysWhere(isExtreme));
  const leastAttainable = share(leastWays(lowest, ways, mean, alternative));

  return {
    matching,
    answers: given + missing,
    missing,
    pFraction,
    p: fractionToNumber(pFraction),
    logP: fractionToLog(pFraction),
    lowerTail: share(waysWhere((matches) => matches <= matching)),
    mean: fractionToNumber(mean),
    variance: fractionToNumber(exactVariance(trials)),
    coins: trials.filter(({ counts }) => counts.some((count) => count !== counts[0])).length,
    leastAttainable,
    leastAttainableP: fractionToNumber(leastAttainable),
    nullDistribution: ways.map((count, index) => ({
      matching: lowest + index,
      probability: fractionToNumber({ numerator: count, denominator: draws }),
    })),
  };
}

function requireTrial({ counts, truth, missing }: SharedTrial): void {
  requireWhole('number of labels', counts.length, 2, 1000);
  for (const count of counts) requireWhole('count of a label', count, 0, 1_000_000);
  requireWhole('truth', truth, 0, counts.length - 1);
  requireWhole('missing', missing, 0, 1_000_000);
}

/** A trial whose draw can only give one of two numbers of matches, this far apart: by how many of its labels each. */
type Coin = { readonly apart: number; readonly lower: bigint; readonly higher: bigint };

function coinOf(counts: readonly number[]): Coin | null {
  const [fewest, most] = [Math.min(...counts), Math.max(...counts)];
  const lower = counts.filter((count) => count === fewest).length;
  const higher = counts.filter((count) => count === most).length;
  return lower + higher === counts.length
    ? { apart: most - fewest, lower: BigInt(lower), higher: BigInt(higher) }
    : null;
}

/** Ways of many trials with the same coin: the terms of (lower + higher x^apart)^times, by the binomial theorem. */
function waysOfAlike({ apart, lower, higher }: Coin, times: number): bigint[] {
  const ways = new Array<bigint>(times * apart + 1).fill(0n);
  let term = lower ** BigInt(times);
  for (let count = 0; count <= times; count += 1) {
    ways[count * apart] = term;
    term = (term * BigInt(times - count) * higher) / (BigInt(count + 1) * lower);
  }
  return ways;
}

/** The most trials that have the same coin, and all others. */
function mostAlike(trials: readonly SharedTrial[]): {
  coin: Coin | null;
  alike: number;
  others: readonly SharedTrial[];
} {
  const groups = new Map<string, { coin: Coin; own: Set<SharedTrial> }>();
  for (const trial of trials) {
    const coin = coinOf(trial.counts);
    if (coin === null) continue;
    const name = `${coin.apart} ${coin.lower} ${coin.higher}`;
    const group = groups.get(name) ?? { coin, own: new Set() };
    groups.set(name, group);
    group.own.add(trial);
  }
  const largest = [...groups.values()].reduce<{ coin: Coin | null; own: Set<SharedTrial> }>(
    (most, group) => (group.own.size > most.own.size ? group : most),
    { coin: null, own: new Set() },
  );
  return { ...largest, alike: largest.own.size, others: trials.filter((trial) => !largest.own.has(trial)) };
}

/**
 * In how many of all possible draws each number of matches comes up, from the lowest possible number on. The most trials
 * alike are taken at once, so that a study of one listener at a time, where all are, costs no convolution.
 */
function convolve(trials: readonly SharedTrial[]): { lowest: number; ways: bigint[] } {
  // Where every label got as many answers the draw changes nothing; it only multiplies the ways.
  const [even, uneven] = [true, false].map((isEven) =>
    trials.filter(({ counts }) => counts.every((count) => count === counts[0]) === isEven),
  ) as [SharedTrial[], SharedTrial[]];
  const { coin, alike, others } = mostAlike(uneven);
  const lowest = trials.reduce((sum, { counts }) => sum + Math.min(...counts), 0);
  let ways = coin === null ? [1n] : waysOfAlike(coin, alike);
  for (const { counts } of others) {
    const fewest = Math.min(...counts);
    const next = new Array<bigint>(ways.length + Math.max(...counts) - fewest).fill(0n);
    for (const count of counts) {
      for (const [index, number] of ways.entries())
        next[index + count - fewest] = at(next, index + count - fewest) + number;
    }
    ways = next;
  }
  const factor = even.reduce((product, { counts }) => product * BigInt(counts.length), 1n);
  return { lowest, ways: factor === 1n ? ways : ways.map((number) => number * factor) };
}

function at(ways: readonly bigint[], index: number): bigint {
  return ways[index] ?? 0n;
}

/** Draws at the extreme of the distribution: no draw can do better than these. */
function leastWays(lowest: number, ways: readonly bigint[], mean: Fraction, alternative: SharedAlternative): bigint {
  const top = at(ways, ways.length - 1);
  if (alternative === 'greater' || ways.length === 1) return top;
  const highest = lowest + ways.length - 1;
  const bottom = at(ways, 0);
  const isLowAsFar = atLeastAsFar(highest, mean)(lowest);
  const isHighAsFar = atLeastAsFar(lowest, mean)(highest);
  return (isLowAsFar ? bottom : 0n) + (isHighAsFar ? top : 0n);
}

/** Compares distances from the mean in whole numbers: every term is multiplied by the denominator of the mean. */
function atLeastAsFar(observed: number, { numerator, denominator }: Fraction): (matches: number) => boolean {
  const distance = (matches: number) => {
    const difference = BigInt(matches) * denominator - numerator;
    return difference < 0n ? -difference : difference;
  };
  const limit = distance(observed);
  return (matches) => distance(matches) >= limit;
}

function exactMean(trials: readonly SharedTrial[]): Fraction {
  return sumOfFractions(
    trials.map(({ counts }) => ({ numerator: BigInt(sumOf(counts)), denominator: BigInt(counts.length) })),
  );
}

/** Per trial the mean square less the squared mean, over a common denominator of labels squared. */
function exactVariance(trials: readonly SharedTrial[]): Fraction {
  return sumOfFractions(
    trials.map(({ counts }) => {
      const labels = BigInt(counts.length);
      const squares = counts.reduce((sum, count) => sum + BigInt(count) ** 2n, 0n);
      return { numerator: labels * squares - BigInt(sumOf(counts)) ** 2n, denominator: labels * labels };
    }),
  );
}

function sumOfFractions(terms: readonly Fraction[]): Fraction {
  return terms.reduce(
    (sum, term) =>
      reduceFraction({
        numerator: sum.numerator * term.denominator + term.numerator * sum.denominator,
        denominator: sum.denominator * term.denominator,
      }),
    { numerator: 0n, denominator: 1n },
  );
}

function sumOf(counts: readonly number[]): number {
  return counts.reduce((sum, count) => sum + count, 0);
}
