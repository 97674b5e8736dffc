import { useState } from 'react';
import { useController } from 'react-hook-form';
import { NumberField } from '../../../ui/number-field.tsx';
import type { StudyFormValues } from './study-form-values.ts';

/** Typed as a percentage, kept in whole tenths of a per cent. */
export function AlphaField() {
  const { field, fieldState } = useController<StudyFormValues, 'alphaPerMille'>({ name: 'alphaPerMille' });
  const [text, setText] = useState(() => (Number.isFinite(field.value) ? String(field.value / 10) : ''));
  return (
    <NumberField
      ref={field.ref}
      name={field.name}
      onBlur={field.onBlur}
      value={text}
      onChange={(event) => {
        setText(event.target.value);
        field.onChange(perMilleOf(event.target.value));
      }}
      label="Significance level"
      unit="%"
      min={0.1}
      max={20}
      error={fieldState.error ? 'Enter 0.1 to 20 per cent, with one decimal at most.' : undefined}
      hint="How often, at most, a test may find a difference although nobody hears one."
    />
  );
}

/** Rounded only as far as the binary fraction of a decimal goes, so that 5.25 stays a fault and 5.1 does not become one. */
function perMilleOf(text: string): number {
  return text.trim() === '' ? Number.NaN : Number((Number(text) * 10).toFixed(6));
}
