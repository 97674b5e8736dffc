import type { ReactNode } from 'react';

type ClaimProps = {
  /** The sentence, word for word. */
  children: string;
  /** What the sentence does not allow one to say. */
  caution?: ReactNode;
  /** Copy, publish ... */
  actions?: ReactNode;
};

/** Words that may leave the building. Nothing else is set in the serif. */
export function Claim({ children, caution, actions }: ClaimProps) {
  return (
    <figure className="flex flex-col gap-4 rounded border border-rule bg-sheet px-5 py-5 sm:px-7 sm:py-6">
      <blockquote className="max-w-[38em] font-serif text-[clamp(1.375rem,1.2rem+0.8vw,1.625rem)] leading-[1.35] text-pretty">
        {children}
      </blockquote>
      {caution || actions ? (
        <figcaption className="flex flex-col gap-4">
          {caution ? <div className="max-w-[44em] text-soft">{caution}</div> : null}
          {actions ? <div className="flex flex-wrap gap-3 print:hidden">{actions}</div> : null}
        </figcaption>
      ) : null}
    </figure>
  );
}
