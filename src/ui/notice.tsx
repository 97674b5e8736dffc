import type { ReactNode } from 'react';
import { classNames } from './class-names.ts';

export type NoticeTone = 'note' | 'held' | 'amber' | 'stop';

const rules: Record<NoticeTone, string> = {
  note: 'border-edge',
  held: 'border-jacket',
  amber: 'border-amber',
  stop: 'border-stop',
};

const words: Record<NoticeTone, string> = { note: 'Note.', held: 'Held.', amber: 'Needs a look.', stop: 'Ended.' };

type NoticeProps = {
  tone?: NoticeTone;
  /** The word or sentence that says what the rule's colour says. */
  title?: string;
  className?: string;
  children?: ReactNode;
};

export function Notice({ tone = 'note', title, className, children }: NoticeProps) {
  return (
    <div className={classNames('border-l-[5px] py-1 pl-4', rules[tone], className)}>
      <strong className="font-bold">{title ?? words[tone]}</strong> {children}
    </div>
  );
}
