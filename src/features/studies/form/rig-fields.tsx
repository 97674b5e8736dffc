import { useFormContext } from 'react-hook-form';
import { rigs } from '#shared/protocol/rig-preset.ts';
import { CheckboxField } from '../../../ui/checkbox-field.tsx';
import { NumberField } from '../../../ui/number-field.tsx';
import { RadioGroupField } from '../../../ui/radio-group-field.tsx';
import { TextAreaField } from '../../../ui/text-area-field.tsx';
import { rigWords } from '../study-words.ts';
import { FormSection } from './form-section.tsx';
import type { StudyFormValues } from './study-form-values.ts';

const number = { valueAsNumber: true } as const;
const rigOptions = rigs.map((rig) => ({ value: rig, label: rigWords[rig] }));

export function RigFields() {
  const { register } = useFormContext<StudyFormValues>();
  return (
    <FormSection title="The rig and the clock">
      <RadioGroupField
        {...register('rig')}
        label="Where the cables are used"
        options={rigOptions}
        hint="Decides which cautions and which steps of a change the proctor is shown."
      />
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
