import type { PowerPoint } from '#shared/statistics/planned-power.ts';
import { classNames } from '../../../ui/class-names.ts';
import { niceTicks } from '../../../ui/nice-ticks.ts';
import { PowerChartTable } from './power-chart-table.tsx';

type PowerChartProps = {
  points: readonly PowerPoint[];
  planned: number;
  needed: { nFirst: number | null; nSafe: number | null };
  goal: number;
  /** Says what the chart shows, for whoever reads its table. */
  caption: string;
};

const gridPowers = [0, 0.2, 0.4, 0.6, 0.8, 1];

/** Chance of finding an effect over the number of trials. Lines stretch with the page, words keep their size. */
export function PowerChart({ points, planned, needed, goal, caption }: PowerChartProps) {
  const first = points[0]?.trials ?? 0;
  const last = points.at(-1)?.trials ?? first + 1;
  const x = (trials: number) => ((trials - first) / (last - first)) * 100;
  const y = (power: number) => (1 - power) * 100;
  const line = points.map(({ trials, power }) => `${x(trials)} ${y(power)}`).join('L');
  const placed = marksOf(points, planned, needed).map((mark) => ({ ...mark, x: x(mark.trials), y: y(mark.power) }));
  return (
    <figure className="flex flex-col gap-2">
      <div aria-hidden="true" className="flex flex-col gap-3">
        <p className="text-soft">Chance of finding it, %</p>
        <div className="relative mt-12 mr-3 mb-7 ml-12 h-44">
          <svg
            aria-hidden="true"
            viewBox="0 0 100 100"
            preserveAspectRatio="none"
            className="absolute inset-0 size-full overflow-visible"
          >
            {gridPowers.map((power) => (
              <GridLine key={power} y={y(power)} className="stroke-rule" />
            ))}
            <GridLine y={y(goal)} className="stroke-ink" dashes="5 4" />
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
              {Math.round(power * 100)}
            </span>
          ))}
          {niceTicks(first, last, 7).map((trials) => (
            <span
              key={trials}
              style={{ left: `${x(trials)}%` }}
              className="absolute top-full mt-1.5 -translate-x-1/2 font-mono text-soft"
            >
              {trials}
            </span>
          ))}
          {placed.map((mark) => (
            <Mark key={mark.kind} {...mark} />
          ))}
        </div>
        <p className="-mt-2 text-right text-soft">
          trials in all{planned > last ? `; the ${planned} planned lie beyond, where nothing changes any more` : ''}
        </p>
      </div>
      <figcaption>
        <PowerChartTable points={points} planned={planned} needed={needed} caption={caption} />
      </figcaption>
    </figure>
  );
}

function GridLine({ y, className, dashes }: { y: number; className: string; dashes?: string }) {
  return (
    <line
      x1="0"
      x2="100"
      y1={y}
      y2={y}
      strokeDasharray={dashes}
      vectorEffect="non-scaling-stroke"
      className={className}
    />
  );
}

type MarkKind = 'first' | 'safe' | 'planned';
type ChartMark = { kind: MarkKind; trials: number; power: number; words: string };

/** The first and the safe number, and the planned one where it is neither of them. */
function marksOf(points: readonly PowerPoint[], planned: number, { nFirst, nSafe }: PowerChartProps['needed']) {
  const at = (kind: MarkKind, trials: number | null, words: string): ChartMark[] => {
    const point = points.find((candidate) => candidate.trials === trials);
    return point === undefined ? [] : [{ kind, words, ...point }];
  };
  return [
    ...(nFirst === nSafe ? [] : at('first', nFirst, `${nFirst}, first above`)),
    ...at('safe', nSafe, `${nSafe}, stays above${planned === nSafe ? ', planned' : ''}`),
    ...(planned === nSafe ? [] : at('planned', planned, `${planned} planned`)),
  ];
}

const dots: Record<MarkKind, string> = {
  first: 'size-3 bg-jacket',
  safe: 'size-4 bg-copper',
  planned: 'size-4 border-[3px] border-ink bg-page',
};

const wordLooks: Record<MarkKind, string> = {
  first: 'text-soft',
  safe: 'font-bold text-copper',
  planned: 'font-bold',
};

/** From the middle of the chart on, words over the line end at their mark instead of beginning there. */
const middle = 35;
/** Points lower than this leave no room for words between them and the axis. */
const low = 80;

/**
 * Upper left there is no line, so that both needed numbers are named above the chart, each on a row of its own; lower right
 * there is none either, and the planned number is named at the foot, or well above a point that lies there itself. A thin
 * rule leads from the words to the mark.
 */
function Mark({ kind, x, y, words }: ChartMark & { x: number; y: number }) {
  const place = kind === 'planned' ? (y < low ? foot(y) : aloft(y)) : onTop(y, (kind === 'safe') === x > middle);
  return (
    <>
      <span
        style={{ left: `${x}%`, ...place.rule }}
        className={classNames('absolute border-l border-edge', place.lift)}
      />
      <span
        style={{ left: `${x}%`, top: `${y}%` }}
        className={classNames('absolute -translate-1/2 rounded-full', dots[kind])}
      />
      <span
        style={{ left: `${x}%`, ...place.words }}
        className={classNames(
          'absolute px-1.5 leading-6 whitespace-nowrap',
          wordLooks[kind],
          place.lift,
          x > (kind === 'planned' ? 60 : middle) && '-translate-x-full',
        )}
      >
        {words}
      </span>
    </>
  );
}

const onTop = (y: number, isUpper: boolean) => ({
  rule: { top: 0, bottom: `${100 - y}%` },
  words: { top: 0 },
  lift: isUpper ? '-mt-13' : '-mt-7',
});
const foot = (y: number) => ({ rule: { top: `${y}%`, bottom: 0 }, words: { bottom: 0 }, lift: '' });
const aloft = (y: number) => ({
  rule: { top: `${y}%`, bottom: `${100 - y}%` },
  words: { top: `${y}%` },
  lift: '-mt-24',
});
