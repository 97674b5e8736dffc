import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { balancedBlock } from '#shared/statistics/balanced-block.ts';
import { fisherExactTest } from '#shared/statistics/fisher-exact.ts';
import { type PermutedBlock, permutedBlocksTest } from '#shared/statistics/permuted-blocks.ts';
import { runsTest } from '#shared/statistics/runs-test.ts';
import { signTest } from '#shared/statistics/sign-test.ts';
import { trendTest } from '#shared/statistics/trend-test.ts';

/** Every order of a multiset of labels. */
function ordersOf(counts: readonly number[]): number[][] {
  if (counts.every((count) => count === 0)) return [[]];
  return counts.flatMap((count, label) =>
    count === 0
      ? []
      : ordersOf(counts.map((each, index) => (index === label ? each - 1 : each))).map((rest) => [label, ...rest]),
  );
}

const block = fc
  .tuple(fc.array(fc.nat(3), { minLength: 2, maxLength: 3 }), fc.infiniteStream(fc.nat(100)))
  .filter(([presented]) => presented.some((count) => count > 0))
  .map(([presented, stream]): PermutedBlock => {
    const answered = presented.map(() => 0);
    for (let left = presented.reduce((sum, count) => sum + count, 0); left > 0; left--) {
      const label = (stream.next().value ?? 0) % presented.length;
      answered[label] = (answered[label] ?? 0) + 1;
    }
    return { presented, answered };
  });

describe('permuted blocks', () => {
  // Fisher, The Design of Experiments (1935), ch. II; the fractions of 12 of 16 by enumeration.
  it('give 1/70 for eight of eight cups, and more than coins for 12 of 16 [T32]', () => {
    const text = (blocks: PermutedBlock[], matching: number) => {
      const { numerator, denominator } = permutedBlocksTest(blocks, matching).pFraction;
      return `${numerator}/${denominator}`;
    };
    const even = (half: number, times: number) =>
      Array.from({ length: times }, () => ({ presented: [half, half], answered: [half, half] }));
    expect(text(even(4, 1), 8)).toBe('1/70');
    expect(text(even(8, 1), 12)).toBe('283/4290');
    expect(text(even(2, 4), 12)).toBe('13/144');
    expect(text(even(1, 8), 12)).toBe('37/256');
  });

  it('agree with counting every order, and do not depend on what the labels are called [T32] [T35]', () => {
    fc.assert(
      fc.property(block, fc.nat(9), (each, wanted) => {
        const answers = each.answered.flatMap((count, label) => new Array<number>(count).fill(label));
        const matching = Math.min(wanted, answers.length);
        const orders = ordersOf(each.presented);
        const extreme = orders.filter(
          (order) => order.filter((label, index) => label === answers[index]).length >= matching,
        );
        const { p, nullDistribution } = permutedBlocksTest([each], matching);
        expect(p).toBeCloseTo(extreme.length / orders.length, 14);
        expect(nullDistribution.reduce((sum, chance) => sum + chance, 0)).toBeCloseTo(1, 12);
        const renamed = { presented: each.presented.toReversed(), answered: each.answered.toReversed() };
        expect(permutedBlocksTest([renamed], matching).pFraction).toEqual(
          permutedBlocksTest([each], matching).pFraction,
        );
      }),
    );
  });

  it('do not depend on their order [T35]', () => {
    fc.assert(
      fc.property(fc.array(block, { minLength: 1, maxLength: 4 }), (blocks) => {
        const same = blocks.filter(({ presented }) => presented.length === blocks[0]?.presented.length);
        expect(permutedBlocksTest(same, 1).pFraction).toEqual(permutedBlocksTest(same.toReversed(), 1).pFraction);
      }),
    );
  });

  it('of two labels in one block have a closed form, and Fisher’s exact p [T32]', () => {
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 40 }), fc.nat(40), fc.nat(40), fc.nat(40), (trials, m, r, h) => {
        const [presented, answered] = [m % (trials + 1), r % (trials + 1)];
        const { support, probabilities, mean, variance } = balancedBlock(trials, presented, answered);
        const matching = support[h % support.length] ?? 0;
        const counted = permutedBlocksTest(
          [{ presented: [presented, trials - presented], answered: [answered, trials - answered] }],
          matching,
        );
        expect(counted.mean).toBeCloseTo(mean, 10);
        expect(counted.variance).toBeCloseTo(variance, 10);
        for (const [index, count] of support.entries())
          expect(counted.nullDistribution[count]).toBeCloseTo(probabilities[index] ?? Number.NaN, 14);
        const both = (matching - trials + presented + answered) / 2;
        const table = [
          [both, presented - both],
          [answered - both, trials - presented - answered + both],
        ] as const;
        expect(fisherExactTest(table, 'greater').pFraction).toEqual(counted.pFraction);
      }),
    );
  });
});

