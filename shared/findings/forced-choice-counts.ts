import { aboveGuessingRate } from '../statistics/above-guessing.ts';
import { binomialTest } from '../statistics/binomial-test.ts';
import type { Chance } from '../statistics/chance.ts';
import { chanceAsNumbers } from '../statistics/chance.ts';
import { clopperPearsonLower, clopperPearsonUpper } from '../statistics/clopper-pearson.ts';
import { type CountOutcome, countOutcomes } from '../statistics/count-outcomes.ts';
import type { CountTable } from './count-table.ts';
import { formatShare } from './format-probability.ts';

/** The confidence of limits from above, as a report gives them. */
const confidence = 0.95;

/** The share above guessing that so many right leave open from above, with one-sided confidence .95. */
function upperShare(count: number, trials: number, chance: Chance): number {
  return Math.max(0, aboveGuessingRate(clopperPearsonUpper(count, trials, confidence), chance));
}

/**
 * What each number of right answers would mean, in the rows and words of the findings.
 *
 * @param chance chance of a right answer by guessing
 * @example of 16 at chance 1/2: 12 right is a difference, p 0.0384, 50% above guessing, at least 3% and at most 80%, each with
 *   confidence .95
 * @see countOutcomes, aboveGuessing and binomialTest for the figures
 */
export function forcedChoiceCounts(chance: Chance): CountTable {
  return {
    counted: 'Right',
    effect: 'Above guessing (one-sided limits)',
    rows: ({ trials, alpha, margin }) =>
      countOutcomes({ trials, chance, alpha, margin }).map(({ from, to, outcome }) => {
        const pOf = (count: number) => binomialTest(count, trials, chance, 'greater').p;
        const shareOf = (count: number) => Math.max(0, aboveGuessingRate(count / trials, chance));
        const lower = aboveGuessingRate(clopperPearsonLower(from, trials, 1 - alpha), chance);
        return {
          from,
          to,
          p: [pOf(from), pOf(to)],
          finding: outcome,
          share: [shareOf(from), shareOf(to)],
          limits: { lower: Math.max(0, lower), upper: upperShare(to, trials, chance) },
          maySay: maySayOf(outcome, upperShare(to, trials, chance), margin),
        };
      }),
  };
}

function maySayOf(outcome: CountOutcome, upper: number, margin: number | null): string {
  const below = `the share of answers above guessing is below ${formatShare(margin ?? 1, 'nearest')}, with 95% confidence`;
  switch (outcome) {
    case 'below chance':
      return 'Nothing: the sessions must be checked for swapped labels.';
    case 'below the margin':
      return `Under these conditions ${below}.`;
    case 'inconclusive':
      return `None was detected, and none is excluded up to ${formatShare(upper, 'up')} above guessing.`;
    case 'small difference':
      return `It was found more often than guessing allows, and it is small: ${below}.`;
    case 'difference':
      return 'It was found more often than guessing allows.';
  }
}

/**
 * What a study leaves open whose count comes out at just what guessing gives.
 *
 * @param trials over all sessions, whole, at least 1
 * @param chance chance of a right answer by guessing
 * @returns the sentence of an inconclusive finding
 * @example leftOpenAtChance(16, evenChance) // 8 right: "... up to 45% is not excluded ..." ; R: 2 * qbeta(.95, 9, 8) - 1
 */
export function leftOpenAtChance(trials: number, chance: Chance): string {
  const count = Math.ceil(trials * chanceAsNumbers(chance).right - 1e-9);
  const upper = formatShare(upperShare(count, trials, chance), 'up');
  return `With ${count} of ${trials} right, no more than guessing gives, an above-chance rate up to ${upper} is not excluded (one-sided 95% limit).`;
}
