import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { binomialLogProbability } from '#shared/statistics/binomial-log-probability.ts';
import { binomialLogLowerTail, binomialLogUpperTail } from '#shared/statistics/binomial-tails.ts';
import { type Alternative, binomialTest } from '#shared/statistics/binomial-test.ts';
import { type Chance, evenChance } from '#shared/statistics/chance.ts';
import { exactBinomialUpperTail } from '#shared/statistics/exact-binomial.ts';
import { fractionToLog, fractionToNumber } from '#shared/statistics/fraction.ts';
import { expectClose } from '../../support/reference.ts';

const alternatives: Alternative[] = ['greater', 'less', 'two-sided'];
const chances: fc.Arbitrary<Chance> = fc.constantFrom<Chance>(
  evenChance,
  { numerator: 1, denominator: 3 },
  { numerator: 1, denominator: 6 },
  0.6,
  0.05,
);
const outcome = fc
  .integer({ min: 1, max: 300 })
  .chain((trials) => fc.tuple(fc.integer({ min: 0, max: trials }), fc.constant(trials)));

describe('the exact binomial', () => {
  it('has two tails that overlap in one point: upper + lower - point = 1 [T1]', () => {
    fc.assert(
      fc.property(outcome, chances, ([successes, trials], chance) => {
        const upper = Math.exp(binomialLogUpperTail(successes, trials, chance));
        const lower = Math.exp(binomialLogLowerTail(successes, trials, chance));
        const point = Math.exp(binomialLogProbability(successes, trials, chance));
        expect(upper + lower - point).toBeCloseTo(1, 12);
      }),
    );
  });

  it('agrees with the sum in whole numbers at every count [T1]', () => {
    fc.assert(
      fc.property(outcome, chances, ([successes, trials], chance) => {
        const exact = exactBinomialUpperTail(successes, trials, chance);
        expectClose(binomialLogUpperTail(successes, trials, chance), fractionToLog(exact), 1e-12, 1, 'log tail');
      }),
    );
  });

  it('never gains likelihood from a better score: the upper tail falls with every right answer [T1]', () => {
    fc.assert(
      fc.property(outcome, chances, ([successes, trials], chance) => {
        const here = binomialLogUpperTail(successes, trials, chance);
        expect(binomialLogUpperTail(successes + 1, trials, chance)).toBeLessThan(here);
      }),
    );
  });

  // Counted by hand: C(12, 9) + C(12, 10) + C(12, 11) + C(12, 12) = 220 + 66 + 12 + 1 of 2^12.
  it('gives fair guesses as a fraction of whole numbers [T11]', () => {
    expect(exactBinomialUpperTail(9, 12, evenChance)).toEqual({ numerator: 299n, denominator: 4096n });
    expect(exactBinomialUpperTail(12, 16, evenChance)).toEqual({ numerator: 2517n, denominator: 65536n });
    expect(exactBinomialUpperTail(0, 16, evenChance)).toEqual({ numerator: 65536n, denominator: 65536n });
    expect(exactBinomialUpperTail(17, 16, evenChance).numerator).toBe(0n);
  });

  // Two of two at chance 1/3: P = 1/9; one of two is 4/9, as likely as none, which is 4/9 too: a tie, so p = 1.
  it('counts outcomes of equal likelihood as equally extreme [T1]', () => {
    const third = { numerator: 1, denominator: 3 };
    expect(binomialTest(2, 2, third, 'two-sided').p).toBeCloseTo(1 / 9, 14);
    expect(binomialTest(1, 2, third, 'two-sided').p).toBe(1);
    expect(binomialTest(0, 2, third, 'two-sided').p).toBe(1);
  });

  it('doubles the tail for a two-sided question at chance one half [T1]', () => {
    fc.assert(
      fc.property(outcome, ([successes, trials]) => {
        const tails = alternatives.map((alternative) => binomialTest(successes, trials, evenChance, alternative).p);
        const [greater = 1, less = 1, twoSided = 1] = tails;
        expectClose(twoSided, Math.min(1, 2 * Math.min(greater, less)), 1e-10, 0, `${successes}/${trials}`);
      }),
    );
  });

  it('is a number at both ends, for every alternative and 1 to 100000 trials [T10]', () => {
    for (const trials of [1, 2, 15, 16, 1000, 100_000])
      for (const successes of [0, 1, trials - 1, trials])
        for (const chance of [evenChance, 1e-9, 1 - 1e-9])
          for (const alternative of alternatives) {
            const { p, logP, midP } = binomialTest(successes, trials, chance, alternative);
            expect(p >= 0 && p <= 1 && midP >= 0 && midP <= 1, `${successes}/${trials} ${alternative}`).toBe(true);
            expect(Number.isFinite(logP)).toBe(true);
          }
  });

  // log P(X = 100000) = 100000 ln(1/3), to the last figure; e^-109861 is far below the smallest double.
  it('reaches tails of log p beyond -100000 [T1]', () => {
    const third = { numerator: 1, denominator: 3 };
    const all = binomialTest(100_000, 100_000, third, 'greater');
    expectClose(all.logP, -100_000 * Math.log(3), 1e-14, 1, 'all right');
    expect(all.p).toBe(0);
    const exact = exactBinomialUpperTail(4000, 5000, evenChance);
    expectClose(binomialTest(4000, 5000, evenChance, 'greater').logP, fractionToLog(exact), 1e-13, 1, '4000 of 5000');
    expectClose(binomialTest(4000, 5000, evenChance, 'greater').p, fractionToNumber(exact), 1e-12, 0, '4000 of 5000');
  });
});
