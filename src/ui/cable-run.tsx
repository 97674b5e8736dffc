import type { ReactNode } from 'react';
import { classNames } from './class-names.ts';

type CableRunProps = {
  className?: string;
  /** What the cable runs through: a sleeve. */
  children?: ReactNode;
};

/** The cable of this session, drawn from edge to edge behind its sleeve. Where there is no course there is no cable. */
export function CableRun({ className, children }: CableRunProps) {
  return (
    <div className={classNames('relative isolate', className)}>
      <svg
        aria-hidden="true"
        viewBox="0 0 100 100"
        preserveAspectRatio="none"
        className="absolute inset-0 -z-10 size-full overflow-visible [&_path]:[vector-effect:non-scaling-stroke]"
      >
        <path d="M0 61C22 61 28 50 50 50S78 38 100 38" fill="none" strokeWidth="11" className="stroke-jacket" />
        <path
          d="M0 61C22 61 28 50 50 50S78 38 100 38"
          fill="none"
          strokeWidth="1.5"
          strokeDasharray="4 6"
          className="stroke-page"
        />
      </svg>
      {children}
    </div>
  );
}
