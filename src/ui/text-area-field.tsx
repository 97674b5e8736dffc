import type { ComponentProps } from 'react';
import { classNames } from './class-names.ts';
import { controlLook } from './control-look.ts';
import { Field } from './field.tsx';
import { type FieldLabels, useFieldWiring } from './field-wiring.ts';

type TextAreaFieldProps = FieldLabels & ComponentProps<'textarea'>;

/** Grows with what is written, where the browser can. */
export function TextAreaField({ label, hint, error, optional, className, rows = 3, ...area }: TextAreaFieldProps) {
  const wiring = useFieldWiring({ name: area.name, id: area.id, hint, error });
  return (
    <Field label={label} hint={hint} optional={optional} wiring={wiring} className={className}>
      <textarea
        {...area}
        {...wiring.control}
        rows={rows}
        className={classNames(controlLook, 'max-h-96 resize-y [field-sizing:content]')}
        style={{ minHeight: `calc(${rows} * 1.5em + 1.2rem)` }}
      />
    </Field>
  );
}
