export type IntervalEntry = { label: string; value: number; low: number; high: number };

type IntervalRowProps = {
  entry: IntervalEntry;
  /** Where a value lies on the axis, 0 to 1. */
  shareOf: (value: number) => number;
  /** Where the line of what comes of nothing lies, 0 to 1; null for none. */
  middleShare: number | null;
  format: (value: number, rounding?: 'down' | 'up') => string;
};

export function IntervalRow({ entry, shareOf, middleShare, format }: IntervalRowProps) {
  const percent = (share: number) => `${share * 100}%`;
  const [low, value, high] = [percent(shareOf(entry.low)), percent(shareOf(entry.value)), percent(shareOf(entry.high))];
  return (
    <tr>
      <th scope="row" className="pr-4 text-left font-mono font-normal whitespace-nowrap sm:pr-8">
        {entry.label}
      </th>
      <td aria-hidden="true" className="h-12 w-full px-3">
        <svg aria-hidden="true" className="block h-12 w-full overflow-visible">
          {middleShare === null ? null : (
            <line
              x1={percent(middleShare)}
              x2={percent(middleShare)}
              y1="0"
              y2="100%"
              strokeDasharray="4 4"
              className="stroke-edge"
              strokeWidth="1.5"
            />
          )}
          <g className="stroke-ink" strokeWidth="2">
            <line x1={low} x2={high} y1="50%" y2="50%" />
            <line x1={low} x2={low} y1="36%" y2="64%" />
            <line x1={high} x2={high} y1="36%" y2="64%" />
          </g>
          <circle cx={value} cy="50%" r="6.5" className="fill-jacket stroke-page" strokeWidth="1.5" />
        </svg>
      </td>
      <td className="pl-4 text-right font-mono font-semibold whitespace-nowrap">{format(entry.value)}</td>
      <td className="max-md:sr-only md:pl-6 md:text-right md:font-mono md:whitespace-nowrap md:text-soft">
        {format(entry.low, 'down')} to {format(entry.high, 'up')}
      </td>
    </tr>
  );
}
