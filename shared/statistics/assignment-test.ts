import { requireWhole } from './domain.ts';
import { type Fraction, reduceFraction } from './fraction.ts';

/** One trial of same-different: every listener present heard the same pair, so there is one draw. */
export interface AssignedTrial {
  /** Answers "different", whole, at least 0. */
  readonly different: number;
  /** The draw: whether the two cables of the pair were different ones. */
  readonly isDifferent: boolean;
}

export interface AssignmentTest {
  /** Answers "different" given on different trials. */
  readonly hits: number;
  /** Chance of at least as many over all assignments, the answers held fixed; in lowest terms. */
  readonly upperTail: Fraction;
  /** Chance of at most as many. */
  readonly lowerTail: Fraction;
  /** The smallest upper tail that any assignment gives with these answers. */
  readonly leastAttainable: Fraction;
  /** Every number of hits that an assignment gives, ascending, with how many of them give it. */
  readonly ways: readonly { readonly hits: number; readonly count: bigint }[];
  /** All assignments: trials choose different ones. */
  readonly assignments: bigint;
}

/**
 * How often a fresh assignment of as many different trials would collect as many "different" answers as the real one did.
 *
 * If nobody hears a difference the answers do not depend on which trials were different. Given how many were, every choice
 * of that many trials was as likely, because the coins were fair and independent. Held fixed, the answers give each of
 * these choices its number of hits; whole trials are chosen, so it holds its level whatever the listeners of a trial share.
 * With one answer per trial it is Fisher's exact test, one-sided. No, or only, different trials leave one choice: p is 1.
 *
 * The choices are counted in whole numbers by a dynamic programme over groups of trials with as many answers "different":
 * ways to choose j of them with s hits. All s of one j stand side by side in one long number, so that adding a group is a
 * few shifts and sums.
 *
 * @param trials all trials of all sessions; may be empty
 * @returns hits, exact tails, and the whole distribution
 * @throws RangeError when a number of answers is not whole and at least 0
 * @example assignmentTest([...]) for one listener with 7 hits in 8 different and 2 false alarms in 8 same trials:
 *   upper tail 29/1430 = 0.0203 ; R: fisher.test(matrix(c(7, 1, 2, 6), 2), alternative = "greater")$p.value
 * @see Fisher, The Design of Experiments (1935), ch. II; Edgington & Onghena, Randomization Tests, 4th ed. (2007), ch. 4
 */
export function assignmentTest(trials: readonly AssignedTrial[]): AssignmentTest {
  for (const { different } of trials) requireWhole('answers "different"', different, 0, 1_000_000);
  const weights = trials.map(({ different }) => different);
  const chosen = trials.filter(({ isDifferent }) => isDifferent);
  const hits = chosen.reduce((sum, { different }) => sum + different, 0);
  const ways = waysToChoose(weights, chosen.length);
  const assignments = ways.reduce((sum, { count }) => sum + count, 0n);
  const share = (isCounted: (hits: number) => boolean) =>
    reduceFraction({
      numerator: ways.reduce((sum, way) => (isCounted(way.hits) ? sum + way.count : sum), 0n),
      denominator: assignments,
    });
  const most = ways.at(-1)?.hits ?? 0;
  return {
    hits,
    upperTail: share((count) => count >= hits),
    lowerTail: share((count) => count <= hits),
    leastAttainable: share((count) => count >= most),
    ways,
    assignments,
  };
}

/** In how many ways so many trials can be chosen, by the sum of their weights. Trials of one weight are taken together. */
function waysToChoose(weights: readonly number[], choose: number): { hits: number; count: bigint }[] {
  // No number of ways exceeds 2^trials, so that neighbours in a long number never run into each other.
  const digits = Math.ceil((weights.length + 1) / 4);
  const sizes = new Map<number, number>();
  for (const weight of weights) sizes.set(weight, (sizes.get(weight) ?? 0) + 1);
  const groups = [...sizes].sort(([a], [b]) => a - b);
  let rows = [1n];
  let seen = 0;
  for (const [weight, size] of groups) {
    const shift = BigInt(4 * digits * weight);
    const own = binomials(size);
    const left = weights.length - seen - size;
    const next: bigint[] = [];
    // Rows that the trials still to come cannot bring to the number chosen are not worth their sums.
    for (let taken = Math.max(0, choose - left); taken <= Math.min(choose, seen + size); taken++) {
      let sum = 0n;
      for (let here = Math.max(0, taken - seen); here <= Math.min(taken, size); here++)
        sum += ((rows[taken - here] ?? 0n) * (own[here] ?? 0n)) << (shift * BigInt(here));
      next[taken] = sum;
    }
    rows = next;
    seen += size;
  }
  return unpack(rows[choose] ?? 0n, digits);
}

/** One row of Pascal's triangle. */
function binomials(size: number): bigint[] {
  const row = [1n];
  for (let k = 1; k <= size; k++) row.push(((row[k - 1] ?? 0n) * BigInt(size - k + 1)) / BigInt(k));
  return row;
}

/** The slots of a long number, lowest first, without the empty ones. */
function unpack(long: bigint, digits: number): { hits: number; count: bigint }[] {
  const text = long.toString(16);
  const slots: { hits: number; count: bigint }[] = [];
  for (let end = text.length, hits = 0; end > 0; end -= digits, hits++) {
    const count = BigInt(`0x${text.slice(Math.max(0, end - digits), end)}`);
    if (count > 0n) slots.push({ hits, count });
  }
  return slots;
}
