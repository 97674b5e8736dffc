import type { ComponentProps } from 'react';
import { classNames } from './class-names.ts';
import { FieldNotes } from './field-notes.tsx';
import { type FieldLabels, useFieldWiring } from './field-wiring.ts';

type CheckboxFieldProps = FieldLabels & Omit<ComponentProps<'input'>, 'type'>;

export function CheckboxField({ label, hint, error, optional, className, ...input }: CheckboxFieldProps) {
  const wiring = useFieldWiring({ name: input.name, id: input.id, hint, error });
  return (
    <div className={classNames('flex min-w-0 flex-col gap-1.5', className)}>
      <label className="flex min-h-12 cursor-pointer items-start gap-3 py-2.5 has-disabled:cursor-not-allowed has-disabled:text-soft">
        <span className="relative mt-px grid size-6 shrink-0 place-items-center">
          <input
            {...input}
            {...wiring.control}
            type="checkbox"
            className="peer absolute inset-0 size-6 cursor-pointer appearance-none rounded border-2 border-edge bg-sheet hover:border-ink checked:border-ink checked:bg-ink aria-invalid:border-amber disabled:cursor-not-allowed"
          />
          <svg
            aria-hidden="true"
            viewBox="0 0 16 16"
            className="pointer-events-none relative hidden size-4 text-page peer-checked:block"
          >
            <path d="m2.5 8.5 3.5 3.5 7.5-8" fill="none" stroke="currentColor" strokeWidth="2.5" />
          </svg>
        </span>
        <span className="min-w-0">
          {label}
          {optional ? <span className="text-soft"> (optional)</span> : null}
        </span>
      </label>
      {wiring.fault || hint ? (
        <div className="-mt-4 flex flex-col gap-1.5 pl-9">
          <FieldNotes wiring={wiring} hint={hint} />
        </div>
      ) : null}
    </div>
  );
}
