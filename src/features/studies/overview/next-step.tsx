import type { ReactNode } from 'react';

type NextStepProps = { title: string; children: ReactNode; actions: ReactNode; stop?: ReactNode };

/** What comes next, in one sentence, with the act beside it; the largest thing on a study's page. */
export function NextStep({ title, children, actions, stop }: NextStepProps) {
  return (
    <section
      aria-labelledby="next-step"
      className="flex flex-col gap-5 border-t-2 border-b border-t-ink border-b-rule py-6"
    >
      <div className="flex max-w-3xl flex-col gap-2">
        <h2 id="next-step" className="text-2xl">
          {title}
        </h2>
        <div className="flex flex-col gap-2 text-lg text-soft">{children}</div>
      </div>
      <div className="flex flex-wrap items-center justify-between gap-12 print:hidden">
        <div className="flex flex-wrap items-center gap-3">{actions}</div>
        {stop}
      </div>
    </section>
  );
}
