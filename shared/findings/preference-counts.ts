import { clopperPearson } from '../statistics/clopper-pearson.ts';
import { fractionToNumber } from '../statistics/fraction.ts';
import { exactTwoSidedEven, twoSidedCriticalCount } from '../statistics/two-sided-even.ts';
import type { CountRow, CountTable } from './count-table.ts';
import { confidenceText } from './finding.ts';
import { formatShare } from './format-probability.ts';

/** About so many rows say what every count means. */
const pieces = 8;

/** What each number of answers for the first cable would mean, when every answer prefers one. */
export const preferenceCounts: CountTable = {
  counted: 'For one cable',
  effect: 'Its share (interval)',
  rows: ({ trials, alpha }) => {
    const critical = twoSidedCriticalCount(trials, alpha)?.count ?? trials + 1;
    const findingOf = (count: number) => {
      if (count >= critical) return 'this one favoured';
      return trials - count >= critical ? 'the other favoured' : 'no preference shown';
    };
    const pOf = (count: number) => fractionToNumber(exactTwoSidedEven(count, trials));
    const limitsOf = (count: number) => clopperPearson(count, trials, 1 - alpha);
    const width = Math.max(1, Math.round((trials + 1) / pieces));
    const rows: CountRow[] = [];
    for (let from = 0; from <= trials; ) {
      const finding = findingOf(from);
      let to = from;
      while (to < trials && to - from + 1 < width && findingOf(to + 1) === finding) to += 1;
      rows.push({
        from,
        to,
        p: [pOf(from), pOf(to)],
        finding,
        share: [from / trials, to / trials],
        limits: { lower: limitsOf(from).lower, upper: limitsOf(to).upper },
        maySay:
          finding === 'no preference shown'
            ? 'No preference was shown; not that both are liked equally.'
            : `The answers favoured ${finding === 'this one favoured' ? 'this cable' : 'the other cable'}, which does not make it the better one.`,
      });
      from = to + 1;
    }
    return rows;
  },
};

/**
 * What a study leaves open whose answers split evenly.
 *
 * @param trials answers that prefer one, whole, at least 1
 * @param alpha  two-sided level, strictly between 0 and 1: the interval has the confidence it leaves
 * @returns a sentence
 * @example leftOpenAtEven(16, 0.05) // "... up to 76% for one cable is not excluded ..." ; R: binom.test(8, 16)$conf.int
 */
export function leftOpenAtEven(trials: number, alpha: number): string {
  const count = Math.ceil(trials / 2);
  const { upper } = clopperPearson(count, trials, 1 - alpha);
  return `With ${count} of ${trials} for one cable, a share up to ${formatShare(upper, 'up')} is not excluded (${confidenceText(String(1 - alpha))} interval). It would not show that both are liked equally.`;
}
