import type { ReactNode } from 'react';
import { classNames } from './class-names.ts';
import { FieldNotes } from './field-notes.tsx';
import type { FieldLabels, useFieldWiring } from './field-wiring.ts';

type FieldProps = Pick<FieldLabels, 'label' | 'hint' | 'optional'> & {
  wiring: ReturnType<typeof useFieldWiring>;
  className?: string;
  children: ReactNode;
};

/** Label above, control, then what is wrong and the hint. */
export function Field({ label, hint, optional, wiring, className, children }: FieldProps) {
  return (
    <div className={classNames('flex min-w-0 flex-col gap-1.5', className)}>
      <label htmlFor={wiring.control.id} className="self-start font-semibold">
        {label}
        {optional ? <span className="font-normal text-soft"> (optional)</span> : null}
      </label>
      {children}
      <FieldNotes wiring={wiring} hint={hint} />
    </div>
  );
}
