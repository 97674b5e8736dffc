import { classNames } from '../../../ui/class-names.ts';
import type { PowerPoint } from './power-curve.ts';

type PowerChartProps = { points: readonly PowerPoint[]; planned: number };

const gridPowers = [0, 0.5, 0.8, 1];
const aimedPower = 0.8;

/** Chance of finding a difference over the number of trials. Lines stretch with the page, words keep their size. */
export function PowerChart({ points, planned }: PowerChartProps) {
  const first = points[0]?.trials ?? 0;
  const last = points.at(-1)?.trials ?? first + 1;
  const x = (trials: number) => ((trials - first) / (last - first)) * 100;
  const y = (power: number) => (1 - power) * 100;
  const line = points.map(({ trials, power }) => `${x(trials)} ${y(power)}`).join('L');
  const own = points.find(({ trials }) => trials === planned);
  return (
    <div aria-hidden="true" className="flex flex-col gap-3">
      <p className="text-soft">Tests that find it, %</p>
      <div className="relative mr-2 mb-7 ml-12 h-36">
        <svg
          aria-hidden="true"
          viewBox="0 0 100 100"
          preserveAspectRatio="none"
          className="absolute inset-0 size-full overflow-visible"
        >
          {gridPowers.map((power) => (
            <line
              key={power}
              x1="0"
              x2="100"
              y1={y(power)}
              y2={y(power)}
              strokeDasharray={power === aimedPower ? '5 4' : undefined}
              vectorEffect="non-scaling-stroke"
              className={power === aimedPower ? 'stroke-ink' : 'stroke-rule'}
            />
          ))}
          <path
            d={`M${line}`}
            fill="none"
            strokeWidth="2.5"
            strokeLinejoin="round"
            vectorEffect="non-scaling-stroke"
            className="stroke-jacket"
          />
        </svg>
        {gridPowers.map((power) => (
          <span
            key={power}
            style={{ top: `${y(power)}%` }}
            className="absolute right-full mr-2.5 -translate-y-1/2 font-mono text-soft"
          >
            {power * 100}
          </span>
        ))}
        {ticksBetween(first, last).map((trials) => (
          <span
            key={trials}
            style={{ left: `${x(trials)}%` }}
            className="absolute top-full mt-1.5 -translate-x-1/2 font-mono text-soft"
          >
            {trials}
          </span>
        ))}
        {own ? <OwnPoint x={x(own.trials)} y={y(own.power)} label={`${planned} trials`} /> : null}
      </div>
      <p className="-mt-2 text-right text-soft">trials in all</p>
    </div>
  );
}

/** The planned number, named on the side of the line where there is room. */
function OwnPoint({ x, y, label }: { x: number; y: number; label: string }) {
  return (
    <>
      <span
        style={{ left: `${x}%`, top: `${y}%` }}
        className="absolute size-4 -translate-x-1/2 -translate-y-1/2 rounded-full bg-copper"
      />
      <span
        style={{ left: `${x}%`, top: `${y}%` }}
        className={classNames(
          'absolute bg-page/80 px-1 font-bold whitespace-nowrap text-copper',
          x > 60 ? 'mr-3 -translate-x-full' : 'ml-1.5',
          y < 40 ? 'mt-3' : '-mt-9',
        )}
      >
        {label}
      </span>
    </>
  );
}

/** Some five round numbers. */
function ticksBetween(first: number, last: number): number[] {
  const step = [10, 20, 25, 50, 100, 200, 250].find((candidate) => (last - first) / candidate <= 6) ?? 500;
  const from = Math.ceil(first / step) * step;
  return Array.from({ length: Math.floor((last - from) / step) + 1 }, (_, index) => from + index * step);
}
