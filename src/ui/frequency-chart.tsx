import { Line, LineChart, ReferenceArea, ResponsiveContainer, Tooltip, XAxis, YAxis } from 'recharts';
import { FrequencyTable } from './frequency-table.tsx';

export type FrequencyPoint = { readonly frequency: number; readonly value: number };

/** One curve. What was observed is drawn full, what was worked out is dashed. */
export type FrequencySeries = {
  readonly name: string;
  readonly isWorkedOut: boolean;
  readonly points: readonly FrequencyPoint[];
};

type FrequencyChartProps = {
  /** Says what the chart shows: "Resistance of the pieces and of the prediction". */
  caption: string;
  /** What is drawn, with its unit: "Resistance, mΩ". */
  quantity: string;
  series: readonly FrequencySeries[];
  /** How a value is written, without its unit. */
  format: (value: number) => string;
};

const heightPx = 320;
const audible = { low: 20, high: 20_000 };
/** Curves of one kind are told apart by their dashes, so that they are in black too. */
const observedDashes = [undefined, '10 4', '3 3', '12 3 3 3', '1 4'];
const workedOutDashes = ['6 6', '2 5', '8 3 2 3'];

/** Curves over the logarithm of frequency, with the audible band marked; the same figures stand in a table. */
export function FrequencyChart({ caption, quantity, series, format }: FrequencyChartProps) {
  const frequencies = series.flatMap(({ points }) => points.map(({ frequency }) => frequency));
  const [low, high] = decadesAround(Math.min(...frequencies), Math.max(...frequencies));
  const looks = looksOf(series);
  const band = { low: Math.max(low, audible.low), high: Math.min(high, audible.high) };
  return (
    <figure className="flex flex-col gap-2 [&_svg]:max-w-full">
      <Key looks={looks} />
      <p aria-hidden="true" className="text-soft">
        {quantity}
      </p>
      <div role="img" aria-label={`${caption}. The table below has the same figures.`} className="font-mono">
        <ResponsiveContainer width="100%" height={heightPx} minWidth={0}>
          <LineChart accessibilityLayer={false} margin={{ top: 8, right: 34, bottom: 4, left: 0 }}>
            <XAxis
              dataKey="frequency"
              type="number"
              scale="log"
              domain={[low, high]}
              ticks={decades(low, high)}
              tickFormatter={hertzFace}
              allowDataOverflow
              interval="preserveStartEnd"
              minTickGap={10}
              tick={{ fill: 'var(--color-soft)' }}
              tickLine={false}
              stroke="var(--color-ink)"
              height={34}
            />
            <YAxis
              width={72}
              domain={['auto', 'auto']}
              tickFormatter={format}
              tick={{ fill: 'var(--color-soft)' }}
              tickLine={false}
              axisLine={false}
            />
            {band.low < band.high ? (
              <ReferenceArea
                x1={band.low}
                x2={band.high}
                fill="var(--color-rule)"
                fillOpacity={0.45}
                ifOverflow="hidden"
              />
            ) : null}
            <Tooltip
              isAnimationActive={false}
              separator=" "
              contentStyle={readoutLook}
              itemStyle={{ color: 'var(--color-ink)' }}
              labelFormatter={(frequency) => hertzFace(Number(frequency))}
              formatter={(value) => format(Number(value))}
            />
            {looks.map(({ name, points, stroke, dashes }) => (
              <Line
                key={name}
                name={name}
                data={[...points]}
                dataKey="value"
                type="linear"
                stroke={stroke}
                strokeWidth={2.5}
                strokeDasharray={dashes}
                dot={points.length === 1}
                isAnimationActive={false}
              />
            ))}
          </LineChart>
        </ResponsiveContainer>
      </div>
      <figcaption className="flex flex-col gap-2">
        <span aria-hidden="true" className="text-center text-soft">
          Frequency; 20 Hz to 20 kHz is tinted
        </span>
        <FrequencyTable caption={caption} quantity={quantity} series={series} format={format} />
      </figcaption>
    </figure>
  );
}

type Look = FrequencySeries & { stroke: string; dashes: string | undefined };

function looksOf(series: readonly FrequencySeries[]): Look[] {
  const seen = { observed: 0, workedOut: 0 };
  return series.map((each) =>
    each.isWorkedOut
      ? { ...each, stroke: 'var(--color-ink)', dashes: workedOutDashes[seen.workedOut++ % workedOutDashes.length] }
      : { ...each, stroke: 'var(--color-copper)', dashes: observedDashes[seen.observed++ % observedDashes.length] },
  );
}

/** Lines that lie on each other leave no room for words beside them: they are named above, each with its own stroke. */
function Key({ looks }: { looks: readonly Look[] }) {
  return (
    <ul className="flex flex-wrap gap-x-6 gap-y-1">
      {looks.map(({ name, stroke, dashes }) => (
        <li key={name} className="flex items-center gap-2">
          <svg aria-hidden="true" width="36" height="8" className="flex-none">
            <line x1="0" y1="4" x2="36" y2="4" stroke={stroke} strokeWidth="2.5" strokeDasharray={dashes} />
          </svg>
          <span>{name}</span>
        </li>
      ))}
    </ul>
  );
}

const readoutLook = {
  background: 'var(--color-sheet)',
  border: '1px solid var(--color-rule)',
  borderRadius: 'var(--radius)',
  boxShadow: 'var(--shadow-float)',
};

/** "20 Hz", "1 kHz" */
export function hertzFace(frequency: number): string {
  const [figure, unit] = frequency >= 1000 ? [frequency / 1000, 'kHz'] : [frequency, 'Hz'];
  return `${Number(figure.toPrecision(4))}\u00a0${unit}`;
}

function decadesAround(low: number, high: number): [number, number] {
  const from = 10 ** Math.floor(Math.log10(low) + 1e-9);
  const to = 10 ** Math.ceil(Math.log10(high) - 1e-9);
  return [from, Math.max(to, from * 10)];
}

function decades(low: number, high: number): number[] {
  const count = Math.round(Math.log10(high / low));
  return Array.from({ length: count + 1 }, (_, step) => Number((low * 10 ** step).toPrecision(12)));
}
