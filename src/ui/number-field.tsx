import type { ComponentProps, ReactNode, WheelEvent } from 'react';
import { classNames } from './class-names.ts';
import { bareLook, framedLook } from './control-look.ts';
import { Field } from './field.tsx';
import { type FieldLabels, useFieldWiring } from './field-wiring.ts';

type NumberFieldProps = FieldLabels &
  Omit<ComponentProps<'input'>, 'type'> & {
    /** Stands inside the box at the right and is read out after the label: "dB", "% of the time". */
    unit?: ReactNode;
  };

const withoutArrows =
  '[appearance:textfield] [&::-webkit-inner-spin-button]:appearance-none [&::-webkit-outer-spin-button]:appearance-none';

export function NumberField({ label, hint, error, optional, unit, className, ...input }: NumberFieldProps) {
  const wiring = useFieldWiring({ name: input.name, id: input.id, hint, error, unit });
  return (
    <Field label={label} hint={hint} optional={optional} wiring={wiring} className={className}>
      <span className={framedLook}>
        <input
          inputMode={input.step === undefined || input.step === 'any' ? 'decimal' : 'numeric'}
          step="any"
          onWheel={leave}
          {...input}
          {...wiring.control}
          type="number"
          className={classNames(bareLook, withoutArrows)}
        />
        {unit ? (
          <span id={wiring.ids.unit} className="flex items-center pr-3.5 whitespace-nowrap text-soft">
            {unit}
          </span>
        ) : null}
      </span>
    </Field>
  );
}

/** A wheel that turns over a focused number would change it unseen. */
function leave(event: WheelEvent<HTMLInputElement>) {
  event.currentTarget.blur();
}
