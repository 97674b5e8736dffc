export type CountChance = { count: number; chance: number };

/** One bar: a count, or several neighbouring ones where there are too many to draw. */
export type DistributionBar = { from: number; to: number; chance: number; isBeyond: boolean };

export type ShownDistribution = {
  bars: DistributionBar[];
  /** Chance of what lies left and right of the bars shown. */
  below: number;
  above: number;
};

const mostBars = 96;
const leastShareOfPeak = 0.001;

/**
 * The part of a distribution worth drawing: tails below a thousandth of the peak are cut off, but never the
 * observed count or the limit, and neighbours are taken together when more than 96 bars would be left. A bar
 * never straddles the limit.
 *
 * @param counts ascending by count
 */
export function distributionBars(
  counts: readonly CountChance[],
  observed: number,
  limit: number | undefined,
): ShownDistribution {
  const peak = Math.max(0, ...counts.map((entry) => entry.chance));
  const isWorthDrawing = (entry: CountChance) =>
    entry.chance >= peak * leastShareOfPeak || entry.count === observed || entry.count === limit;
  const first = Math.max(0, counts.findIndex(isWorthDrawing) - 1);
  const last = Math.min(counts.length - 1, counts.findLastIndex(isWorthDrawing) + 1);
  const shown = counts.slice(first, last + 1);
  return {
    bars: takeTogether(shown, limit),
    below: sumOf(counts.slice(0, first)),
    above: sumOf(counts.slice(last + 1)),
  };
}

function takeTogether(counts: readonly CountChance[], limit: number | undefined): DistributionBar[] {
  const width = Math.ceil(counts.length / mostBars);
  const limitIndex = limit === undefined ? -1 : counts.findIndex((entry) => entry.count >= limit);
  const lead = limitIndex > 0 ? limitIndex % width : 0;
  const starts = [...(lead > 0 ? [0] : []), ...everyNth(lead, counts.length, width)];
  return starts.flatMap((start, index) => {
    const group = counts.slice(start, starts[index + 1] ?? counts.length);
    const from = group[0]?.count;
    const to = group.at(-1)?.count;
    if (from === undefined || to === undefined) return [];
    return [{ from, to, chance: sumOf(group), isBeyond: limit !== undefined && from >= limit }];
  });
}

function everyNth(from: number, end: number, step: number): number[] {
  return Array.from({ length: Math.max(0, Math.ceil((end - from) / step)) }, (_, index) => from + index * step);
}

function sumOf(counts: readonly CountChance[]): number {
  return counts.reduce((sum, entry) => sum + entry.chance, 0);
}
