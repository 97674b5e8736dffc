import { Bar, BarChart, type BarShapeProps, ResponsiveContainer, Tooltip, XAxis, YAxis } from 'recharts';
import { countTicks } from './count-ticks.ts';
import { type CountChance, type DistributionEdges, distributionBars } from './distribution-bars.ts';
import { DistributionMark } from './distribution-mark.tsx';
import { DistributionTable } from './distribution-table.tsx';
import { niceTicks } from './nice-ticks.ts';
import { percentFace } from './percent-face.ts';

type NullDistributionChartProps = {
  /** Every possible count, ascending, with its chance if nobody hears a difference. */
  bars: readonly CountChance[];
  observed: number;
  /** The registered limit: the least count that is a finding. */
  limit?: number;
  /** Two-sided: counts at or beyond these lie as far from the middle as the observed one; they are tinted. */
  beyond?: DistributionEdges['beyond'];
  /** Whose chance a bar is: "Chance by guessing". */
  chanceOf: string;
  /** What is counted, with its unit: "Correct answers out of 96". */
  quantity: string;
};

const chartHeightPx = 300;
/** Room above the bars in which the two lines are named. */
const headroom = 1.42;

/** Where the observed count falls if nobody hears a difference. */
export function NullDistributionChart({
  bars,
  observed,
  limit,
  beyond,
  chanceOf,
  quantity,
}: NullDistributionChartProps) {
  const shown = distributionBars(bars, observed, { limit, beyond });
  const mirrored = beyond === undefined ? undefined : beyond.low + beyond.high - observed;
  const peak = Math.max(0, ...shown.bars.map((bar) => bar.chance));
  const lowest = shown.bars[0]?.from ?? 0;
  const barOf = (count: number) => shown.bars.findLast((bar) => bar.from <= count)?.from ?? lowest;
  const labelled = countTicks(shown.bars, 8);

  return (
    <figure className="flex flex-col gap-1 [&_svg]:max-w-full">
      <p aria-hidden="true" className="text-soft">
        {chanceOf}, %
      </p>
      <div
        role="img"
        aria-label={summarise(`${quantity}: ${chanceOf.toLowerCase()}, count by count.`, observed, { limit, beyond })}
        className="font-mono"
      >
        <ResponsiveContainer width="100%" height={chartHeightPx} minWidth={0}>
          <BarChart
            data={shown.bars}
            accessibilityLayer={false}
            barCategoryGap="14%"
            margin={{ top: 0, right: 8, bottom: 4, left: 0 }}
          >
            <YAxis
              width={44}
              domain={[0, peak * headroom]}
              ticks={niceTicks(0, peak, 6)}
              tickFormatter={(chance: number) => String(Number((chance * 100).toPrecision(3)))}
              tick={{ fill: 'var(--color-soft)' }}
              tickLine={false}
              axisLine={false}
            />
            <XAxis
              dataKey="from"
              ticks={[...labelled.keys()]}
              tickFormatter={(from: number) => String(labelled.get(from) ?? from)}
              interval={0}
              tick={{ fill: 'var(--color-soft)' }}
              tickLine={false}
              stroke="var(--color-ink)"
              height={34}
            />
            <Tooltip
              isAnimationActive={false}
              separator=" "
              cursor={{ fill: 'var(--color-rule)', opacity: 0.6 }}
              contentStyle={readoutLook}
              itemStyle={{ color: 'var(--color-ink)' }}
              labelFormatter={(from) => rangeFace(shown.bars.find((bar) => bar.from === Number(from)))}
              formatter={(chance) => [percentFace(Number(chance)), 'chance']}
            />
            <Bar dataKey="chance" isAnimationActive={false} shape={DistributionColumn} />
            {limit === undefined ? null : (
              <DistributionMark
                bar={barOf(limit)}
                kind="limit"
                text={`limit ${limit}`}
                side={observed < limit ? 'right' : 'left'}
              />
            )}
            {mirrored === undefined || mirrored === observed ? null : (
              <DistributionMark
                bar={barOf(mirrored)}
                kind="mirrored"
                text="as far"
                side={mirrored > observed ? 'right' : 'left'}
              />
            )}
            <DistributionMark
              bar={barOf(observed)}
              kind="observed"
              text={`${observed} observed`}
              side={isLeft(observed, limit ?? mirrored) ? 'left' : 'right'}
            />
          </BarChart>
        </ResponsiveContainer>
      </div>
      <figcaption className="flex flex-col gap-2">
        <span aria-hidden="true" className="text-center text-soft">
          {quantity}
        </span>
        <DistributionTable shown={shown} observed={observed} edges={{ limit, beyond }} quantity={quantity} />
      </figcaption>
    </figure>
  );
}

const readoutLook = {
  background: 'var(--color-sheet)',
  border: '1px solid var(--color-rule)',
  borderRadius: 'var(--radius)',
  boxShadow: 'var(--shadow-float)',
};

function DistributionColumn({ x, y, width, height, payload }: BarShapeProps) {
  return (
    <rect
      x={x}
      y={y}
      width={Math.max(width, 1)}
      height={Math.max(height, 0)}
      className={payload.isBeyond ? 'fill-copper-soft' : 'fill-edge'}
    />
  );
}

function rangeFace(bar: { from: number; to: number } | undefined): string {
  if (!bar) return '';
  return bar.from === bar.to ? String(bar.from) : `${bar.from} to ${bar.to}`;
}

/** Words go to the side away from the other line. */
function isLeft(observed: number, other: number | undefined): boolean {
  return other !== undefined && observed < other;
}

function summarise(head: string, observed: number, { limit, beyond }: DistributionEdges): string {
  const against = limit === undefined ? '' : ` The registered limit was ${limit}.`;
  const far = beyond === undefined ? '' : ` As far from the middle: up to ${beyond.low}, and from ${beyond.high} on.`;
  return `${head} Observed: ${observed}.${against}${far} The table below has the same figures.`;
}
