import { type Chance, chanceAsFraction } from './chance.ts';
import { criticalCount } from './critical-count.ts';
import { similarityCriticalCount } from './similarity.ts';

/** What a count of right answers comes to, from the fewest to the most. */
export type CountOutcome = 'below chance' | 'below the margin' | 'inconclusive' | 'small difference' | 'difference';

export interface OutcomeQuestion {
  /** Answers, each with a draw of its own, whole, 1 ... 100000. */
  readonly trials: number;
  readonly chance: Chance;
  /** One-sided level, strictly between 0 and 1. */
  readonly alpha: number;
  /** Share of answers above guessing that is to be excluded, strictly between 0 and 1, or null where none is registered. */
  readonly margin: number | null;
}

/** Consecutive counts with one outcome. */
export interface OutcomeRange {
  readonly from: number;
  readonly to: number;
  readonly outcome: CountOutcome;
}

/** So few right answers that guessing gives as few in one study of a hundred: the labels are suspect. */
const suspectTail = 0.01;
/** What lies below a margin is shown at this level, whatever the level of the difference test. */
const marginLevel = 0.05;
/** A range is cut into pieces so that about so many rows say what every count means; where labels are suspect, none. */
const rows = 8;

/**
 * What every possible count of right answers would come to, in ranges that are short enough to read figures off.
 *
 * In the order of the findings: below chance where the lower tail is at most .01; then whether the level is reached, and
 * whether the upper limit lies below the margin, which it does up to the critical count of the similarity test.
 *
 * @param question trials, chance, level and margin
 * @returns ranges from 0 to all right, none empty
 * @throws RangeError when an argument is outside its domain
 * @example of 16 at chance 1/2 and level .05: below chance to 2, inconclusive to 11, a difference from 12 on; with a margin
 *   of .2 the counts 3 to 5 show it
 *   ; R: pbinom(2:3, 16, .5), pbinom(5:6, 16, .6), pbinom(10:11, 16, .5, lower.tail = FALSE)
 * @see criticalCount and similarityCriticalCount for the tests
 */
export function countOutcomes(question: OutcomeQuestion): OutcomeRange[] {
  const { trials, chance, alpha, margin } = question;
  const found = criticalCount(trials, chance, alpha)?.count ?? trials + 1;
  const suspectWrong = criticalCount(trials, wrongChance(chance), suspectTail)?.count;
  const suspect = suspectWrong === undefined ? -1 : trials - suspectWrong;
  const shown = margin === null ? -1 : (similarityCriticalCount(trials, chance, margin, marginLevel)?.count ?? -1);
  const outcomeOf = (count: number): CountOutcome => {
    if (count <= suspect) return 'below chance';
    if (count >= found) return count <= shown ? 'small difference' : 'difference';
    return count <= shown ? 'below the margin' : 'inconclusive';
  };
  const width = Math.max(1, Math.round((trials + 1) / rows));
  const ranges: OutcomeRange[] = [];
  for (let from = 0; from <= trials; ) {
    const outcome = outcomeOf(from);
    let to = from;
    const most = outcome === 'below chance' ? trials : width;
    while (to < trials && to - from + 1 < most && outcomeOf(to + 1) === outcome) to += 1;
    ranges.push({ from, to, outcome });
    from = to + 1;
  }
  return ranges;
}

function wrongChance(chance: Chance): Chance {
  const { numerator, denominator } = chanceAsFraction(chance);
  return { numerator: Number(denominator - numerator), denominator: Number(denominator) };
}
