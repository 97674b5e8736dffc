import { useFormContext, useWatch } from 'react-hook-form';
import type { Cable } from '#shared/contracts/cables.ts';
import { formatLength } from '../../../lib/format.ts';
import { SelectField } from '../../../ui/select-field.tsx';
import { SpecimenChoice } from './specimen-choice.tsx';
import { rigOfKind, type StudyFormValues } from './study-form-values.ts';

type CableChoiceProps = { index: 0 | 1; label: string; cables: readonly Cable[] };

/** One of the two cables and the pieces of it that are heard. */
export function CableChoice({ index, label, cables }: CableChoiceProps) {
  const { register, setValue, getFieldState } = useFormContext<StudyFormValues>();
  const name = `cables.${index}.cableId` as const;
  const cableId = useWatch<StudyFormValues, typeof name>({ name });
  const cable = cables.find(({ id }) => id === cableId);

  function takeUp(chosenId: string) {
    const chosen = cables.find(({ id }) => id === chosenId);
    const specimenIds = chosen ? livingSpecimens(chosen).map(({ id }) => id) : [];
    setValue(`cables.${index}.specimenIds`, specimenIds, { shouldDirty: true });
    const rig = chosen ? rigOfKind[chosen.kind] : undefined;
    if (rig !== undefined && !getFieldState('rig').isDirty) setValue('rig', rig);
  }

  return (
    <div className="flex flex-col gap-4">
      <SelectField
        {...register(name, { onChange: (event: { target: { value: string } }) => takeUp(event.target.value) })}
        label={label}
        placeholder="Choose a cable"
        options={cables.map((choice) => ({
          value: choice.id,
          label: `${choice.name}, ${formatLength(choice.lengthMm)}`,
        }))}
      />
      {cable ? <SpecimenChoice index={index} cableName={cable.name} specimens={livingSpecimens(cable)} /> : null}
    </div>
  );
}

function livingSpecimens({ specimens }: Cable): Cable['specimens'] {
  return specimens.filter(({ archived }) => !archived);
}