describe('checks of a session', () => {
  it('counts runs as every order gives them [T33]', () => {
    for (const [right, wrong] of [
      [4, 5],
      [1, 7],
      [6, 0],
      [3, 3],
    ] as const) {
      const runsOf = (order: readonly number[]) =>
        order.filter((answer, index) => index === 0 || answer !== order[index - 1]).length;
      const all = ordersOf([right, wrong]).map(runsOf);
      for (const runs of new Set(all)) {
        const { pFew, pMany, pTwoSided } = runsTest(right, wrong, runs);
        expect(pFew).toBeCloseTo(all.filter((count) => count <= runs).length / all.length, 14);
        expect(pMany).toBeCloseTo(all.filter((count) => count >= runs).length / all.length, 14);
        expect(pTwoSided).toBe(Math.min(1, 2 * Math.min(pFew, pMany)));
        expect(runsTest(wrong, right, runs).pFew).toBe(pFew);
      }
      expect(runsTest(right, wrong, 1 + (wrong > 0 ? 1 : 0)).mean).toBeCloseTo(
        all.reduce((sum, runs) => sum + runs, 0) / all.length,
        12,
      );
    }
  });

  it('sees the same trend on any scale, in either direction, and none in all right [T33] [T35]', () => {
    const groups = [5, 8, 9, 12].map((successes, index) => ({ successes, trials: 15, score: index + 1 }));
    const { statistic, p } = trendTest(groups);
    expect(p).toBeCloseTo(0.010370404073533115, 12);
    for (const [factor, shift] of [
      [-1, 0],
      [10, 1e6],
    ] as const) {
      const moved = groups.map((group) => ({ ...group, score: group.score * factor + shift }));
      expect(trendTest(moved).statistic).toBeCloseTo(statistic, 8);
    }
    expect(trendTest(groups.map((group) => ({ ...group, successes: 15 })))).toEqual({ statistic: 0, p: 1 });
  });

  it('takes tables that are equally likely as equally extreme, whichever way they are turned [T33] [T35]', () => {
    expect(
      fisherExactTest(
        [
          [3, 1],
          [1, 3],
        ],
        'two-sided',
      ).pFraction,
    ).toEqual({ numerator: 17n, denominator: 35n });
    fc.assert(
      fc.property(fc.nat(20), fc.nat(20), fc.nat(20), fc.nat(20), (a, b, c, d) => {
        const p = fisherExactTest(
          [
            [a, b],
            [c, d],
          ],
          'two-sided',
        ).pFraction;
        expect(
          fisherExactTest(
            [
              [b, a],
              [d, c],
            ],
            'two-sided',
          ).pFraction,
        ).toEqual(p);
        expect(
          fisherExactTest(
            [
              [a, c],
              [b, d],
            ],
            'two-sided',
          ).pFraction,
        ).toEqual(p);
        expect(
          fisherExactTest(
            [
              [c, d],
              [a, b],
            ],
            'two-sided',
          ).pFraction,
        ).toEqual(p);
      }),
    );
  });

  // R 4.2.2: binom.test(4, 5)$p.value
  it('leaves ties out of the sign test, and turns with the sign [T33] [T35]', () => {
    expect(signTest([3, 1, 2, 5, 0, -1])).toMatchObject({ above: 4, below: 1, ties: 1, p: 0.375 });
    expect(signTest([-3, -1, -2, -5, 0, 1]).p).toBe(0.375);
    expect(signTest([]).p).toBe(1);
  });
});
