import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { clopperPearson } from '#shared/statistics/clopper-pearson.ts';
import { criticalCount } from '#shared/statistics/critical-count.ts';
import { wilsonInterval } from '#shared/statistics/wilson.ts';

type Published = {
  topic: string;
  citation: string;
  item: string;
  published: number | null;
  tol: number;
  agrees: boolean;
};

const checks = JSON.parse(
  readFileSync(new URL('../../fixtures/reference/published-checks.json', import.meta.url), 'utf8'),
) as Published[];
const about = (topic: string) => checks.filter((check) => check.topic.startsWith(topic));
const partsOf = (item: string, pattern: RegExp) => {
  const parts = pattern.exec(item)?.slice(1).map(Number);
  if (parts === undefined) throw new Error(`"${item}" is not of the form ${pattern}`);
  return parts;
};
const third = { numerator: 1, denominator: 3 };
const smallestRight = ({ topic, item }: Published) => {
  const [trials = 0, alpha = 0] = partsOf(item, /^n=(\d+) alpha=([\d.]+)$/);
  return criticalCount(trials, topic.endsWith('triangle') ? third : evenChance, alpha)?.count ?? null;
};

// Each check carries its citation; the tables are those of ISO 10399, ISO 5495 and FAO V7180E.
describe('published values', () => {
  it('gives every cell of three published tables of the smallest number right [T23]', () => {
    const cells = about('critical').filter(({ agrees }) => agrees);
    expect(cells.length).toBe(377);
    expect(cells.filter((cell) => smallestRight(cell) !== cell.published)).toEqual([]);
  });

  // GOST ISO 10399-2015, table A.1: the copy repeats row 21 in row 22. Exact: P(X >= 15 | 22) = 0.0669 > .05.
  it('departs from row 22 of one copy, which repeats row 21 [T23]', () => {
    const row = about('critical').filter(({ agrees }) => !agrees);
    expect(row.map(({ item }) => item)).toEqual(['n=22 alpha=0.2', 'n=22 alpha=0.1', 'n=22 alpha=0.05']);
    expect(row.map(smallestRight)).toEqual([14, 15, 16]);
    expect(row.map(({ published }) => published)).toEqual([13, 14, 15]);
    expect(binomialTest(15, 22, evenChance, 'greater').p).toBeCloseTo(0.0669, 4);
  });

  // Leventhal, J. Audio Eng. Soc. 34 (1986), 437-453: false alarms and misses of 15-trial tests.
  it('gives Leventhal’s risks of tests of 15 trials [T23]', () => {
    const risks = about('type').filter(({ item }) => item.startsWith('N=15'));
    expect(risks.length).toBe(44);
    for (const { item, published, tol } of risks) {
      const isMiss = item.includes('type II');
      const [trials = 0, right = 0, rate = 0.5] = partsOf(
        item,
        isMiss ? /^N=(\d+) r=(\d+) type II p=([\d.]+)$/ : /^N=(\d+) r=(\d+) type I$/,
      );
      const risk = isMiss
        ? binomialTest(right - 1, trials, rate, 'less').p
        : binomialTest(right, trials, evenChance, 'greater').p;
      expect(Math.abs(risk - Number(published)), item).toBeLessThanOrEqual(tol);
    }
  });

  // Newcombe, Statistics in Medicine 17 (1998), 857-872, table I.
  it('gives Newcombe’s Wilson and Clopper-Pearson limits [T23]', () => {
    const limits = about('intervals').filter(({ item }) => !item.includes('mid-P'));
    expect(limits.length).toBe(16);
    for (const { item, published, tol } of limits) {
      const [successes = 0, trials = 0] = partsOf(item, /^(\d+)\/(\d+) /);
      const interval = (item.includes('Wilson') ? wilsonInterval : clopperPearson)(successes, trials, 0.95);
      expect(
        Math.abs((item.endsWith('lo') ? interval.lower : interval.upper) - Number(published)),
        item,
      ).toBeLessThanOrEqual(tol);
    }
  });

  // Conover, Practical Nonparametric Statistics (1971), p. 97: Mendel's peas, 682 of 925 against 3/4.
  it('gives Conover’s p for Mendel’s peas [T23]', () => {
    expect(
      about('exact two-sided')
        .filter(({ citation }) => citation.startsWith('Conover'))
        .map(({ published }) => published),
    ).toEqual([0.3825]);
    expect(binomialTest(682, 925, { numerator: 3, denominator: 4 }, 'two-sided').p).toBeCloseTo(0.3825, 4);
  });
});
