import { useFormContext, useWatch } from 'react-hook-form';
import type { Cable } from '#shared/contracts/cables.ts';
import { nameInStudy } from '#shared/protocol/treatment.ts';
import { formatLength } from '../../../lib/format.ts';
import { SelectField } from '../../../ui/select-field.tsx';
import { SpecimenChoice } from './specimen-choice.tsx';
import { groupsOf, rigOfKind, type StudyFormValues } from './study-form-values.ts';

type CableChoiceProps = { index: 0 | 1; label: string; cables: readonly Cable[] };

const noGroups: StudyFormValues['cables'] = [
  { cableId: '', specimenIds: [] },
  { cableId: '', specimenIds: [] },
];

/** One of the two cables and the pieces of it that are heard. */
export function CableChoice({ index, label, cables }: CableChoiceProps) {
  const { register, setValue, getFieldState } = useFormContext<StudyFormValues>();
  const name = `cables.${index}.cableId` as const;
  const cableId = useWatch<StudyFormValues, typeof name>({ name });
  const ofQuestion = cables.filter(({ kind }) => kind !== 'check');
  const cable = cables.find(({ id }) => id === cableId);
  const treatment = useWatch<StudyFormValues, 'treatment'>({ name: 'treatment' });
  const isTreatment = treatment !== undefined;
  const pieces = cable ? (
    <SpecimenChoice
      name={`cables.${index}.specimenIds`}
      cableName={nameInStudy(cable.name, index, treatment)}
      specimens={livingSpecimens(cable)}
    />
  ) : null;
  // The treated pieces are of the cable that is chosen above.
  if (isTreatment && index === 1) return pieces;

  function takeUp(chosenId: string) {
    const chosen = cables.find(({ id }) => id === chosenId);
    if (isTreatment) setValue('cables', chosen ? groupsOf(chosen) : noGroups, { shouldDirty: true });
    else {
      const specimenIds = chosen ? livingSpecimens(chosen).map(({ id }) => id) : [];
      setValue(`cables.${index}.specimenIds`, specimenIds, { shouldDirty: true });
    }
    const rig = chosen ? rigOfKind[chosen.kind] : undefined;
    if (rig !== undefined && !getFieldState('rig').isDirty) setValue('rig', rig);
  }

  return (
    <div className="flex flex-col gap-4">
      <SelectField
        {...register(name, { onChange: (event: { target: { value: string } }) => takeUp(event.target.value) })}
        label={label}
        placeholder="Choose a cable"
        options={ofQuestion.map((choice) => ({
          value: choice.id,
          label: `${choice.name}, ${formatLength(choice.lengthMm)}`,
        }))}
      />
      {pieces}
    </div>
  );
}

function livingSpecimens({ specimens }: Cable): Cable['specimens'] {
  return specimens.filter(({ archived }) => !archived);
}
