import { binomialLogUpperTail } from './binomial-tails.ts';
import type { Chance } from './chance.ts';
import { requireBetween, requireWhole } from './domain.ts';
import { type SampleSize, sampleSize } from './sample-size.ts';
import { similarityCriticalCount, similarityPower, similaritySampleSize } from './similarity.ts';

/** What lies below a margin is shown with this confidence, on one side, whatever the level of the difference test. */
export const marginConfidence = 0.95;
const level = 1 - marginConfidence;

/** The chance of showing it that a plan asks for when there is nothing to hear, and how far its number is looked for. */
const aim = { targetPower: 0.9, limit: 20_000 };

/** What a planner asks of a registered margin in which every answer, or every person, counts on its own. */
export interface PlannedMargin {
  /**
   * The most on the counted side that show the effect to lie below the margin, and how often an effect just at the margin
   * would come out so; null when even none would show it.
   */
  critical(count: number, margin: number): { readonly count: number; readonly attainedSize: number } | null;
  /** Chance of showing it when the true effect, by the same scale, is this; 0 for none. */
  power(count: number, margin: number, effect: number): number;
  /** How many show it with 90 % power when there is nothing: the first number, and the one from which on all do. */
  needed(margin: number): Pick<SampleSize, 'nFirst' | 'nSafe'>;
}

/**
 * The margin as a share of answers above guessing: answers are counted.
 *
 * @param chance chance of a right answer by guessing
 * @returns the margin as the planner asks it; margins and effects strictly between 0 and 1, an effect also 0
 * @example similarityPlan(evenChance).needed(0.2) // nFirst 214, nSafe 227 ; R: exhaustive search with pbinom
 * @see similarityCriticalCount, similarityPower and similaritySampleSize
 */
export function similarityPlan(chance: Chance): PlannedMargin {
  return {
    critical: (answers, margin) => similarityCriticalCount(answers, chance, margin, level),
    power: (answers, margin, effect) => similarityPower(answers, chance, margin, level, effect),
    needed: (margin) => similaritySampleSize({ ...aim, chance, margin, alpha: level, trueShare: 0 }),
  };
}

/**
 * The margin about one half, either way: people are counted, each by their own majority.
 *
 * Two one-sided tests, both of which must reach the level; the counts that do lie symmetrically about the middle. At the
 * margin itself the chance of that is below the level, because the other test may fail as well.
 *
 * @example equivalencePlan.critical(100, 0.1) // count 51, so 49 ... 51 ; R: pbinom(51, 100, .6) is 0.0423, 52 gives 0.0638
 * @see equivalenceAboutHalf; Schuirmann, J. Pharmacokinetics and Biopharmaceutics 15 (1987), 657-680
 */
export const equivalencePlan: PlannedMargin = {
  critical: (people, margin) => {
    const most = mostWithin(people, margin);
    return most === null ? null : { count: most, attainedSize: within(people, most, 0.5 + margin) };
  },
  power: (people, margin, effect) => {
    const most = mostWithin(people, margin);
    return most === null ? 0 : within(people, most, 0.5 + effect);
  },
  needed: equivalenceNeeded,
};

/** The largest count for which both tests reach the level, or null where none does. */
function mostWithin(people: number, margin: number): number | null {
  requireBetween('margin', margin, 0, 0.5, 'open');
  const critical = similarityCriticalCount(people, { numerator: 1, denominator: 2 }, 2 * margin, level);
  return critical === null || 2 * critical.count < people ? null : critical.count;
}

/** Chance of a count from people - most to most. */
function within(people: number, most: number, rate: number): number {
  requireWhole('people', people, 1, 100_000);
  requireBetween('rate', rate, 0, 1, 'open');
  const above = most === people ? 0 : Math.exp(binomialLogUpperTail(most + 1, people, rate));
  const below = most === people ? 0 : Math.exp(binomialLogUpperTail(most + 1, people, 1 - rate));
  return Math.max(0, 1 - above - below);
}

/** Where each side fails in at most half of what may fail, both together do; up to there every number is tried. */
function equivalenceNeeded(margin: number): Pick<SampleSize, 'nFirst' | 'nSafe'> {
  const { targetPower, limit } = aim;
  const { nSafe: bound } = sampleSize({
    chance: 0.5 - margin,
    alpha: level,
    correctRate: 0.5,
    targetPower: (1 + targetPower) / 2,
    limit,
  });
  if (bound === null) return { nFirst: null, nSafe: null };
  let nFirst: number | null = null;
  let nSafe: number | null = null;
  for (let people = 1; people <= bound; people += 1) {
    if (equivalencePlan.power(people, margin, 0) < targetPower) nSafe = null;
    else {
      nFirst ??= people;
      nSafe ??= people;
    }
  }
  return { nFirst, nSafe };
}
