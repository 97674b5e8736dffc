import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { binomialLogProbability } from '#shared/statistics/binomial-log-probability.ts';
import { clopperPearson, type Interval } from '#shared/statistics/clopper-pearson.ts';
import { midPInterval } from '#shared/statistics/mid-p-interval.ts';
import { wilsonInterval } from '#shared/statistics/wilson.ts';

const rates = Array.from({ length: 999 }, (_, index) => (index + 1) / 1000);

/** How often the interval covers each rate: the chances of the counts whose limits enclose it. */
function coverageOf(intervalOf: (successes: number) => Interval, trials: number): number[] {
  const intervals = Array.from({ length: trials + 1 }, (_, successes) => intervalOf(successes));
  return rates.map((rate) =>
    intervals.reduce(
      (sum, { lower, upper }, successes) =>
        lower <= rate && rate <= upper ? sum + Math.exp(binomialLogProbability(successes, trials, rate)) : sum,
      0,
    ),
  );
}

const least = (values: readonly number[]) => Math.min(...values);
const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;

describe('coverage, all counts enumerated at 999 rates', () => {
  it.each([0.9, 0.95, 0.99])('of Clopper-Pearson is never below %d [T36]', (confidence) => {
    for (const trials of [1, 2, 5, 10, 16, 30, 50, 100])
      expect(least(coverageOf((k) => clopperPearson(k, trials, confidence), trials)), `${trials}`).toBeGreaterThan(
        confidence - 1e-12,
      );
  });

  it('of all three is what the table of decision 4 says [T36]', () => {
    const text = readFileSync('docs/decisions/0004-exact-statistics-of-our-own.md', 'utf8');
    const rows = [...text.matchAll(/^\| (\d+) +\| (.+) \|$/gm)].map(([, trials, cells = '']) => ({
      trials: Number(trials),
      cells: cells.split('|').map((cell) => cell.trim()),
    }));
    expect(rows.map(({ trials }) => trials)).toEqual([10, 16, 30, 50, 100]);
    for (const { trials, cells } of rows) {
      const found = [clopperPearson, wilsonInterval, midPInterval].flatMap((interval) => {
        const coverage = coverageOf((k) => interval(k, trials, 0.95), trials);
        return [least(coverage).toFixed(3), mean(coverage).toFixed(3)];
      });
      expect(cells, `${trials} trials`).toEqual(found);
    }
  });
});
