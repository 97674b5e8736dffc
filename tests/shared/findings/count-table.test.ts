import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { ScoredTrial } from '#shared/methods/method.ts';
import { methods } from '#shared/methods/methods.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { countOutcomes } from '#shared/statistics/count-outcomes.ts';

const third = { numerator: 1, denominator: 3 };
const tableOf = (id: 'abx' | 'triangle' | 'paired-preference') => {
  const { counts } = methods[id].plan;
  if (counts === null) throw new Error(`${id} has no table`);
  return counts;
};
const endsOf = (question: Parameters<typeof countOutcomes>[0]) => {
  const ends = new Map<string, number>();
  for (const { to, outcome } of countOutcomes(question)) ends.set(outcome, to);
  return Object.fromEntries(ends);
};

const rowOf = {
  'below chance': '1',
  difference: '2',
  'small difference': '3',
  'below the margin': '4',
  inconclusive: '5',
} as const;
const context = {
  cables: ['One', 'Other'] as const,
  gate: { commitmentsHold: true, allTrialsAccounted: true, isBlind: true },
  endedEarly: null,
  setting: 'A rig.',
};

describe('what each count would mean', () => {
  // R: pbinom(2:3, 16, .5) .0021 .0106; pbinom(5:6, 16, .6) .0191 .0583; pbinom(10:11, 16, .5, FALSE) .1051 .0384
  it('of 16 answers changes at 3, 6 and 12 right [W7]', () => {
    const plain = { trials: 16, chance: evenChance, alpha: 0.05, margin: null };
    expect(endsOf(plain)).toEqual({ 'below chance': 2, inconclusive: 11, difference: 16 });
    expect(endsOf({ ...plain, margin: 0.2 })).toEqual({
      'below chance': 2,
      'below the margin': 5,
      inconclusive: 11,
      difference: 16,
    });
  });

  // R: pbinom(83:84, 200, .5) .0097 .0141; pbinom(118:119, 200, .65) .0453 .0609; pbinom(111:112, 200, .5, FALSE) .0518 .0384
  it('of 200 answers has differences that are small [W7]', () => {
    expect(endsOf({ trials: 200, chance: evenChance, alpha: 0.05, margin: 0.3 })).toEqual({
      'below chance': 83,
      'below the margin': 112,
      'small difference': 118,
      difference: 200,
    });
  });

  // R: pbinom(2:3, 18, 1/3) .0327 .1017 is too many, pbinom(1, 18, 1/3) .0068; pbinom(8:9, 18, 1/3, FALSE) .1076 .0433
  it('of a triangle goes by its own chance [W7]', () => {
    expect(endsOf({ trials: 18, chance: third, alpha: 0.05, margin: null })).toEqual({
      'below chance': 1,
      inconclusive: 9,
      difference: 18,
    });
  });

  it('has every count in exactly one range, and few of them [W7]', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 1200 }),
        fc.constantFrom(evenChance, third),
        fc.constantFrom(0.2, 0.05, 0.01, 0.001),
        fc.option(fc.integer({ min: 1, max: 90 })),
        (trials, chance, alpha, percent) => {
          const margin = percent === null ? null : percent / 100;
          const ranges = countOutcomes({ trials, chance, alpha, margin });
          expect(ranges[0]?.from).toBe(0);
          expect(ranges.at(-1)?.to).toBe(trials);
          for (const [index, { from, to }] of ranges.entries()) {
            expect(to).toBeGreaterThanOrEqual(from);
            if (index > 0) expect(from).toBe((ranges[index - 1]?.to ?? 0) + 1);
          }
          expect(ranges.length).toBeLessThan(20);
        },
      ),
      { numRuns: 100 },
    );
  });

  // R: pbinom(c(11, 12), 16, .5, FALSE) .0384 .0106; 2 * qbeta(c(.05, .95), c(12, 14), c(5, 3)) - 1 .0312 .8937
  it('gives p, effect and limits that R gives [W7]', () => {
    const row = tableOf('abx')
      .rows({ trials: 16, alpha: 0.05, margin: null })
      .find(({ from }) => from === 12);
    expect(row).toMatchObject({ from: 12, to: 13, finding: 'difference', share: [0.5, 0.625] });
    expect(row?.p[0]).toBeCloseTo(0.0384063720703, 12);
    expect(row?.p[1]).toBeCloseTo(0.0106353759766, 12);
    expect(row?.limits.lower).toBeCloseTo(0.0312071578127, 9);
    expect(row?.limits.upper).toBeCloseTo(0.8937080310347, 9);
    const open = tableOf('abx')
      .rows({ trials: 16, alpha: 0.05, margin: null })
      .find(({ to }) => to === 11);
    // R: 2 * qbeta(.95, 12, 5) - 1 is .7358
    expect(open?.maySay).toContain('up to 74% above guessing');
  });

  const plans: { trials: number; marginPercent?: number }[] = [
    { trials: 7 },
    { trials: 16 },
    { trials: 16, marginPercent: 20 },
    { trials: 23, marginPercent: 50 },
    { trials: 60, marginPercent: 40 },
  ];

  it('says of every count what the registered analysis comes to, and so the finding [W7]', () => {
    for (const id of ['abx', 'triangle', 'duo-trio', 'directional-comparison'] as const) {
      const method = methods[id];
      const { counts } = method.plan;
      if (counts === null) throw new Error(`${id} has no table`);
      for (const { trials, marginPercent } of plans) {
        const margin = marginPercent === undefined ? null : marginPercent / 100;
        const rows = counts.rows({ trials, alpha: 0.05, margin });
        for (let right = 0; right <= trials; right++) {
          const result = method.analyse(
            { analysis: registered(id, marginPercent), listenersPerSession: 1, attribute: 'bass' },
            answered(id, right, trials),
          );
          const row = rows.find(({ from, to }) => from <= right && right <= to);
          expect(method.finding(result, context).row, `${id} ${right}/${trials} ${marginPercent}`).toBe(
            rowOf[row?.finding as keyof typeof rowOf],
          );
        }
      }
    }
  });

  // R: binom.test(13, 16)$p.value .0213, binom.test(12, 16)$p.value .0768
  it('of a preference goes by both sides, and never calls one better [W7]', () => {
    const rows = tableOf('paired-preference').rows({ trials: 16, alpha: 0.05, margin: null });
    const findingAt = (count: number) => rows.find(({ from, to }) => from <= count && count <= to)?.finding;
    expect([3, 4, 12, 13].map(findingAt)).toEqual([
      'the other favoured',
      'no preference shown',
      'no preference shown',
      'this one favoured',
    ]);
    expect(rows.find(({ from }) => from === 13)?.p[0]).toBeCloseTo(0.0212707519531, 12);
    for (const { maySay } of rows) expect(maySay).not.toMatch(/is better|audible|proves/);
  });

  it('is not given where a count alone decides nothing [W7]', () => {
    expect(methods['same-different'].plan.counts).toBeNull();
    expect(methods['same-different'].plan.unfixed).not.toBeNull();
  });
});

