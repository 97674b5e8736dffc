import { describe, expect, it } from 'vitest';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { clopperPearson, type Interval } from '#shared/statistics/clopper-pearson.ts';
import { pOfShared } from '#shared/statistics/group-power.ts';
import { trialClusterInterval, twoWayClusterInterval } from '#shared/statistics/shared-cluster-interval.ts';
import { studiesWithoutHearing } from '../../support/shared-habits.ts';

// Panels that hear nothing and lean alike: 65 to 35 and 80 to 20 in each trial. Seeded; decision 4 tabulates longer runs.

const studies = 1000;
const level = 0.05;
/** What so many studies may lie off by chance, three standard deviations. */
const off = (share: number) => 3 * Math.sqrt((share * (1 - share)) / studies);

function simulate(leaning: number, trials: number, listeners: number) {
  const found = { registered: 0, binomial: 0, byTrials: 0, twoWay: 0, exact: 0 };
  const holds = (interval: Interval | null) => interval !== null && interval.lower <= 0.5 && 0.5 <= interval.upper;
  for (const { counts, answers, right } of studiesWithoutHearing({ trials, listeners, leaning }, studies, 1984)) {
    const all = trials * listeners;
    if (pOfShared(counts, 'greater') <= level) found.registered += 1;
    if (binomialTest(right, all, evenChance, 'greater').p <= level) found.binomial += 1;
    if (holds(trialClusterInterval(answers, 0.95).interval)) found.byTrials += 1;
    if (holds(twoWayClusterInterval(answers, 0.95).interval)) found.twoWay += 1;
    if (holds(clopperPearson(right, all, 0.95))) found.exact += 1;
  }
  return Object.fromEntries(Object.entries(found).map(([name, count]) => [name, count / studies])) as typeof found;
}

describe('a habit that a panel shares', () => {
  it('takes the registered test no further than its level, while a plain binomial finds what nobody hears [T42]', () => {
    for (const [leaning, listeners, pooled] of [
      [0.65, 10, 0.096],
      [0.65, 20, 0.139],
      [0.8, 4, 0.107],
      [0.8, 10, 0.213],
      [0.8, 20, 0.274],
    ] as const) {
      const { registered, binomial } = simulate(leaning, 16, listeners);
      expect(registered, `${leaning}, ${listeners}`).toBeLessThanOrEqual(level + off(level));
      expect(binomial, `${leaning}, ${listeners}`).toBeGreaterThan(level + off(level));
      expect(Math.abs(binomial - pooled), `${leaning}, ${listeners}`).toBeLessThan(2 * off(pooled));
    }
  });

  it('takes intervals over answers far from what they state, and leaves those over trials there [T42]', () => {
    for (const leaning of [0.65, 0.8]) {
      const { byTrials, twoWay, exact } = simulate(leaning, 16, 10);
      expect(byTrials).toBeGreaterThan(0.95 - off(0.95));
      expect(twoWay).toBeGreaterThan(0.95 - off(0.95));
      expect(exact).toBeLessThan(leaning === 0.8 ? 0.75 : 0.92);
    }
  });

  it('gives no interval of no width where every trial comes out alike, whatever the rate [T31] [T19]', () => {
    for (let listeners = 2; listeners <= 24; listeners += 1)
      for (let right = 0; right <= listeners; right += 1)
        for (const trials of [2, 5, 16]) {
          const answers = Array.from({ length: trials * listeners }, (_, index) => ({
            listener: `L${index % listeners}`,
            trial: `1/${Math.floor(index / listeners)}`,
            isRight: index % listeners < right,
          }));
          expect(trialClusterInterval(answers, 0.95).interval, `${right} of ${listeners}`).toBeNull();
        }
  });
});
