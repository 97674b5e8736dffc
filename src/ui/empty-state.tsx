import type { ReactNode } from 'react';

type EmptyStateProps = {
  /** What will be here. */
  title: string;
  children?: ReactNode;
  /** The first step. */
  action?: ReactNode;
};

export function EmptyState({ title, children, action }: EmptyStateProps) {
  return (
    <div className="flex max-w-xl flex-col items-start gap-3 border-t-2 border-ink py-6">
      <p className="text-xl font-bold text-balance">{title}</p>
      {children ? <div className="text-soft">{children}</div> : null}
      {action ? <div className="pt-2">{action}</div> : null}
    </div>
  );
}
