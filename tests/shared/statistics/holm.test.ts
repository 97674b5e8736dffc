import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { holm } from '#shared/statistics/holm.ts';

const pValues = fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { maxLength: 30 });

describe('Holm’s adjustment', () => {
  it('never lowers a p, never exceeds 1, and keeps their order [T6]', () => {
    fc.assert(
      fc.property(pValues, (values) => {
        const adjusted = holm(values);
        for (const [index, p] of values.entries()) {
          expect(adjusted[index]).toBeGreaterThanOrEqual(p);
          expect(adjusted[index]).toBeLessThanOrEqual(1);
          for (const [other, q] of values.entries())
            if (p < q) expect(adjusted[index]).toBeLessThanOrEqual(adjusted[other] ?? Number.NaN);
        }
      }),
    );
  });

  it('gives each listener the same p wherever they stand in the list [T6]', () => {
    fc.assert(
      fc.property(pValues, (values) => {
        expect(holm([...values].reverse()).reverse()).toEqual(holm(values));
      }),
    );
  });

  it('leaves a single p alone and an empty list empty [T6]', () => {
    expect(holm([0.04])).toEqual([0.04]);
    expect(holm([])).toEqual([]);
  });
});
