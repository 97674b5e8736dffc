import { IntervalAxis } from './interval-axis.tsx';
import { type IntervalEntry, IntervalRow } from './interval-row.tsx';

type IntervalChartProps = {
  /** Says what is compared: "Correct answers by listener, with 95 % intervals". */
  caption: string;
  /** What a row is: "Listener". */
  rowName: string;
  rows: readonly IntervalEntry[];
  /** The value that comes of nothing, such as guessing, and what it is called; null where there is none. */
  middle: { value: number; words: string } | null;
  /** What is measured, with its unit: "Correct answers out of 16". */
  quantity: string;
  /** The ends of the axis; from 0 to the highest end of an interval if left out. */
  domain?: readonly [number, number];
  /** How a value is written, a limit so that it claims less; as it is if left out. */
  format?: (value: number, rounding?: 'down' | 'up') => string;
};

/** Rows side by side: a point with its interval and the line of what comes of nothing. It is a table, so it reads as one. */
export function IntervalChart({
  caption,
  rowName,
  rows,
  middle,
  quantity,
  domain,
  format = (value) => String(value),
}: IntervalChartProps) {
  const [from, to] = domain ?? [0, Math.max(middle?.value ?? 0, ...rows.map((row) => row.high))];
  const shareOf = (value: number) => (Math.min(Math.max(value, from), to) - from) / (to - from || 1);
  const middleShare = middle === null ? null : shareOf(middle.value);
  return (
    <table className="w-full border-collapse">
      <caption className="sr-only">{caption}</caption>
      <thead>
        <tr className="align-bottom">
          <th scope="col" className="pr-4 pb-1 text-left font-semibold sm:pr-8">
            {rowName}
          </th>
          <td aria-hidden="true" className="relative h-9 w-full px-3 text-soft">
            <span className="absolute inset-x-3 bottom-1">
              {middle === null ? null : (
                <span className="relative block whitespace-nowrap" style={markAt(shareOf(middle.value))}>
                  {middle.words} {format(middle.value)}
                </span>
              )}
            </span>
          </td>
          <th scope="col" className="pb-1 pl-4 text-right font-semibold">
            <span className="sr-only">
              {quantity}
              {middle === null ? null : `; ${middle.words}: ${format(middle.value)}`}
            </span>
          </th>
          <th scope="col" className="max-md:sr-only md:pb-1 md:pl-6 md:text-right md:font-semibold">
            Interval
          </th>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <IntervalRow key={row.label} entry={row} shareOf={shareOf} middleShare={middleShare} format={format} />
        ))}
      </tbody>
      <tfoot aria-hidden="true">
        <IntervalAxis from={from} to={to} shareOf={shareOf} quantity={quantity} format={format} />
      </tfoot>
    </table>
  );
}

/** Centred on its line, but kept inside at either end. */
function markAt(share: number) {
  const percent = `${share * 100}%`;
  return { left: percent, width: 'max-content', transform: `translateX(-${percent})` };
}
