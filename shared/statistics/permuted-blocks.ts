import { binomialCoefficient } from './binomial-coefficient.ts';
import { requireWhole } from './domain.ts';
import { type Fraction, fractionToNumber, reduceFraction } from './fraction.ts';

/** One block: each label was presented so many times, in an order drawn from all such orders. */
export interface PermutedBlock {
  /** How often each label was presented, in the order of the labels. */
  readonly presented: readonly number[];
  /** How often each was answered; as many in all as were presented. */
  readonly answered: readonly number[];
}

export interface PermutedBlocksTest {
  /** Chance of at least as many matches over all orders, the answers held fixed; in lowest terms. */
  readonly pFraction: Fraction;
  readonly p: number;
  readonly mean: number;
  readonly variance: number;
  /** Chance of 0, 1, 2 ... matches. */
  readonly nullDistribution: readonly number[];
}

/**
 * How often answers would match a fresh draw of balanced blocks as well as they matched the real one.
 *
 * Inside a block the presentations are not independent: who answers each label as often as it was presented varies more
 * than coins do, and the binomial test is then too small. Every order of each block is counted in whole numbers, with the
 * answers held fixed, and the blocks are convolved. It needs a session without feedback: whoever knows what has been
 * presented can guess what is left. Fairlead draws coins and no blocks; this is for results that come from elsewhere.
 *
 * @param blocks   at least one, all with the same labels, at least two
 * @param matching matches seen, whole, 0 ... number of trials
 * @returns exact p, moments and the whole null distribution
 * @throws RangeError when an argument is outside its domain
 * @example permutedBlocksTest([{ presented: [4, 4], answered: [4, 4] }], 8).p // 1/70, where coins would give 1/256
 * @see Fisher, The Design of Experiments (1935), ch. II; Edgington & Onghena, Randomization Tests, 4th ed. (2007), ch. 3
 */
export function permutedBlocksTest(blocks: readonly PermutedBlock[], matching: number): PermutedBlocksTest {
  requireWhole('number of blocks', blocks.length, 1, 10_000);
  for (const block of blocks) requireBlock(block);
  const trials = blocks.reduce((all, { presented }) => all + sumOf(presented), 0);
  requireWhole('matching', matching, 0, trials);
  const ways = blocks.map(waysOfBlock).reduce(convolve, [1n]);
  const draws = ways.reduce((all, count) => all + count, 0n);
  const share = (numerator: bigint, denominator = draws) => fractionToNumber({ numerator, denominator });
  const first = ways.reduce((sum, count, matches) => sum + count * BigInt(matches), 0n);
  const second = ways.reduce((sum, count, matches) => sum + count * BigInt(matches) ** 2n, 0n);
  const extreme = ways.slice(matching).reduce((sum, count) => sum + count, 0n);
  const pFraction = reduceFraction({ numerator: extreme, denominator: draws });
  return {
    pFraction,
    p: fractionToNumber(pFraction),
    mean: share(first),
    variance: share(second * draws - first * first, draws * draws),
    nullDistribution: Array.from({ length: trials + 1 }, (_, matches) => share(ways[matches] ?? 0n)),
  };
}

function requireBlock({ presented, answered }: PermutedBlock): void {
  requireWhole('number of labels', presented.length, 2, 20);
  requireWhole('number of labels answered', answered.length, presented.length, presented.length);
  for (const count of [...presented, ...answered]) requireWhole('count of a label', count, 0, 1000);
  requireWhole('answers of a block', sumOf(answered), sumOf(presented), sumOf(presented));
}

/**
 * The orders of one block by their matches. Trials with the same answer are alike, so the answers are gone through label by
 * label: of the labels still to be placed, so many of each fall on these trials, in a multinomial number of ways.
 */
function waysOfBlock({ presented, answered }: PermutedBlock): bigint[] {
  let states = new Map<string, { left: readonly number[]; ways: bigint[] }>([
    [presented.join(), { left: presented, ways: [1n] }],
  ]);
  for (const [label, trials] of answered.entries()) {
    const next: typeof states = new Map();
    for (const { left, ways } of states.values()) {
      for (const { placed, orders } of placements(left, trials)) {
        const rest = left.map((count, index) => count - (placed[index] ?? 0));
        const here = new Array<bigint>(placed[label] ?? 0).fill(0n).concat(ways.map((count) => count * orders));
        const known = next.get(rest.join());
        next.set(rest.join(), { left: rest, ways: known === undefined ? here : added(known.ways, here) });
      }
    }
    states = next;
  }
  return [...states.values()].reduce<bigint[]>((all, { ways }) => added(all, ways), []);
}

/** How many of each label fall on so many trials, and in how many orders. */
function placements(left: readonly number[], trials: number): { placed: number[]; orders: bigint }[] {
  const [available, ...others] = left;
  if (available === undefined) return trials === 0 ? [{ placed: [], orders: 1n }] : [];
  return Array.from({ length: Math.min(available, trials) + 1 }, (_, here) => here).flatMap((here) =>
    placements(others, trials - here).map(({ placed, orders }) => ({
      placed: [here, ...placed],
      orders: orders * binomialCoefficient(trials, here),
    })),
  );
}

function convolve(left: readonly bigint[], right: readonly bigint[]): bigint[] {
  const product = new Array<bigint>(left.length + right.length - 1).fill(0n);
  for (const [i, a] of left.entries())
    for (const [j, b] of right.entries()) product[i + j] = (product[i + j] ?? 0n) + a * b;
  return product;
}

function added(left: readonly bigint[], right: readonly bigint[]): bigint[] {
  return Array.from(
    { length: Math.max(left.length, right.length) },
    (_, index) => (left[index] ?? 0n) + (right[index] ?? 0n),
  );
}

function sumOf(counts: readonly number[]): number {
  return counts.reduce((sum, count) => sum + count, 0);
}
