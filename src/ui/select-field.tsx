import type { ComponentProps } from 'react';
import { Caret } from './caret.tsx';
import { classNames } from './class-names.ts';
import { controlLook } from './control-look.ts';
import { Field } from './field.tsx';
import { type FieldLabels, useFieldWiring } from './field-wiring.ts';

type SelectOption = { value: string; label: string; disabled?: boolean };

type SelectFieldProps = FieldLabels &
  Omit<ComponentProps<'select'>, 'children' | 'multiple'> & {
    options: readonly SelectOption[];
    /** Shown while nothing is chosen; its value is the empty string. */
    placeholder?: string;
  };

export function SelectField({
  label,
  hint,
  error,
  optional,
  options,
  placeholder,
  className,
  ...select
}: SelectFieldProps) {
  const wiring = useFieldWiring({ name: select.name, id: select.id, hint, error });
  return (
    <Field label={label} hint={hint} optional={optional} wiring={wiring} className={className}>
      <span className="relative block">
        <select
          {...select}
          {...wiring.control}
          className={classNames(controlLook, 'cursor-pointer appearance-none truncate pr-10')}
        >
          {placeholder === undefined ? null : <option value="">{placeholder}</option>}
          {options.map((option) => (
            <option key={option.value} value={option.value} disabled={option.disabled}>
              {option.label}
            </option>
          ))}
        </select>
        <Caret direction="down" className="pointer-events-none absolute top-1/2 right-4 -translate-y-1/2" />
      </span>
    </Field>
  );
}