describe('what a study leaves open that comes out as if there were nothing', () => {
  // R: 2 * qbeta(.95, 9, 8) - 1 is .4428; (qbeta(.95, 7, 12) - 1/3) * 1.5 is .3311; binom.test(8, 16)$conf.int[2] is .7535
  it('is the limit that R gives, rounded so that it claims less [W8]', () => {
    expect(methods.abx.plan.leftOpen(16, 0.05)).toContain('8 of 16 right');
    expect(methods.abx.plan.leftOpen(16, 0.05)).toContain('up to 45% is not excluded');
    expect(methods.triangle.plan.leftOpen(18, 0.05)).toContain('up to 34% is not excluded');
    expect(methods['paired-preference'].plan.leftOpen(16, 0.05)).toContain('up to 76% is not excluded');
    expect(methods['same-different'].plan.leftOpen(16, 0.05)).toMatch(/a d′ up to \d\.\d\d is not excluded/);
  });

  it('is the limit of the finding itself [W8]', () => {
    const result = methods.abx.analyse({ analysis: registered('abx'), listenersPerSession: 1 }, answered('abx', 8, 16));
    const { modifiers } = methods.abx.finding(result, context);
    expect(modifiers.join(' ')).toContain('An above-chance rate up to 45% is not excluded (one-sided 95% limit).');
  });
});

function registered(id: 'abx' | 'triangle' | 'duo-trio' | 'directional-comparison', marginPercent?: number) {
  return {
    ...methods[id].registered({ attribute: 'bass', marginPercent }),
    alpha: '0.05',
    stopping: 'fixed number of trials' as const,
    exclusions: 'none' as const,
  };
}

/** One listener's answers, so many of them right. */
function answered(id: keyof typeof methods, right: number, trials: number): ScoredTrial[] {
  const method = methods[id];
  const [truth] = method.truths;
  const { isRight } = method.trials;
  const options = method.options({ attribute: 'bass' }).map(({ value }) => value);
  const answer = (wanted: boolean) => options.find((value) => isRight?.(value, truth ?? '') === wanted) ?? null;
  return Array.from({ length: trials }, (_, index) => ({
    session: 1,
    trial: index + 1,
    truth: truth ?? '',
    answers: [{ listener: 'L01', choice: answer(index < right) }],
  }));
}
