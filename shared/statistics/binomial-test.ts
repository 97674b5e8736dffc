import { logPoint, mostTrials } from './binomial-log-probability.ts';
import { logTailFrom } from './binomial-tails.ts';
import { type Chance, chanceAsNumbers } from './chance.ts';
import { requireWhole } from './domain.ts';
import { logOfSum } from './log-arithmetic.ts';

/** Which outcomes speak against guessing: more right answers, fewer, or either. There is no default. */
export type Alternative = 'greater' | 'less' | 'two-sided';

export interface BinomialTest {
  /** Chance of an outcome at least as extreme, if every answer is a guess. Claims use this one. */
  readonly p: number;
  /** Natural logarithm of p; still finite where p is too small for a double. */
  readonly logP: number;
  /** The same with the observed outcome counted half; shown beside p, never used for a claim. */
  readonly midP: number;
}

/** Two point probabilities that differ by rounding only are equal; R's binom.test uses the same margin. */
const logOfTieMargin = Math.log1p(1e-7);

/**
 * How often guessing alone would do at least as well as `successes` right in `trials`, exactly.
 *
 * One-sided: the tail. Two-sided: by least likelihood, the sum over all counts that are no more likely than the one
 * observed, with a margin of one part in ten million so that ties are ties. Two-sided mid-p: twice the smaller one,
 * at most 1.
 *
 * @param successes   right answers, whole, 0 ... trials
 * @param trials      answers given, whole, 1 ... 100000; independent under the null
 * @param chance      chance of a right answer by guessing, strictly between 0 and 1
 * @param alternative 'greater', 'less' or 'two-sided', fixed before the data
 * @returns p, its logarithm and mid-p
 * @throws RangeError when an argument is outside its domain
 * @example binomialTest(12, 16, evenChance, 'greater').p // 2517/65536 = 0.0384
 *   ; R: binom.test(12, 16, alternative = "greater")
 * @example binomialTest(682, 925, 0.75, 'two-sided').p // 0.3825 ; Conover, Practical Nonparametric Statistics (1971), p. 97
 * @see Lancaster, "Significance tests in discrete distributions", JASA 56 (1961), 223-234, for mid-p
 */
export function binomialTest(
  successes: number,
  trials: number,
  chance: Chance,
  alternative: Alternative,
): BinomialTest {
  requireWhole('trials', trials, 1, mostTrials);
  requireWhole('successes', successes, 0, trials);
  const { right, wrong } = chanceAsNumbers(chance);
  const greater = oneSided(successes, trials, right, wrong);
  const less = oneSided(trials - successes, trials, wrong, right);
  switch (alternative) {
    case 'greater':
      return greater;
    case 'less':
      return less;
    case 'two-sided': {
      const logP = logOfLeastLikely(successes, trials, right, wrong);
      return { p: Math.exp(logP), logP, midP: Math.min(1, 2 * Math.min(greater.midP, less.midP)) };
    }
  }
}

function oneSided(successes: number, trials: number, right: number, wrong: number): BinomialTest {
  const logP = logTailFrom(successes, trials, right, wrong);
  const beyond = Math.exp(logTailFrom(successes + 1, trials, right, wrong));
  return { p: Math.exp(logP), logP, midP: beyond + 0.5 * Math.exp(logPoint(successes, trials, right, wrong)) };
}

function logOfLeastLikely(successes: number, trials: number, right: number, wrong: number): number {
  const limit = logPoint(successes, trials, right, wrong) + logOfTieMargin;
  const isUnlikely = (count: number) => logPoint(count, trials, right, wrong) <= limit;
  const mode = Math.min(trials, Math.floor((trials + 1) * right));
  if (isUnlikely(mode)) return 0;
  const lowerEnd = firstWhere(0, mode, (count) => !isUnlikely(count)) - 1;
  const upperEnd = firstWhere(mode, trials + 1, (count) => count > trials || isUnlikely(count));
  const logLower = logTailFrom(trials - lowerEnd, trials, wrong, right);
  const logUpper = logTailFrom(upperEnd, trials, right, wrong);
  return Math.min(0, logOfSum(logLower, logUpper));
}

/** Smallest whole number from `low` to `high` for which a condition that stays true once true holds; it does at `high`. */
function firstWhere(low: number, high: number, holds: (count: number) => boolean): number {
  let from = low;
  let to = high;
  while (from < to) {
    const middle = Math.floor((from + to) / 2);
    if (holds(middle)) to = middle;
    else from = middle + 1;
  }
  return from;
}
