import type { ReactNode } from 'react';
import { classNames } from './class-names.ts';

type FigureProps = {
  value: ReactNode;
  label: ReactNode;
  /** The one observed figure of a page: 56 px and copper. */
  isLead?: boolean;
};

/** A figure with its unit, and what it counts or which test it comes from. */
export function Figure({ value, label, isLead = false }: FigureProps) {
  return (
    <p className="flex flex-col gap-1">
      <span
        className={classNames('font-mono font-semibold', isLead ? 'text-figure tracking-tight text-copper' : 'text-xl')}
      >
        {value}
      </span>
      <span className="max-w-44 text-soft">{label}</span>
    </p>
  );
}

/** A row of figures between two rules; it wraps. */
export function FigureRow({ children }: { children: ReactNode }) {
  return (
    <div className="flex flex-wrap items-baseline gap-x-10 gap-y-5 border-t-2 border-b border-t-ink border-b-rule py-5">
      {children}
    </div>
  );
}
