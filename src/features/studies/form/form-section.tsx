import { type ReactNode, useId } from 'react';

type FormSectionProps = { title: string; lede?: ReactNode; children: ReactNode };

/** A part of the form under its own heading. */
export function FormSection({ title, lede, children }: FormSectionProps) {
  const id = useId();
  return (
    <section aria-labelledby={id} className="flex flex-col gap-6 border-t-2 border-ink pt-5 pb-4">
      <div className="flex flex-col gap-1">
        <h2 id={id} className="text-xl">
          {title}
        </h2>
        {lede ? <p className="text-soft">{lede}</p> : null}
      </div>
      {children}
    </section>
  );
}
