import { useController } from 'react-hook-form';
import type { Specimen } from '#shared/contracts/cables.ts';
import { CheckboxField } from '../../../ui/checkbox-field.tsx';
import { FieldNotes } from '../../../ui/field-notes.tsx';
import { useFieldWiring } from '../../../ui/field-wiring.ts';
import { Notice } from '../../../ui/notice.tsx';
import type { StudyFormValues } from './study-form-values.ts';

type Name = `cables.${0 | 1}.specimenIds` | `checks.steps.${number}.specimenIds`;
type SpecimenChoiceProps = { name: Name; cableName: string; specimens: readonly Specimen[] };

const practice =
  'At least two of each is good practice: with one piece of each cable, a difference between two pieces looks like a difference between two cables.';

export function SpecimenChoice({ name, cableName, specimens }: SpecimenChoiceProps) {
  const { field, fieldState } = useController<StudyFormValues, Name>({ name });
  // One piece makes a known difference as well as two.
  const hint = name.startsWith('checks') ? undefined : practice;
  const wiring = useFieldWiring({ hint });
  // One that was archived since is no longer shown; it goes with the next change.
  const chosen = (field.value ?? []).filter((id) => specimens.some((specimen) => specimen.id === id));

  function toggle(id: string, isChosen: boolean) {
    const others = chosen.filter((other) => other !== id);
    field.onChange(isChosen ? [...others, id] : others);
  }

  return (
    <fieldset aria-describedby={wiring.control['aria-describedby']} className="min-w-0 border-l-2 border-rule pl-4">
      <legend className="float-left w-full font-semibold">Specimens of {cableName}</legend>
      <div className="clear-both">
        {specimens.map((specimen, row) => (
          <CheckboxField
            key={specimen.id}
            ref={row === 0 ? field.ref : undefined}
            label={
              <>
                <span className="font-mono">{specimen.serial}</span>
                {specimen.note ? <span className="text-soft"> {specimen.note}</span> : null}
              </>
            }
            checked={chosen.includes(specimen.id)}
            onChange={(event) => toggle(specimen.id, event.target.checked)}
            onBlur={field.onBlur}
            error={row === specimens.length - 1 ? fieldState.error?.message : undefined}
          />
        ))}
        {specimens.length === 0 ? (
          <Notice tone="amber" title="No specimen yet.">
            Add the pieces of this cable on its own page first.
          </Notice>
        ) : null}
        <div className="flex flex-col gap-1.5">
          <FieldNotes wiring={wiring} hint={hint} />
        </div>
      </div>
    </fieldset>
  );
}
