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

/** Where the bars that count towards a finding begin: at a limit, or at two ends as far from the middle as each other. */
export type DistributionEdges = {
  readonly limit?: number;
  readonly beyond?: { readonly low: number; readonly high: number };
};

/**
 * The part of a distribution worth drawing: tails below a thousandth of the peak are cut off, but never the
 * observed count or an edge, and neighbours are taken together when more than 96 bars would be left. A bar never
 * straddles an edge.
 *
 * @param counts ascending by count
 */
export function distributionBars(
  counts: readonly CountChance[],
  observed: number,
  { limit, beyond }: DistributionEdges,
): ShownDistribution {
  const peak = Math.max(0, ...counts.map((entry) => entry.chance));
  const never = [observed, limit, beyond?.low, beyond?.high];
  const isWorthDrawing = (entry: CountChance) => entry.chance >= peak * leastShareOfPeak || never.includes(entry.count);
  const first = Math.max(0, counts.findIndex(isWorthDrawing) - 1);
  const last = Math.min(counts.length - 1, counts.findLastIndex(isWorthDrawing) + 1);
  const shown = counts.slice(first, last + 1);
  const isBeyond = ({ count }: CountChance) =>
    (limit !== undefined && count >= limit) || (beyond !== undefined && (count <= beyond.low || count >= beyond.high));
  return {
    bars: takeTogether(shown, isBeyond),
    below: sumOf(counts.slice(0, first)),
    above: sumOf(counts.slice(last + 1)),
  };
}

function takeTogether(counts: readonly CountChance[], isBeyond: (entry: CountChance) => boolean): DistributionBar[] {
  const width = Math.ceil(counts.length / mostBars);
  const edges = counts.flatMap((entry, index) => {
    const before = counts[index - 1];
    return before !== undefined && isBeyond(before) !== isBeyond(entry) ? [index] : [];
  });
  const starts = startsOf(edges, counts.length, width);
  return starts.flatMap((start, index) => {
    const group = counts.slice(start, starts[index + 1] ?? counts.length);
    const [lowest] = group;
    const highest = group.at(-1);
    if (lowest === undefined || highest === undefined) return [];
    return [{ from: lowest.count, to: highest.count, chance: sumOf(group), isBeyond: isBeyond(lowest) }];
  });
}

/** Groups of one width between the edges; the odd rest goes to the far end of the first part, where chances are least. */
function startsOf(edges: readonly number[], end: number, width: number): number[] {
  const bounds = [0, ...edges, end];
  return bounds.slice(0, -1).flatMap((from, part) => {
    const to = bounds[part + 1] ?? end;
    const lead = part === 0 && edges.length > 0 ? (to - from) % width : 0;
    return [...(lead > 0 ? [from] : []), ...everyNth(from + lead, to, width)];
  });
}

function everyNth(from: number, end: number, step: number): number[] {
  return Array.from({ length: Math.max(0, Math.ceil((end - from) / step)) }, (_, index) => from + index * step);
}

function sumOf(counts: readonly CountChance[]): number {
  return counts.reduce((sum, entry) => sum + entry.chance, 0);
}
