import { niceTicks } from './nice-ticks.ts';

type StripChartProps = {
  /** What is measured, with its unit; said below the axis. */
  quantity: string;
  rows: readonly { readonly label: string; readonly values: readonly number[] }[];
};

const width = 640;
const [left, right, rowHeight, top] = [12, 12, 58, 4] as const;
const meanOf = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;

/** Every value as a ring on its row's line, the mean as a stroke; rows one above the other on one axis. */
export function StripChart({ quantity, rows }: StripChartProps) {
  const all = rows.flatMap(({ values }) => values);
  if (all.length === 0) return null;
  const [least, most] = [Math.min(...all), Math.max(...all)];
  const margin = (most - least || 1) * 0.05;
  const [from, to] = [least - margin, most + margin];
  const xOf = (value: number) => left + ((value - from) / (to - from)) * (width - left - right);
  const bottom = top + rows.length * rowHeight;
  return (
    <figure className="flex flex-col gap-1">
      <svg
        viewBox={`0 0 ${width} ${bottom + 26}`}
        role="img"
        aria-label={`${quantity}. ${rows.map(({ label, values }) => `${label}: ${values.length} values, mean ${values.length === 0 ? 'none' : meanOf(values).toFixed(1)}`).join('; ')}`}
        className="w-full"
      >
        {rows.map(({ label, values }, row) => {
          const y = top + row * rowHeight + 36;
          return (
            <g key={label}>
              <text x={left} y={y - 18} className="fill-ink text-[15px]">
                {label}
              </text>
              <line x1={left} x2={width - right} y1={y} y2={y} className="stroke-rule" />
              {values.map((value, index) => (
                <circle
                  // biome-ignore lint/suspicious/noArrayIndexKey: values have no name and never move
                  key={index}
                  cx={xOf(value)}
                  cy={y}
                  r={5}
                  className="fill-none stroke-edge"
                  strokeWidth={1.5}
                />
              ))}
              {values.length === 0 ? null : (
                <line
                  x1={xOf(meanOf(values))}
                  x2={xOf(meanOf(values))}
                  y1={y - 13}
                  y2={y + 13}
                  className="stroke-copper"
                  strokeWidth={3}
                />
              )}
            </g>
          );
        })}
        {niceTicks(from, to, 6).map((tick) => (
          <g key={tick}>
            <line x1={xOf(tick)} x2={xOf(tick)} y1={bottom} y2={bottom + 5} className="stroke-edge" />
            <text x={xOf(tick)} y={bottom + 21} textAnchor="middle" className="fill-soft font-mono text-[14px]">
              {tick}
            </text>
          </g>
        ))}
      </svg>
      <figcaption className="text-soft">{quantity}. The stroke is the mean.</figcaption>
    </figure>
  );
}
