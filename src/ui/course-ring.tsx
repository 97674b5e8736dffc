import { classNames } from './class-names.ts';
import type { CourseTrial } from './course-trial.ts';

export type RingSize = keyof typeof measures;

/** In px; `outer` counts half the stroke, so that the line ends where the ring begins. */
const measures = {
  roomy: { height: 40, radius: 8, nowRadius: 15, stroke: 2.5, nowStroke: 4, line: 4 },
  close: { height: 30, radius: 6.5, nowRadius: 10, stroke: 2.25, nowStroke: 4, line: 3 },
  dense: { height: 24, radius: 4.5, nowRadius: 7, stroke: 2, nowStroke: 3.5, line: 2.5 },
};

type CourseRingProps = {
  trial: CourseTrial;
  size: RingSize;
  isReachedBefore: boolean;
  isReachedAfter: boolean;
};

/** One cell of the course line: the line up to the ring, the ring, the line after it. */
export function CourseRing({ trial, size, isReachedBefore, isReachedAfter }: CourseRingProps) {
  const { height, line, ...measure } = measures[size];
  const isNow = trial.state === 'now';
  const radius = isNow ? measure.nowRadius : measure.radius;
  const stroke = isNow ? measure.nowStroke : measure.stroke;
  const gap = `${radius + stroke / 2 - 0.5}px`;
  const side = { y: `${(height - line) / 2}px`, height: `${line}px`, width: `calc(50% - ${gap})` };
  return (
    <svg aria-hidden="true" className="block w-full overflow-visible" style={{ height: `${height}px` }}>
      <rect className={isReachedBefore ? 'fill-jacket' : 'fill-rule'} style={{ ...side, x: '0' }} />
      <rect
        className={isReachedAfter ? 'fill-jacket' : 'fill-rule'}
        style={{ ...side, x: `calc(50% + ${gap})`, width: `calc(50% - ${gap} + 0.5px)` }}
      />
      <circle cx="50%" cy={height / 2} r={radius} strokeWidth={stroke} className={ringLook[trial.state]} />
      {trial.state === 'void' ? <Strike cy={height / 2} reach={radius * 0.72} width={stroke} /> : null}
      {isNow && size === 'roomy' ? (
        <text
          x="50%"
          y={height / 2}
          dy="0.36em"
          textAnchor="middle"
          className={classNames('fill-ink text-base font-bold', trial.number > 99 && 'tracking-tighter')}
        >
          {trial.number}
        </text>
      ) : null}
    </svg>
  );
}

const ringLook: Record<CourseTrial['state'], string> = {
  locked: 'fill-jacket stroke-jacket',
  void: 'fill-none stroke-soft',
  open: 'fill-none stroke-edge',
  now: 'fill-none stroke-copper',
};

function Strike({ cy, reach, width }: { cy: number; reach: number; width: number }) {
  return (
    <svg aria-hidden="true" x="50%" y={cy} className="overflow-visible">
      <line x1={-reach} y1={reach} x2={reach} y2={-reach} strokeWidth={width} className="stroke-soft" />
    </svg>
  );
}
