import { useFormContext, useWatch } from 'react-hook-form';
import { methodOf } from '#shared/methods/methods.ts';
import { CheckboxField } from '../../../ui/checkbox-field.tsx';
import { NumberField } from '../../../ui/number-field.tsx';
import type { StudyFormValues } from './study-form-values.ts';

/** Three times each, before ears tire of comparing. */
const usualMost = 9;

/** Whether one listener at a time asks for what is heard, where the method can be run so. */
export function OnRequestFields() {
  const { register, setValue, watch } = useFormContext<StudyFormValues>();
  const method = methodOf(watch('method'));
  const onRequest = useWatch<StudyFormValues, 'onRequest'>({ name: 'onRequest' });
  if (method.onRequest === null) return null;

  function turn(isOn: boolean) {
    setValue('onRequest', isOn ? { most: usualMost } : undefined, { shouldDirty: true });
    if (isOn) setValue('listenersPerSession', 1, { shouldDirty: true, shouldValidate: false });
  }

  const labels = method.presentations;
  return (
    <div className="flex flex-col gap-4">
      <CheckboxField
        label={`One listener at a time, who asks for ${labels.slice(0, -1).join(', ')} or ${labels.at(-1)}`}
        hint="Otherwise a group hears a fixed order. Whoever fits the cables sees the code and never what was asked for."
        checked={onRequest !== undefined}
        onChange={(event) => turn(event.target.checked)}
      />
      {onRequest === undefined ? null : (
        <NumberField
          {...register('onRequest.most', { valueAsNumber: true })}
          label="Presentations in a trial, at most"
          step={1}
          min={labels.length}
          max={30}
          hint="Each is heard at least once before the answer. The window of an answer begins anew after every presentation."
        />
      )}
    </div>
  );
}
