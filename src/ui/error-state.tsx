import type { ReactNode } from 'react';

type ErrorStateProps = {
  /** What happened. */
  title: string;
  detail?: string;
  /** What was kept; said whenever somebody could have lost work. */
  kept?: string;
  /** What to do. */
  advice?: string;
  requestId?: string;
  /** Buttons that do it. */
  actions?: ReactNode;
};

export function ErrorState({ title, detail, kept, advice, requestId, actions }: ErrorStateProps) {
  return (
    <div role="alert" className="flex max-w-2xl flex-col items-start gap-3 border-l-[5px] border-amber py-1 pl-5">
      <p className="text-2xl font-bold text-balance">{title}</p>
      {detail ? <p className="text-lg">{detail}</p> : null}
      {kept ? <p>{kept}</p> : null}
      {advice ? <p>{advice}</p> : null}
      {actions ? <div className="flex flex-wrap gap-3 py-2">{actions}</div> : null}
      {requestId ? (
        <p className="text-soft">
          Request <span className="font-mono break-all">{requestId}</span>
        </p>
      ) : null}
    </div>
  );
}
