import { useFormContext } from 'react-hook-form';
import type { KeptPreset } from '#shared/contracts/rig-presets.ts';
import { CheckboxField } from '../../../ui/checkbox-field.tsx';
import { NumberField } from '../../../ui/number-field.tsx';
import { TextAreaField } from '../../../ui/text-area-field.tsx';
import { FormSection } from './form-section.tsx';
import { RigChoice } from './rig-choice.tsx';
import type { StudyFormValues } from './study-form-values.ts';

const number = { valueAsNumber: true } as const;

export function RigFields({ presets, presetsTo }: { presets: readonly KeptPreset[]; presetsTo: string }) {
  const { register } = useFormContext<StudyFormValues>();
  return (
    <FormSection title="The rig and the clock">
      <RigChoice presets={presets} presetsTo={presetsTo} />
      <TextAreaField
        {...register('chain')}
        label="Chain"
        hint="Source, amplifier and transducers, as a reader would need them to repeat the test."
      />
      <div className="grid gap-x-4 gap-y-6 sm:grid-cols-2">
        <NumberField
          {...register('changeS', number)}
          label="Length of a change"
          unit="s"
          step={1}
          min={3}
          max={300}
          hint="Every change ends at this time, whether or not the cable is another one. By hand a change takes 15 to 75 s."
        />
        <NumberField
          {...register('answerS', number)}
          label="Answer window"
          unit="s"
          step={1}
          min={5}
          max={300}
          hint="A trial locks when all have answered, or when this is over."
        />
      </div>
      <CheckboxField
        {...register('confidence')}
        label="Ask how sure the listener is"
        hint="Kept with the answer; the registered test does not use it."
      />
    </FormSection>
  );
}
