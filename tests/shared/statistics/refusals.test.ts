import { describe, expect, it } from 'vitest';
import { balancedBlock } from '#shared/statistics/balanced-block.ts';
import { bayesFactor } from '#shared/statistics/bayes-factor.ts';
import { benjaminiHochberg } from '#shared/statistics/benjamini-hochberg.ts';
import { betaBinomialFit } from '#shared/statistics/beta-binomial.ts';
import { binomialCoefficient } from '#shared/statistics/binomial-coefficient.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { chiSquareUpperTail } from '#shared/statistics/chi-square-tail.ts';
import { clusterVariance } from '#shared/statistics/cluster-variance.ts';
import { equivalenceAboutHalf } from '#shared/statistics/equivalence.ts';
import { fisherExactTest } from '#shared/statistics/fisher-exact.ts';
import { heterogeneity, heterogeneityAboutChance } from '#shared/statistics/heterogeneity.ts';
import { listenerClusterInterval } from '#shared/statistics/listener-cluster-interval.ts';
import { midPInterval } from '#shared/statistics/mid-p-interval.ts';
import { permutedBlocksTest } from '#shared/statistics/permuted-blocks.ts';
import { prevalence } from '#shared/statistics/prevalence.ts';
import { runsTest } from '#shared/statistics/runs-test.ts';
import { trialClusterInterval, twoWayClusterInterval } from '#shared/statistics/shared-cluster-interval.ts';
import { signTest } from '#shared/statistics/sign-test.ts';
import { similarityCriticalCount, similarityPower, similarityTest } from '#shared/statistics/similarity.ts';
import { studentTQuantile } from '#shared/statistics/student-t-quantile.ts';
import { taroneTest } from '#shared/statistics/tarone.ts';
import { trendTest } from '#shared/statistics/trend-test.ts';

const none = Number.NaN;
const one = { successes: 1, trials: 2 };
const answer = { listener: 'L1', trial: '1', isRight: true };

const cases: [string, () => unknown][] = [
  ['a mid-P interval without trials', () => midPInterval(0, 0, 0.95)],
  ['a mid-P interval at confidence 1', () => midPInterval(1, 2, 1)],
  ['a margin of 0', () => similarityTest(1, 16, evenChance, 0)],
  ['a margin of 1', () => similarityCriticalCount(16, evenChance, 1, 0.05)],
  ['a NaN margin', () => similarityTest(1, 16, evenChance, none)],
  ['a true share of 1', () => similarityPower(16, evenChance, 0.2, 0.05, 1)],
  ['a margin of one half about one half', () => equivalenceAboutHalf(1, 2, 0.5)],
  ['a p above 1', () => benjaminiHochberg([1.1])],
  ['half a prior', () => bayesFactor(1, 2, evenChance, { a: 0.5, b: 1 })],
  ['more right than trials in a Bayes factor', () => bayesFactor(3, 2, evenChance, { a: 1, b: 1 })],
  ['a negative chi-square', () => chiSquareUpperTail(-1, 1)],
  ['no degrees of freedom', () => chiSquareUpperTail(1, 0)],
  ['a NaN chi-square', () => chiSquareUpperTail(none, 1)],
  ['a t tail of 0', () => studentTQuantile(0, 5)],
  ['half a degree of freedom', () => studentTQuantile(0.1, 0.5)],
  ['one listener who differs', () => heterogeneity([one])],
  ['no listener about chance', () => heterogeneityAboutChance([], evenChance)],
  ['a listener without trials', () => taroneTest([one, { successes: 0, trials: 0 }])],
  ['listeners with one trial each', () => taroneTest([1, 0].map((successes) => ({ successes, trials: 1 })))],
  ['one listener to fit', () => betaBinomialFit([one])],
  ['one cluster', () => clusterVariance([1], 2)],
  ['confidence 1 in a panel', () => listenerClusterInterval([one, one], 1)],
  ['a listener who answers a trial twice', () => trialClusterInterval([answer, answer], 0.95)],
  ['one trial', () => trialClusterInterval([answer, { ...answer, listener: 'L2' }], 0.95)],
  ['one listener two-way', () => twoWayClusterInterval([answer, { ...answer, trial: '2' }], 0.95)],
  ['a choice of half', () => binomialCoefficient(4, 0.5)],
  [
    'a negative count in a table',
    () =>
      fisherExactTest(
        [
          [1, -1],
          [1, 1],
        ],
        'greater',
      ),
  ],
  ['no block', () => permutedBlocksTest([], 0)],
  ['answers that do not fill the block', () => permutedBlocksTest([{ presented: [2, 2], answered: [2, 1] }], 1)],
  ['a block of one label', () => permutedBlocksTest([{ presented: [2], answered: [2] }], 1)],
  ['more presented than trials', () => balancedBlock(4, 5, 1)],
  ['one run of two kinds', () => runsTest(2, 2, 1)],
  ['more runs than answers', () => runsTest(2, 2, 5)],
  ['no answers to run', () => runsTest(0, 0, 1)],
  ['one group with a trend', () => trendTest([{ ...one, score: 1 }])],
  [
    'groups on one score',
    () =>
      trendTest([
        { ...one, score: 1 },
        { ...one, score: 1 },
      ]),
  ],
  ['a NaN difference', () => signTest([1, none])],
  ['a size of 0', () => prevalence(1, 2, 0, 0.95)],
  ['more significant than listeners', () => prevalence(3, 2, 0.05, 0.95)],
];

describe('an argument outside its domain', () => {
  it.each(cases)('is refused and never answered with NaN: %s [T10]', (_name, call) => {
    expect(call).toThrow(RangeError);
  });
});
