import type { ComponentProps } from 'react';
import { classNames } from './class-names.ts';
import { controlLook } from './control-look.ts';
import { Field } from './field.tsx';
import { type FieldLabels, useFieldWiring } from './field-wiring.ts';

type TextFieldProps = FieldLabels &
  ComponentProps<'input'> & {
    /** For codes, hashes and serial marks, where 0 and O must be told apart. */
    mono?: boolean;
  };

export function TextField({ label, hint, error, optional, mono, className, ...input }: TextFieldProps) {
  const wiring = useFieldWiring({ name: input.name, id: input.id, hint, error });
  return (
    <Field label={label} hint={hint} optional={optional} wiring={wiring} className={className}>
      <input type="text" {...input} {...wiring.control} className={classNames(controlLook, mono && 'font-mono')} />
    </Field>
  );
}
