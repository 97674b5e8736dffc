import { type ReactNode, useId } from 'react';

type ReportSectionProps = { title: string; lede?: ReactNode; children: ReactNode };

export function ReportSection({ title, lede, children }: ReportSectionProps) {
  const id = useId();
  return (
    <section aria-labelledby={id} className="flex min-w-0 flex-col gap-4">
      <div className="flex max-w-3xl flex-col gap-1.5">
        <h2 id={id} className="text-xl">
          {title}
        </h2>
        {lede ? <div className="text-soft">{lede}</div> : null}
      </div>
      {children}
    </section>
  );
}
