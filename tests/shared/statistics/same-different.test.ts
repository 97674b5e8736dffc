import fc from 'fast-check';
import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { describe, expect, it } from 'vitest';
import { ownDrawLimits } from '#shared/findings/rate-limits.ts';
import { assignmentTest } from '#shared/statistics/assignment-test.ts';
import { fractionToNumber } from '#shared/statistics/fraction.ts';
import {
  sameDifferentLimits,
  sameDifferentPlan,
  sameDifferentPower,
  sameDifferentSensitivity,
} from '#shared/statistics/same-different.ts';
import { sameDifferentGroupFindings } from '#shared/statistics/same-different-group-power.ts';
import { expectClose, reference } from '../../support/reference.ts';

const records = <I, E>(fn: string) => reference<I, E>('same-different.json').filter((record) => record.fn === fn);

describe('the test over assignments', () => {
  it('gives the p that R counts over every choice of trials [H2]', () => {
    type Inputs = { different: number[]; isDifferent: number[] };
    type Expected = { hits: number; upper: number; lower: number; assignments: number };
    const found = records<Inputs, Expected>('assignmentTest');
    expect(found.length).toBeGreaterThan(20);
    for (const { id, inputs, expected, tol } of found) {
      const trials = inputs.different.map((different, index) => ({
        different,
        isDifferent: inputs.isDifferent[index] === 1,
      }));
      const test = assignmentTest(trials);
      expect(test.hits, id).toBe(expected.hits);
      expect(test.assignments, id).toBe(BigInt(expected.assignments));
      expectClose(fractionToNumber(test.upperTail), expected.upper, tol, 0, id);
      expectClose(fractionToNumber(test.lowerTail), expected.lower, tol, 0, id);
    }
  });

  it('is p = 1 without different trials, without same ones, and without any [H2]', () => {
    const one = { numerator: 1n, denominator: 1n };
    for (const isDifferent of [true, false])
      expect(assignmentTest([3, 0, 1].map((different) => ({ different, isDifferent }))).upperTail).toEqual(one);
    expect(assignmentTest([]).upperTail).toEqual(one);
  });

  // By enumeration: over all assignments of one kind's number, whatever the answers, p is at most the level as often at most.
  it('has no size above the level, over all assignments of whole trials [H3]', () => {
    fc.assert(
      fc.property(
        fc.array(fc.integer({ min: 0, max: 4 }), { minLength: 1, maxLength: 9 }),
        fc.constantFrom(0.05, 0.1, 0.25),
        (weights, alpha) => {
          let significant = 0;
          for (let draw = 0; draw < 2 ** weights.length; draw++) {
            const { upperTail } = assignmentTest(
              weights.map((different, index) => ({ different, isDifferent: ((draw >> index) & 1) === 1 })),
            );
            if (fractionToNumber(upperTail) <= alpha) significant++;
          }
          expect(significant / 2 ** weights.length).toBeLessThanOrEqual(alpha);
        },
      ),
      { numRuns: 25 },
    );
  });

  // One listener, n to 100: given the numbers of different trials and of "different" answers, the hits are hypergeometric.
  it('has no size above the level for one listener at any n up to 100, by enumeration over the tables [H3]', () => {
    for (const n of [5, 8, 12, 16, 20, 30, 40, 60, 80, 100])
      for (const m of new Set([1, 2, Math.floor(n / 3), Math.floor(n / 2), n - 1]))
        for (const said of new Set([0, 1, Math.floor(n / 4), Math.floor(n / 2), n - 2, n])) {
          const least = Math.max(0, said - (n - m));
          const trials = Array.from({ length: n }, (_, index) => ({
            different: index < least || (index >= m && index < m + said - least) ? 1 : 0,
            isDifferent: index < m,
          }));
          const { ways, assignments } = assignmentTest(trials);
          for (const [numerator, denominator] of [
            [1n, 20n],
            [1n, 100n],
          ] as const) {
            let tail = 0n;
            let size = 0n;
            for (const { count } of ways.toReversed()) {
              tail += count;
              if (tail * denominator <= numerator * assignments) size = tail;
            }
            expect(size * denominator <= numerator * assignments).toBe(true);
          }
          expect(ways.reduce((sum, { count }) => sum + count, 0n)).toBe(assignments);
        }
  });
});

