import { useFormContext } from 'react-hook-form';
import { methodOf } from '#shared/methods/methods.ts';
import { CheckboxField } from '../../../ui/checkbox-field.tsx';
import type { StudyFormValues } from './study-form-values.ts';

/** Whether what comes again within a trial has specimens, and codes, of its own. */
export function SeparateField() {
  const { register, watch, formState } = useFormContext<StudyFormValues>();
  const { separate, name } = methodOf(watch('method'));
  if (separate === null)
    return (
      <p className="text-soft">
        In {name.toLowerCase()} no code comes twice in a trial, so separate specimens would hide nothing.
      </p>
    );
  return (
    <CheckboxField
      {...register('separateSpecimens')}
      label={`Fit ${separate.what} from separate specimens`}
      hint="Then no code comes twice in a trial, and whoever fits the cables cannot tell from the codes what is right. Takes two specimens of each cable at least. Only so can a study be fully double-blind."
      error={formState.errors.separateSpecimens?.message}
    />
  );
}
