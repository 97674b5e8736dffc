import { niceTicks } from './nice-ticks.ts';

/**
 * Which bars of counts are labelled, and with what: by the bar's first count, a whole number that lies in the bar. Counts
 * may have gaps; a figure that no bar holds is left out.
 *
 * @param bars ascending
 */
export function countTicks(bars: readonly { from: number; to: number }[], atMost: number): Map<number, number> {
  const ticks = niceTicks(bars[0]?.from ?? 0, bars.at(-1)?.to ?? 0, atMost, 1);
  return new Map(
    ticks.flatMap((tick): [number, number][] => {
      const bar = bars.find(({ from, to }) => from <= tick && tick <= to);
      return bar === undefined ? [] : [[bar.from, tick]];
    }),
  );
}
