import type { ReactNode } from 'react';

type ConstructionGroupProps = { title: string; children: ReactNode };

/** Fields that describe one part of a cable, two beside each other where there is room. */
export function ConstructionGroup({ title, children }: ConstructionGroupProps) {
  return (
    <fieldset className="min-w-0 border-t border-rule pt-4">
      <legend className="float-left w-full pb-4 text-lg font-bold">{title}</legend>
      <div className="clear-both grid gap-6 sm:grid-cols-2">{children}</div>
    </fieldset>
  );
}
