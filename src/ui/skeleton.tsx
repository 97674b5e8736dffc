import { classNames } from './class-names.ts';

const widths = ['w-full', 'w-11/12', 'w-4/5', 'w-10/12', 'w-9/12', 'w-3/5'];

type SkeletonProps = {
  /** What is on its way: "Loading the studies". */
  label: string;
  lines?: 1 | 2 | 3 | 4 | 5 | 6;
  className?: string;
};

/** Keeps the place of what is on its way. It does not move. */
export function Skeleton({ label, lines = 3, className }: SkeletonProps) {
  return (
    <output className={classNames('flex w-full flex-col gap-3', className)}>
      <span className="sr-only">{label}</span>
      {widths.slice(0, lines).map((width) => (
        <span key={width} className={classNames('h-5 rounded bg-rule', width)} />
      ))}
    </output>
  );
}
