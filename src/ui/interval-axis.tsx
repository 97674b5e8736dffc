import { niceTicks } from './nice-ticks.ts';

type IntervalAxisProps = {
  from: number;
  to: number;
  shareOf: (value: number) => number;
  quantity: string;
  format: (value: number) => string;
};

export function IntervalAxis({ from, to, shareOf, quantity, format }: IntervalAxisProps) {
  return (
    <tr className="text-soft">
      <td />
      <td className="px-3">
        <div className="@container relative h-8 border-t border-ink font-mono">
          {niceTicks(from, to, 6).map((tick) => (
            <span
              key={tick}
              className="absolute top-1 -translate-x-1/2 whitespace-nowrap @max-[14rem]:not-first:not-last:hidden"
              style={{ left: `${shareOf(tick) * 100}%` }}
            >
              {format(tick)}
            </span>
          ))}
        </div>
        <div className="text-center">{quantity}</div>
      </td>
      <td />
      <td className="max-md:hidden" />
    </tr>
  );
}
