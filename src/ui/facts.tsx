import type { ReactNode } from 'react';
import { classNames } from './class-names.ts';

export type Fact = {
  label: string;
  value: ReactNode;
  /** Figures, codes and hashes are set in mono; words are not. */
  isWords?: boolean;
  tone?: 'held' | 'amber';
};

type FactsProps = { title?: string; facts: readonly Fact[]; className?: string };

const tones = { held: 'font-bold text-jacket', amber: 'font-bold text-amber' };

/** What was the case: label left, value right. */
export function Facts({ title, facts, className }: FactsProps) {
  return (
    <section aria-label={title} className={classNames('border-t-2 border-ink pt-4', className)}>
      {title ? <h3 className="pb-2 text-base font-bold">{title}</h3> : null}
      <dl>
        {facts.map((fact) => (
          <div key={fact.label} className="flex flex-wrap justify-between gap-x-6 py-1">
            <dt className="text-soft">{fact.label}</dt>
            <dd
              className={classNames(
                'ml-auto min-w-0 text-right [overflow-wrap:anywhere]',
                !fact.isWords && 'font-mono',
                fact.tone && tones[fact.tone],
              )}
            >
              {fact.value}
            </dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
