import { classNames } from './class-names.ts';

const turns = { down: '', up: 'rotate-180', left: 'rotate-90', right: '-rotate-90' };

type CaretProps = { direction: keyof typeof turns; className?: string };

/** A small corner that points somewhere. Always beside a word, never instead of one. */
export function Caret({ direction, className }: CaretProps) {
  return (
    <svg
      aria-hidden="true"
      viewBox="0 0 12 8"
      className={classNames('inline-block h-2 w-3 shrink-0', turns[direction], className)}
    >
      <path d="M1 1.5 6 6.5 11 1.5" fill="none" stroke="currentColor" strokeWidth="2" />
    </svg>
  );
}
