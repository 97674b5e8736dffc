import type { ReactNode } from 'react';

export type WordsProps = { title: string; detail: string; more?: string; children?: ReactNode };

/** What is going on, in the middle of the phone. */
export function Words({ title, detail, more, children }: WordsProps) {
  return (
    <div className="flex flex-1 flex-col items-center justify-center gap-4 py-4 text-center">
      <h1 className="text-2xl">{title}</h1>
      <p className="max-w-[22rem] text-xl text-soft">{detail}</p>
      {more === undefined ? null : <p className="max-w-[22rem] text-soft">{more}</p>}
      {children}
    </div>
  );
}
