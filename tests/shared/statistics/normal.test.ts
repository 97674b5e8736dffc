import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type AbxModel, abxCorrectRate, abxDPrime, abxDPrimeEstimate } from '#shared/statistics/d-prime.ts';
import { normalQuantile } from '#shared/statistics/normal-quantile.ts';
import { normalAreaFromCentre, normalLogUpperTail, normalUpperTail } from '#shared/statistics/normal-tail.ts';
import { expectClose, reference } from '../../support/reference.ts';

const models: AbxModel[] = ['differencing', 'independent'];

describe('the normal distribution', () => {
  it('has the tails and logarithms of a 40-figure calculation, down to 1e-315 [T14]', () => {
    type Expected = { lower: number; upper: number; logLower: number; logUpper: number };
    for (const { id, fn, inputs, expected, tol } of reference<{ z: number }, Expected>(
      'special-functions.json',
      'normalTail',
    )) {
      if (fn !== 'normalTail') continue;
      expectClose(normalUpperTail(inputs.z), expected.upper, tol, 0, id);
      expectClose(normalUpperTail(-inputs.z), expected.lower, tol, 0, id);
      expectClose(normalLogUpperTail(inputs.z), expected.logUpper, tol, 0, id);
      expectClose(normalLogUpperTail(-inputs.z), expected.logLower, tol, 0, id);
    }
  });

  it('has the quantiles of a 40-figure calculation from 1e-300 to 1 - 1e-10 [T12]', () => {
    for (const { id, fn, inputs, expected, tol } of reference<{ p: number }, { z: number }>(
      'special-functions.json',
      'normalQuantile',
    ))
      if (fn === 'normalQuantile') expectClose(normalQuantile(inputs.p), expected.z, tol, 1, id);
    expect(Object.is(normalQuantile(0.5), 0)).toBe(true);
    expect(Number.isFinite(normalQuantile(Number.MIN_VALUE))).toBe(true);
    expect(() => normalQuantile(1)).toThrow(RangeError);
  });

  it('joins its two methods without a step, and adds up to one [T14]', () => {
    fc.assert(
      fc.property(fc.double({ min: -8, max: 8, noNaN: true }), (z) => {
        expect(normalUpperTail(z) + normalUpperTail(-z)).toBeCloseTo(1, 14);
        expect(normalAreaFromCentre(z)).toBeCloseTo(0.5 - normalUpperTail(z), 14);
      }),
    );
    expectClose(normalUpperTail(1.25), normalUpperTail(1.25 + 1e-13), 1e-12, 0, 'at the handover');
  });
});

describe('d′ of ABX', () => {
  it('has the Clopper-Pearson limits taken through the inverse as its interval [T15]', () => {
    type Inputs = { method: string; k: number; n: number; conf: number };
    type Expected = { dPrime: number | string; exactInterval: [number | string, number | string] };
    for (const { id, inputs, expected, tol } of reference<Inputs, Expected>('d-prime-estimates.json')) {
      const model = inputs.method === 'abxDifferencing' ? 'differencing' : 'independent';
      const { dPrime, interval } = abxDPrimeEstimate(inputs.k, inputs.n, inputs.conf, model);
      expectClose(dPrime, expected.dPrime, tol, 1, id);
      expectClose(interval.lower, expected.exactInterval[0], tol, 1, id);
      expectClose(interval.upper, expected.exactInterval[1], tol, 1, id);
    }
  });

  it('is 0 at and below guessing, and without an upper limit when all are right [T15]', () => {
    for (const model of models) {
      expect(abxDPrime(0.3, model)).toBe(0);
      expect(abxDPrime(0.5, model)).toBe(0);
      expect(abxDPrimeEstimate(16, 16, 0.95, model).dPrime).toBe(Number.POSITIVE_INFINITY);
      expect(abxDPrimeEstimate(16, 16, 0.95, model).interval.upper).toBe(Number.POSITIVE_INFINITY);
      expect(abxDPrimeEstimate(0, 16, 0.95, model)).toMatchObject({ dPrime: 0, interval: { lower: 0 } });
    }
  });

  it('comes back from the rate that it gives, and is smaller under independent observation [T7]', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.05, max: 8, noNaN: true }), fc.constantFrom(...models), (dPrime, model) => {
        expectClose(abxDPrime(abxCorrectRate(dPrime, model), model), dPrime, 1e-7, 1, `${dPrime} ${model}`);
      }),
    );
    expect(abxDPrime(0.75, 'independent')).toBeLessThan(abxDPrime(0.75, 'differencing'));
  });
});
