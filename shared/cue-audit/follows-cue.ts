import { repeatableUniform } from '../statistics/repeatable-uniform.ts';

/** Scores of each trial for each label, by a cue. */
export type LabelScores = readonly (readonly number[])[];

export type Followed = {
  /** The sum over all answers less its mean over all orders, in standard deviations of them; 0 where no order differs. */
  readonly z: number;
  /** Share of orders, the real one among them, whose sum lies as far from the mean on either side. */
  readonly p: number;
};

/** How many orders of the trials are tried. */
export const ordersTried = 1_999;

/** Sums of whole numbers; what is this close counts as equal. */
const tie = 1e-9;

/** Puts the numbers of each session's trials in another order, each order as likely. */
function shuffleWithin(strata: readonly (readonly number[])[], order: Int32Array, uniform: () => number): void {
  for (const own of strata)
    for (let last = own.length - 1; last > 0; last -= 1) {
      const other = Math.floor(uniform() * (last + 1));
      const [a, b] = [own[last] ?? 0, own[other] ?? 0];
      const kept = order[a] ?? 0;
      order[a] = order[b] ?? 0;
      order[b] = kept;
    }
}

/**
 * Whether answers follow cues: the answers of whole trials are put in other orders within their session, the cues kept.
 *
 * All listeners of a trial move together, so that habits which they share stand for nothing. The orders are the same for
 * all cues and, from a fixed seed, the same for everybody who repeats it. It takes trials of a session for exchangeable
 * where nobody follows the cue.
 *
 * @param tables  for each cue the scores of each trial for each label, whole
 * @param counts  how many answers of each trial named each label
 * @param strata  the trials of each session, as indices
 * @param orders  how many orders are tried, at least 1
 * @returns for each table how far the real sum lies out, and its p: (as far + 1) / (orders + 1)
 * @see Edgington and Onghena, Randomization Tests, 4th ed. (2007), ch. 3; Phipson and Smyth, Stat. Appl. Genet. Mol. Biol. 9
 *   (2010), article 39, on counting the real order in
 */
export function followsCues(
  tables: readonly LabelScores[],
  counts: LabelScores,
  strata: readonly (readonly number[])[],
  orders = ordersTried,
): Followed[] {
  const order = Int32Array.from(counts.keys());
  const labels = counts[0]?.length ?? 0;
  const given = flat(counts, labels);
  const scores = tables.map((table) => flat(table, labels));
  const moments = tables.map((table) => momentsOf(table, counts, strata));
  const offsets = scores.map((own, index) => sumOver(own, given, order, labels) - (moments[index]?.mean ?? 0));
  const asFar = new Int32Array(tables.length);
  const uniform = repeatableUniform(20_261_205);
  for (let tried = 0; tried < orders; tried += 1) {
    shuffleWithin(strata, order, uniform);
    for (const [index, own] of scores.entries()) {
      const offset = sumOver(own, given, order, labels) - (moments[index]?.mean ?? 0);
      if (Math.abs(offset) >= Math.abs(offsets[index] ?? 0) - tie) asFar[index] = (asFar[index] ?? 0) + 1;
    }
  }
  return moments.map(({ deviation }, index) => ({
    z: deviation === 0 ? 0 : (offsets[index] ?? 0) / deviation,
    p: ((asFar[index] ?? 0) + 1) / (orders + 1),
  }));
}

/** Row after row in one array: this is the innermost loop of the audit. */
const flat = (rows: LabelScores, labels: number) =>
  Float64Array.from({ length: rows.length * labels }, (_, at) => rows[Math.floor(at / labels)]?.[at % labels] ?? 0);

function sumOver(scores: Float64Array, given: Float64Array, order: Int32Array, labels: number): number {
  let sum = 0;
  for (let trial = 0; trial < order.length; trial += 1) {
    const from = (order[trial] ?? 0) * labels;
    for (let label = 0; label < labels; label += 1)
      sum += (scores[trial * labels + label] ?? 0) * (given[from + label] ?? 0);
  }
  return sum;
}

/**
 * Mean and standard deviation of the sum over all orders within sessions, exactly: with cross products s(i, j) of the scores
 * of trial i and the answers of trial j, less their row and column means, the variance is the sum of squares over n - 1.
 *
 * @see Hoeffding, "A combinatorial central limit theorem", Ann. Math. Statist. 22 (1951), 558-566
 */
function momentsOf(table: LabelScores, counts: LabelScores, strata: readonly (readonly number[])[]) {
  let [mean, variance] = [0, 0];
  for (const own of strata) {
    const n = own.length;
    const cross = own.map((i) =>
      own.map((j) => (table[i] ?? []).reduce((sum, score, label) => sum + score * (counts[j]?.[label] ?? 0), 0)),
    );
    const total = cross.reduce((sum, row) => sum + row.reduce((all, value) => all + value, 0), 0);
    mean += n === 0 ? 0 : total / n;
    if (n < 2) continue;
    const rows = cross.map((row) => row.reduce((all, value) => all + value, 0) / n);
    const columns = own.map((_, j) => cross.reduce((all, row) => all + (row[j] ?? 0), 0) / n);
    for (const [i, row] of cross.entries())
      for (const [j, value] of row.entries())
        variance += (value - (rows[i] ?? 0) - (columns[j] ?? 0) + total / (n * n)) ** 2 / (n - 1);
  }
  return { mean, deviation: Math.sqrt(variance) };
}
