import { type ReactNode, useContext, useId } from 'react';
import { FieldFaults } from './field-faults.ts';

/** What every field of the kit takes besides the attributes of its control. */
export type FieldLabels = {
  label: ReactNode;
  hint?: ReactNode;
  /** Overrides what the surrounding form says about this name. */
  error?: string;
  /** Adds "(optional)" to the label. */
  optional?: boolean;
};

type Wired = { name?: string; id?: string; hint?: ReactNode; error?: string; unit?: ReactNode };

/** Ids and aria attributes that tie a control to its unit, its fault and its hint, in that order. */
export function useFieldWiring({ name, id, hint, error, unit }: Wired) {
  const ownId = useId();
  const faultOf = useContext(FieldFaults);
  const controlId = id ?? ownId;
  const fault = error ?? (name ? faultOf(name) : undefined);
  const ids = { unit: `${controlId}-unit`, fault: `${controlId}-fault`, hint: `${controlId}-hint` };
  const described = [unit ? ids.unit : '', fault ? ids.fault : '', hint ? ids.hint : ''].filter(Boolean).join(' ');
  return {
    fault,
    ids,
    control: {
      id: controlId,
      'aria-invalid': fault ? (true as const) : undefined,
      'aria-describedby': described || undefined,
    },
  };
}
