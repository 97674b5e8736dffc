import { classNames } from './class-names.ts';
import { niceTicks } from './nice-ticks.ts';

type IntervalAxisProps = {
  from: number;
  to: number;
  shareOf: (value: number) => number;
  quantity: string;
  format: (value: number) => string;
};

export function IntervalAxis({ from, to, shareOf, quantity, format }: IntervalAxisProps) {
  const ticks = niceTicks(from, to, 6);
  return (
    <tr className="text-soft">
      <td />
      <td className="px-3">
        <div className="relative h-8 border-t border-ink font-mono">
          {ticks.map((tick, index) => (
            <span
              key={tick}
              className={classNames(
                'absolute top-1 -translate-x-1/2 whitespace-nowrap',
                // A phone has room for the ends alone.
                index > 0 && index < ticks.length - 1 && 'max-sm:hidden',
              )}
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
