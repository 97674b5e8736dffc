import { type Chance, chanceAsFraction, chanceAsNumbers, evenChance } from './chance.ts';
import { type CriticalCount, criticalCount } from './critical-count.ts';
import { equivalencePlan, type PlannedMargin, similarityPlan } from './planned-margin.ts';
import { power } from './power.ts';
import { type SampleSize, sampleSize } from './sample-size.ts';
import { twoSidedCriticalCount, twoSidedPower, twoSidedSampleSize } from './two-sided-even.ts';

/** How far a number of trials is looked for. */
const limit = 5000;

/** Shares above guessing that a plan is shown at: a small, a middling and a large effect. */
const effects = [0.2, 0.4, 0.6] as const;

/** What a planner asks of a registered test in which every answer has a draw of its own. */
export interface PlannedTest {
  /** Chance of an answer on the counted side by guessing; null where nothing of the kind is counted. */
  readonly chance: Chance | null;
  /** How many labels the draw of what is right chooses from; null for pairs that are the same or different. */
  readonly labels: number | null;
  /** The rate when nothing is heard, and no cable preferred: effects are measured from here. */
  readonly guessing: Chance;
  /** Rates at which the power is shown: a small, a middling and a large effect. */
  readonly rates: readonly [number, number, number];
  /** What one answer per trial must reach; null when out of reach, or when no fixed number can be told. */
  critical(trials: number, alpha: number): CriticalCount | null;
  power(trials: number, alpha: number, rate: number): number;
  /** No draw of so many trials gives a p smaller than one in this many. */
  leastPDenominator(trials: number): bigint;
  /** How many trials find that rate with the power asked for: the first number, and the one from which on all do. */
  needed(alpha: number, rate: number, targetPower: number): Pick<SampleSize, 'nFirst' | 'nSafe'>;
  /** The largest number of trials that `needed` looks at. */
  readonly searchedTo: number;
  /** What a registered margin asks of the plan; null for a test that takes none. */
  readonly margin: PlannedMargin | null;
}

/**
 * The one-sided binomial test of right answers.
 *
 * @param chance chance of a right answer by guessing
 * @returns the test as the planner asks it
 * @throws RangeError when the chance is not strictly between 0 and 1
 * @example oneSidedPlan({ numerator: 1, denominator: 3 }).critical(24, 0.05) // count 13 ; ISO 4120, table A.1
 * @see criticalCount, power and sampleSize
 */
export function oneSidedPlan(chance: Chance): PlannedTest {
  const { right, wrong } = chanceAsNumbers(chance);
  const { numerator, denominator } = chanceAsFraction(chance);
  const [small, middling, large] = effects;
  return {
    chance,
    labels: Number(denominator / numerator),
    guessing: chance,
    rates: [right + small * wrong, right + middling * wrong, right + large * wrong],
    critical: (trials, alpha) => criticalCount(trials, chance, alpha),
    power: (trials, alpha, rate) => power(trials, chance, alpha, rate).power,
    leastPDenominator: (trials) => (denominator / numerator) ** BigInt(trials),
    needed: (alpha, rate, targetPower) => sampleSize({ chance, alpha, correctRate: rate, targetPower, limit }),
    searchedTo: limit,
    margin: similarityPlan(chance),
  };
}

/**
 * The two-sided test of answers that fall on either side alike: the draw that is least likely has a twin on the other
 * side.
 *
 * @see twoSidedCriticalCount, twoSidedPower and twoSidedSampleSize
 */
export const twoSidedPlan: PlannedTest = {
  chance: evenChance,
  labels: 2,
  guessing: evenChance,
  rates: [0.6, 0.7, 0.8],
  critical: (trials, alpha) => twoSidedCriticalCount(trials, alpha),
  power: (trials, alpha, rate) => twoSidedPower(trials, alpha, rate).power,
  leastPDenominator: (trials) => 2n ** BigInt(trials - 1),
  needed: (alpha, rate, targetPower) => twoSidedSampleSize({ alpha, rate, targetPower, limit }),
  searchedTo: limit,
  margin: equivalencePlan,
};
