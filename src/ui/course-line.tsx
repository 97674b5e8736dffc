import { classNames } from './class-names.ts';
import { CourseRing, type RingSize } from './course-ring.tsx';
import { type CourseTrial, describeCourse, reachedIndex } from './course-trial.ts';

type CourseLineProps = {
  trials: readonly CourseTrial[];
  /** Only the line and the ring that is on, for the head of a phone. */
  isCompact?: boolean;
  className?: string;
};

/** The cable with its trials as rings: filled = locked, struck and soft = void, open = to come, large and copper = now. */
export function CourseLine({ trials, isCompact = false, className }: CourseLineProps) {
  const reached = reachedIndex(trials);
  return (
    <div role="img" aria-label={describeCourse(trials)} className={className}>
      {isCompact ? (
        <CompactLine trials={trials} reached={reached} />
      ) : (
        <div className="grid" style={{ gridTemplateColumns: columnsFor(sizeFor(trials.length)) }}>
          {trials.map((trial, index) => (
            <CourseRing
              key={trial.number}
              trial={trial}
              size={sizeFor(trials.length)}
              isReachedBefore={index <= reached}
              isReachedAfter={index < reached}
            />
          ))}
        </div>
      )}
    </div>
  );
}

function sizeFor(trialCount: number): RingSize {
  if (trialCount <= 20) return 'roomy';
  return trialCount <= 36 ? 'close' : 'dense';
}

/** Cells share the width; when they would be narrower than this the line goes on in a row below. */
function columnsFor(size: RingSize): string {
  const least = { roomy: '2.25rem', close: '1.5rem', dense: '0.9375rem' }[size];
  return `repeat(auto-fit, minmax(${least}, 1fr))`;
}

function CompactLine({ trials, reached }: { trials: readonly CourseTrial[]; reached: number }) {
  const share = trials.length === 0 ? 0 : Math.min((Math.max(reached, 0) + 0.5) / trials.length, 1) * 100;
  const isOn = trials[reached]?.state === 'now';
  return (
    <svg aria-hidden="true" className="block h-7 w-full">
      <rect className="fill-rule" style={{ x: '0', y: '12px', width: '100%', height: '4px' }} />
      <rect
        className="fill-jacket transition-[width] duration-200"
        style={{ x: '0', y: '12px', width: reached < 0 ? '0' : `${share}%`, height: '4px' }}
      />
      <circle
        r="10"
        strokeWidth="4"
        style={{ cx: `clamp(12px, ${share}%, 100% - 12px)`, cy: '14px' }}
        className={classNames('transition-[cx] duration-200', ringLook(isOn, reached < 0))}
      />
    </svg>
  );
}

function ringLook(isOn: boolean, isAhead: boolean): string {
  if (isOn) return 'fill-page stroke-copper';
  return isAhead ? 'fill-page stroke-edge' : 'fill-jacket stroke-jacket';
}
