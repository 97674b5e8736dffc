import { useFormContext } from 'react-hook-form';
import { usualBreaks } from '#shared/session/registered-breaks.ts';
import { CheckboxField } from '../../../ui/checkbox-field.tsx';
import { NumberField } from '../../../ui/number-field.tsx';
import type { StudyFormValues } from './study-form-values.ts';

const number = { valueAsNumber: true } as const;

/** Whether breaks are part of the protocol, and which. */
export function BreakFields() {
  const { register, watch, setValue } = useFormContext<StudyFormValues>();
  const isOn = watch('breaks') !== undefined;
  return (
    <div className="flex flex-col gap-4">
      <CheckboxField
        label="Register breaks"
        hint="The console calls each break, counts it down and asks every listener how tired they are. Going on early takes a reason, which is published."
        checked={isOn}
        onChange={(event) => setValue('breaks', event.target.checked ? usualBreaks : undefined, { shouldDirty: true })}
      />
      {isOn ? (
        <div className="grid gap-x-4 gap-y-6 sm:grid-cols-3">
          <NumberField {...register('breaks.trials', number)} label="Trials per block" step={1} min={1} max={20} />
          <NumberField {...register('breaks.leastMinutes', number)} label="Break, min" step={1} min={1} max={240} />
          <NumberField {...register('breaks.blocksPerDay', number)} label="Blocks a day" step={1} min={1} max={10} />
        </div>
      ) : null}
    </div>
  );
}
