import { useController, useFormContext } from 'react-hook-form';
import { methodOf, methods } from '#shared/methods/methods.ts';
import { CheckboxField } from '../../../ui/checkbox-field.tsx';
import { SelectField } from '../../../ui/select-field.tsx';
import { TextField } from '../../../ui/text-field.tsx';
import { OnRequestFields } from './on-request-fields.tsx';
import type { StudyFormValues } from './study-form-values.ts';

const methodOptions = Object.values(methods).map(({ id, name }) => ({ value: id, label: name }));

/** The method, and whatever it leaves to the study. Another method starts with its settings off, no attribute and no margin. */
export function MethodFields() {
  const { register, setValue, watch, formState } = useFormContext<StudyFormValues>();
  const { field, fieldState } = useController<StudyFormValues, 'methodSettings'>({ name: 'methodSettings' });
  const method = methodOf(watch('method'));
  const chosen = field.value ?? [];
  const turn = (id: string, isOn: boolean) =>
    field.onChange([...chosen.filter((other) => other !== id), ...(isOn ? [id] : [])]);
  const startAnew = () => {
    setValue('methodSettings', [], { shouldDirty: true });
    setValue('attribute', '', { shouldDirty: true });
    setValue('marginPercent', undefined, { shouldDirty: true });
    setValue('checks', undefined, { shouldDirty: true });
    setValue('separateSpecimens', false, { shouldDirty: true });
    setValue('onRequest', undefined, { shouldDirty: true });
  };
  return (
    <div className="flex flex-col gap-3">
      <SelectField
        {...register('method', { onChange: startAnew })}
        label="Method"
        options={methodOptions}
        hint={`Listeners are told: “${method.explanation}”`}
      />
      {method.attribute === null ? null : (
        <TextField
          {...register('attribute')}
          label={method.attribute.label}
          hint={method.attribute.hint}
          error={formState.errors.attribute?.message}
        />
      )}
      {method.settings.map(({ id, label, hint }) => (
        <CheckboxField
          key={id}
          label={label}
          hint={hint}
          error={fieldState.error?.message}
          checked={chosen.includes(id)}
          onChange={(event) => turn(id, event.target.checked)}
          onBlur={field.onBlur}
        />
      ))}
      <OnRequestFields />
    </div>
  );
}
