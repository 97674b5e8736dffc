import { CableRun } from '../cable-run.tsx';
import { CourseLine } from '../course-line.tsx';
import type { CourseTrial } from '../course-trial.ts';
import { Sleeve } from '../sleeve.tsx';
import { GallerySection } from './gallery-section.tsx';

export function CourseSection() {
  return (
    <GallerySection title="The sleeve and the line" note="A sleeve is a code, the line is the course of a session.">
      <div className="flex flex-wrap items-center gap-8">
        <Sleeve code="417" />
        <p className="text-xl">
          Next is <Sleeve code="086" size="sm" />, then a break.
        </p>
      </div>
      <CableRun className="-mx-5 px-5 py-6 sm:-mx-8 sm:px-8 lg:-mx-12 lg:px-12">
        <div className="mx-auto max-w-3xl">
          <Sleeve code="417" size="huge" />
        </div>
      </CableRun>
      {[1, 5, 16, 30, 60].map((trialCount) => (
        <CourseLine key={trialCount} trials={course(trialCount)} />
      ))}
      <CourseLine trials={course(16)} isCompact className="-mx-5 sm:mx-0 sm:max-w-md" />
      <CourseLine trials={course(8).map((trial) => ({ ...trial, state: 'locked' }))} />
    </GallerySection>
  );
}

/** Somewhat before the middle, with one void trial behind. */
function course(trialCount: number): CourseTrial[] {
  const now = Math.floor(trialCount * 0.42) + 1;
  return Array.from({ length: trialCount }, (_, index) => {
    const number = index + 1;
    if (number === now) return { number, state: 'now' };
    if (number > now) return { number, state: 'open' };
    return { number, state: number === 4 ? 'void' : 'locked' };
  });
}
