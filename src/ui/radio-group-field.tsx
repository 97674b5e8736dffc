import type { ComponentProps, ReactNode } from 'react';
import { classNames } from './class-names.ts';
import { FieldNotes } from './field-notes.tsx';
import { type FieldLabels, useFieldWiring } from './field-wiring.ts';

type RadioOption = { value: string; label: ReactNode; hint?: ReactNode; disabled?: boolean };

type RadioGroupFieldProps = FieldLabels &
  Omit<ComponentProps<'input'>, 'type' | 'id' | 'value' | 'defaultValue' | 'checked'> & {
    options: readonly RadioOption[];
    /** For use without a form library: the chosen value, with onChange. */
    value?: string;
    defaultValue?: string;
  };

/** Everything that is not a label goes to every radio, so that a form's registration reaches each of them. */
export function RadioGroupField({
  label,
  hint,
  error,
  optional,
  options,
  value,
  defaultValue,
  className,
  ...radio
}: RadioGroupFieldProps) {
  const wiring = useFieldWiring({ name: radio.name, hint, error });
  const name = radio.name ?? wiring.control.id;
  return (
    <fieldset
      aria-describedby={wiring.control['aria-describedby']}
      className={classNames('flex min-w-0 flex-col gap-1.5', className)}
    >
      <legend className="mb-1 font-semibold">
        {label}
        {optional ? <span className="font-normal text-soft"> (optional)</span> : null}
      </legend>
      {options.map((option) => (
        <RadioRow
          key={option.value}
          {...radio}
          option={option}
          name={name}
          aria-invalid={wiring.control['aria-invalid']}
          {...(value === undefined ? {} : { checked: value === option.value })}
          {...(defaultValue === undefined ? {} : { defaultChecked: defaultValue === option.value })}
        />
      ))}
      <FieldNotes wiring={wiring} hint={hint} />
    </fieldset>
  );
}

type RadioRowProps = ComponentProps<'input'> & { option: RadioOption };

function RadioRow({ option, ...input }: RadioRowProps) {
  return (
    <label className="flex min-h-12 cursor-pointer items-start gap-3 py-2.5 has-disabled:cursor-not-allowed has-disabled:text-soft">
      <input
        {...input}
        type="radio"
        value={option.value}
        disabled={option.disabled ?? input.disabled}
        className="mt-px size-6 shrink-0 cursor-pointer appearance-none rounded-full border-2 border-edge bg-sheet hover:border-ink checked:border-[7px] checked:border-ink aria-invalid:border-amber disabled:cursor-not-allowed disabled:border-rule disabled:bg-page"
      />
      <span className="flex min-w-0 flex-col">
        <span>{option.label}</span>
        {option.hint ? <span className="text-soft">{option.hint}</span> : null}
      </span>
    </label>
  );
}
