import { balancedBlock } from '#shared/statistics/balanced-block.ts';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { fisherExactTest, type TwoByTwo } from '#shared/statistics/fisher-exact.ts';
import { permutedBlocksTest } from '#shared/statistics/permuted-blocks.ts';
import { runsTest } from '#shared/statistics/runs-test.ts';
import { trendTest } from '#shared/statistics/trend-test.ts';
import type { Mapping } from './check-records.ts';
import { of } from './inputs.ts';

/** Functions of the check values about orders, tables and checks of a session. */
export const orderMappings: { readonly [fn: string]: Mapping } = {
  randomisationExact: of<{ responses: (string | number)[]; blocks: Record<string, number>[]; observedCorrect: number }>(
    ({ responses, blocks, observedCorrect }) => {
      const labels = Object.keys(blocks[0] ?? {});
      let from = 0;
      const permuted = blocks.map((block) => {
        const presented = labels.map((label) => block[label] ?? 0);
        const own = responses.slice(from, from + presented.reduce((sum, count) => sum + count, 0));
        from += own.length;
        return {
          presented,
          answered: labels.map((label) => own.filter((response) => String(response) === label).length),
        };
      });
      const { p, pFraction, nullDistribution, mean, variance } = permutedBlocksTest(permuted, observedCorrect);
      const coins = { numerator: 1, denominator: labels.length };
      return {
        relative: {
          nullPmf: nullDistribution,
          pUpper: p,
          pUpperIfBinomial: binomialTest(observedCorrect, responses.length, coins, 'greater').p,
        },
        scaled: { mean, variance },
        exact: { pUpperFraction: `${pFraction.numerator}/${pFraction.denominator}` },
      };
    },
  ),

  balancedBlockClosedForm: of<{ n: number; trueA: number; responseA: number }>(({ n, trueA, responseA }) => {
    const { support, probabilities, mean, variance, coinVariance } = balancedBlock(n, trueA, responseA);
    return {
      exact: { support },
      relative: { pmf: probabilities },
      scaled: { mean, variance, binomialVariance: coinVariance },
    };
  }),

  runsTestExact: of<{ correct: number; wrong: number; runs: number }>(({ correct, wrong, runs }) => {
    const { pFew, pMany, pTwoSided, mean, variance } = runsTest(correct, wrong, runs);
    return { relative: { pFew, pMany, pTwoSided }, scaled: { mean, variance } };
  }),

  twoByTwo: of<{ table: TwoByTwo }>(({ table }) => ({
    relative: {
      fisherTwoSided: fisherExactTest(table, 'two-sided').p,
      fisherGreater: fisherExactTest(table, 'greater').p,
    },
  })),

  trendTest: of<{ x: number[]; n: number[]; scores: number[] }>(({ x, n, scores }) => {
    const groups = x.map((successes, index) => ({ successes, trials: n[index] ?? 0, score: scores[index] ?? 0 }));
    const { statistic, p } = trendTest(groups);
    return { scaled: { chisq: statistic }, relative: { p } };
  }),
};
