import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { countTicks } from '../../src/ui/count-ticks.ts';

const single = (counts: readonly number[]) => counts.map((count) => ({ from: count, to: count }));

describe('the labels under a distribution of counts', () => {
  it('are the counts themselves, however few there are', () => {
    expect([...countTicks(single([2, 3, 4, 5]), 8)]).toEqual([2, 3, 4, 5].map((count) => [count, count]));
    expect([...countTicks(single([4]), 8)]).toEqual([[4, 4]]);
  });

  it('leave out what no bar holds', () => {
    expect([...countTicks(single([2, 4, 6]), 8)].map(([, tick]) => tick)).toEqual([2, 4, 6]);
  });

  it('are whole, lie in their bar and stay within the number asked for', () => {
    const gaps = fc.array(fc.integer({ min: 1, max: 9 }), { minLength: 1, maxLength: 90 });
    fc.assert(
      fc.property(fc.nat(300), gaps, fc.integer({ min: 1, max: 5 }), (start, steps, width) => {
        const counts = [start];
        for (const step of steps) counts.push((counts.at(-1) ?? 0) + step);
        const bars = counts.flatMap((from, index) =>
          index % width === 0 ? [{ from, to: counts[Math.min(index + width, counts.length) - 1] ?? from }] : [],
        );
        const ticks = countTicks(bars, 8);
        expect(ticks.size).toBeLessThanOrEqual(8);
        for (const [from, tick] of ticks) {
          expect(Number.isInteger(tick)).toBe(true);
          const bar = bars.find((candidate) => candidate.from === from);
          expect(bar !== undefined && bar.from <= tick && tick <= bar.to).toBe(true);
        }
      }),
    );
  });
});
