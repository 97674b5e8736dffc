/** A value at a frequency in Hz above 0. */
export interface ValueAt {
  readonly frequency: number;
  readonly value: number;
}

/**
 * A value between measured ones, in a straight line over the logarithm of frequency; beyond the ends that of the end.
 *
 * @param points by frequency, ascending, at least one
 * @throws RangeError without a point
 * @example valueAt([{ frequency: 100, value: 1 }, { frequency: 10_000, value: 3 }], 1000) // 2
 */
export function valueAt(points: readonly ValueAt[], frequency: number): number {
  const [first] = points;
  const last = points.at(-1);
  if (first === undefined || last === undefined) throw new RangeError('there must be at least one point');
  if (frequency <= first.frequency) return first.value;
  if (frequency >= last.frequency) return last.value;
  const above = points.findIndex((point) => point.frequency >= frequency);
  const [from, to] = [points[above - 1] ?? first, points[above] ?? last];
  if (to.frequency === from.frequency) return to.value;
  const share = Math.log(frequency / from.frequency) / Math.log(to.frequency / from.frequency);
  return from.value + share * (to.value - from.value);
}
