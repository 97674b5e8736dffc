import { mostTrials } from './binomial-log-probability.ts';
import { binomialLogUpperTail } from './binomial-tails.ts';
import { type BinomialTest, binomialTest } from './binomial-test.ts';
import { type Chance, chanceAsFraction } from './chance.ts';
import { criticalCount } from './critical-count.ts';
import { requireBetween, requireWhole } from './domain.ts';
import { reduceFraction } from './fraction.ts';
import { type SampleSize, sampleSize } from './sample-size.ts';

// A similarity test is the difference test of the wrong answers: "at most k right" is "at least n - k wrong", and the
// rate of wrong answers at the margin takes the place of the chance.

/**
 * How often a listener at the margin would do no better than `successes` right in `trials`.
 *
 * A small p shows that the share of answers above guessing lies below the margin; it is at most the level exactly when
 * the one-sided Clopper-Pearson upper limit does. A difference test that found nothing never shows this. The margin
 * belongs in the plan. With several listeners it is about these answers, not about people.
 *
 * @param successes right answers, whole, 0 ... trials; answers that were due and missing count as right here
 * @param trials    answers due, whole, 1 ... 100000; independent
 * @param chance    chance of a right answer by guessing
 * @param margin    share of answers above guessing to be excluded, strictly between 0 and 1
 * @returns p, its logarithm and mid-p
 * @throws RangeError when an argument is outside its domain
 * @example similarityTest(5, 16, evenChance, 0.2).p // 0.0191 ; R: pbinom(5, 16, 0.6)
 * @see ISO 4120, Sensory analysis - Triangle test (year from memory), on testing for similarity; Clopper & Pearson (1934)
 */
export function similarityTest(successes: number, trials: number, chance: Chance, margin: number): BinomialTest {
  requireWhole('trials', trials, 1, mostTrials);
  requireWhole('successes', successes, 0, trials);
  return binomialTest(trials - successes, trials, wrongRateAt(margin, chance), 'greater');
}

export interface SimilarityCriticalCount {
  /** Largest number of right answers that shows similarity. */
  readonly count: number;
  /** Chance of no more than that at the margin: the true size of the test, at most the level. */
  readonly attainedSize: number;
}

/**
 * How many right answers are few enough to show that the share above guessing lies below the margin.
 *
 * @param trials answers due, whole, 1 ... 100000
 * @param chance chance of a right answer by guessing
 * @param margin as for similarityTest
 * @param alpha  level, strictly between 0 and 1; read as the decimal it prints as
 * @returns the count and its size, or null when even none right would not show it
 * @throws RangeError when an argument is outside its domain
 * @example similarityCriticalCount(16, evenChance, 0.2, 0.05) // { count: 5, attainedSize: 0.0191 } ; R: pbinom(5, 16, .6)
 * @see criticalCount, of which this is the count of wrong answers
 */
export function similarityCriticalCount(
  trials: number,
  chance: Chance,
  margin: number,
  alpha: number,
): SimilarityCriticalCount | null {
  const wrong = criticalCount(trials, wrongRateAt(margin, chance), alpha);
  return wrong && { count: trials - wrong.count, attainedSize: wrong.attainedSize };
}

/**
 * Chance that the similarity test succeeds with listeners whose true share above guessing is `trueShare`.
 *
 * @param trials    answers, whole, 1 ... 100000; independent
 * @param chance    chance of a right answer by guessing
 * @param margin    as for similarityTest
 * @param alpha     level, strictly between 0 and 1
 * @param trueShare true share of answers above guessing, 0 ... below 1; 0 for guessing alone
 * @returns the power; 0 when the level is out of reach
 * @throws RangeError when an argument is outside its domain
 * @example similarityPower(16, evenChance, 0.2, 0.05, 0) // 0.1051 ; R: pbinom(5, 16, 0.5)
 * @see power for its sister
 */
export function similarityPower(
  trials: number,
  chance: Chance,
  margin: number,
  alpha: number,
  trueShare: number,
): number {
  const rate = wrongRateAtShare(trueShare, chance);
  const critical = similarityCriticalCount(trials, chance, margin, alpha);
  return critical === null ? 0 : Math.exp(binomialLogUpperTail(trials - critical.count, trials, rate));
}

export interface SimilarityQuestion {
  readonly chance: Chance;
  readonly margin: number;
  readonly alpha: number;
  /** True share of answers above guessing, from 0 to below the margin. */
  readonly trueShare: number;
  readonly targetPower: number;
  /** Largest number of trials to consider, whole, 1 ... 100000. */
  readonly limit: number;
}

/**
 * How many trials a similarity test needs; every number is tried, as for sampleSize.
 *
 * @param question chance, margin, level, true share, power asked for and limit of the search
 * @returns as sampleSize
 * @throws RangeError when an argument is outside its domain
 * @example similaritySampleSize({ chance: evenChance, margin: 0.2, alpha: 0.05, trueShare: 0, targetPower: 0.9,
 *   limit: 3000 }) // nFirst 214, nSafe 227 ; R: exhaustive search with pbinom
 * @see sampleSize for the bound and its sources
 */
export function similaritySampleSize(question: SimilarityQuestion): SampleSize {
  const { chance, margin, alpha, trueShare, targetPower, limit } = question;
  const rate = wrongRateAtShare(trueShare, chance);
  return sampleSize({
    chance: wrongRateAt(margin, chance),
    alpha,
    correctRate: typeof rate === 'number' ? rate : rate.numerator / rate.denominator,
    targetPower,
    limit,
  });
}

function wrongRateAt(margin: number, chance: Chance): Chance {
  requireBetween('margin', margin, 0, 1, 'open');
  return wrongRateAtShare(margin, chance);
}

/** (1 - chance)(1 - share) as a ratio of whole numbers where these are small enough, else as a number. */
function wrongRateAtShare(share: number, chance: Chance): Chance {
  const { numerator, denominator } = chanceAsFraction(chance);
  if (share === 0) return asChance(denominator - numerator, denominator);
  requireBetween('share', share, 0, 1, 'open');
  const above = chanceAsFraction(share);
  return asChance((denominator - numerator) * (above.denominator - above.numerator), denominator * above.denominator);
}

function asChance(top: bigint, bottom: bigint): Chance {
  const { numerator, denominator } = reduceFraction({ numerator: top, denominator: bottom });
  const ratio = { numerator: Number(numerator), denominator: Number(denominator) };
  return Number.isSafeInteger(ratio.denominator) ? ratio : ratio.numerator / ratio.denominator;
}
