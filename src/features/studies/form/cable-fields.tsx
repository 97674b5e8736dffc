import { useFormContext } from 'react-hook-form';
import type { Cable } from '#shared/contracts/cables.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { CableChoice } from './cable-choice.tsx';
import { FormSection } from './form-section.tsx';
import { PredictedDifference } from './predicted-difference.tsx';
import { SeparateField } from './separate-field.tsx';
import type { StudyFormValues } from './study-form-values.ts';
import { TreatmentChoice, TreatmentFields } from './treatment-fields.tsx';

/** The order of the cables means something only to a method that asks in one direction. */
export function CableFields({ cables }: { cables: readonly Cable[] }) {
  const { watch } = useFormContext<StudyFormValues>();
  const isTreatment = watch('treatment') !== undefined;
  const { attribute } = methodOf(watch('method'));
  const lede =
    attribute === null
      ? 'What listeners hear as which is drawn; the order here means nothing.'
      : 'What listeners hear first is drawn. The order here is the direction of the test, fixed before the first trial.';
  return (
    <FormSection title="The two cables" lede={lede}>
      <TreatmentChoice />
      <CableChoice
        index={0}
        label={isTreatment ? 'The cable' : (attribute?.firstCable ?? 'One cable')}
        cables={cables}
      />
      <CableChoice index={1} label="The other cable" cables={cables} />
      <TreatmentFields />
      <SeparateField />
      <PredictedDifference cables={cables} />
    </FormSection>
  );
}
