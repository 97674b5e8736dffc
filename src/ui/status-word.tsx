import type { ReactNode } from 'react';
import { classNames } from './class-names.ts';

const tones = {
  held: 'text-jacket',
  amber: 'text-amber',
  stop: 'text-stop',
  now: 'text-copper',
  neutral: 'text-soft',
};

type StatusWordProps = {
  tone?: keyof typeof tones;
  /** A dot before the word, where the state stands alone. */
  hasDot?: boolean;
  children: ReactNode;
};

/** A state in its word; the colour only repeats it. */
export function StatusWord({ tone = 'neutral', hasDot = false, children }: StatusWordProps) {
  return (
    <span className={classNames('inline-flex items-baseline gap-2 font-semibold', tones[tone])}>
      {hasDot ? <span aria-hidden="true" className="size-2.5 shrink-0 self-center rounded-full bg-current" /> : null}
      <span>{children}</span>
    </span>
  );
}