describe('d′ of same-different', () => {
  it('is the maximum-likelihood estimate, with its criterion [H5]', () => {
    type Inputs = Record<
      'sameAnswersOnSame' | 'differentAnswersOnSame' | 'sameAnswersOnDifferent' | 'differentAnswersOnDifferent',
      number
    >;
    for (const { id, inputs, expected, tol } of records<Inputs, { tau: number; dPrime: number }>(
      'sameDifferentDifferencing',
    )) {
      const { dPrime, criterion } = sameDifferentSensitivity(
        {
          count: inputs.differentAnswersOnDifferent,
          trials: inputs.differentAnswersOnDifferent + inputs.sameAnswersOnDifferent,
        },
        { count: inputs.differentAnswersOnSame, trials: inputs.differentAnswersOnSame + inputs.sameAnswersOnSame },
      );
      expectClose(dPrime, expected.dPrime, tol, 1, id);
      expectClose(criterion, expected.tau, tol, 1, id);
    }
  });

  it('has limits around it that missing answers only widen, and ends where a rate has none [H5]', () => {
    const rated = fc.integer({ min: 1, max: 30 }).chain((trials) =>
      fc.integer({ min: 0, max: trials }).chain((count) =>
        fc.record({
          count: fc.constant(count),
          trials: fc.constant(trials),
          missing: fc.integer({ min: 0, max: trials - count }),
        }),
      ),
    );
    fc.assert(
      fc.property(rated, rated, (hits, falseAlarms) => {
        const limits = sameDifferentLimits(limitsOf(hits, falseAlarms), 0.95);
        const whole = sameDifferentLimits(limitsOf({ ...hits, missing: 0 }, { ...falseAlarms, missing: 0 }), 0.95);
        const { dPrime } = sameDifferentSensitivity(hits, falseAlarms);
        expect(limits.lower).toBeLessThanOrEqual(whole.lower);
        expect(limits.upper).toBeGreaterThanOrEqual(whole.upper);
        expect(dPrime).toBeGreaterThanOrEqual(whole.lower);
        expect(dPrime).toBeLessThanOrEqual(whole.upper);
      }),
    );
    const clean = sameDifferentSensitivity({ count: 8, trials: 10 }, { count: 0, trials: 10 });
    expect(clean).toEqual({ dPrime: Number.POSITIVE_INFINITY, criterion: Number.POSITIVE_INFINITY });
    expect(() => sameDifferentSensitivity({ count: 3, trials: 2 }, { count: 0, trials: 1 })).toThrow(RangeError);
  });
});

type Rated = { count: number; trials: number; missing: number };
const limitsOf = (hits: Rated, falseAlarms: Rated) => {
  const of = ({ count, trials, missing }: Rated) => ownDrawLimits({ counted: count, missing, due: trials }).interval;
  return { hits: of(hits), falseAlarms: of(falseAlarms) };
};

describe('planning same-different', () => {
  // One listener's studies are found as often as the exact power says, within four standard deviations of 2000 studies.
  it('simulates a group by the registered test, which for one listener is the exact power [W1] [H6]', () => {
    const plan = { trials: 16, rate: 0.8, alpha: 0.05 };
    const findings = (listeners: number) => {
      const source = xoroshiro128plus(2139);
      return sameDifferentGroupFindings({ ...plan, listeners }, 2000, () => uniformFloat64(source)) / 2000;
    };
    expect(Math.abs(findings(1) - sameDifferentPower(16, 0.05, 0.8))).toBeLessThan(4 * Math.sqrt(0.24 / 2000));
    expect(findings(3)).toBeGreaterThan(findings(1));
  });

  it('has the power that R sums over every outcome [H6]', () => {
    type Inputs = { trials: number; alpha: number; hitRate: number };
    for (const { id, inputs, expected, tol } of records<Inputs, { power: number }>('sameDifferentPower'))
      expectClose(
        sameDifferentPower(inputs.trials, inputs.alpha, inputs.hitRate),
        expected.power,
        Math.max(tol, 1e-7),
        0,
        id,
      );
  });

  // R: choose(16, 8) = 12870
  it('fixes no number of hits, and knows the least p of all choices [H6]', () => {
    expect(sameDifferentPlan.critical(16, 0.05)).toBeNull();
    expect(sameDifferentPlan.leastPDenominator(16)).toBe(12870n);
    const { nFirst, nSafe } = sameDifferentPlan.needed(0.05, 0.8, 0.8);
    expect(nFirst).not.toBeNull();
    expect(sameDifferentPower((nFirst ?? 0) - 1, 0.05, 0.8)).toBeLessThan(0.8);
    for (let trials = nSafe ?? 0; trials < (nSafe ?? 0) + 30; trials++)
      expect(sameDifferentPower(trials, 0.05, 0.8)).toBeGreaterThanOrEqual(0.8);
  });
});
