import type { ReactNode } from 'react';
import { classNames } from './class-names.ts';

type ActionsProps = {
  /** What ends something; it stands 48 px or more away from everything else. */
  stop?: ReactNode;
  className?: string;
  children?: ReactNode;
};

/** A row of buttons that wraps. */
export function Actions({ stop, className, children }: ActionsProps) {
  return (
    <div className={classNames('flex flex-wrap items-center justify-between gap-12 print:hidden', className)}>
      <div className="flex flex-wrap items-center gap-3">{children}</div>
      {stop}
    </div>
  );
}
