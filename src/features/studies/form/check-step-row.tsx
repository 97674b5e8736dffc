import { useController, useFormContext, useWatch } from 'react-hook-form';
import type { Cable } from '#shared/contracts/cables.ts';
import { Button } from '../../../ui/button.tsx';
import { NumberField } from '../../../ui/number-field.tsx';
import { SelectField } from '../../../ui/select-field.tsx';
import { usePlan } from '../planner/plan-context.ts';
import { fewestForStep } from '../planner/plan-of.ts';
import { SpecimenChoice } from './specimen-choice.tsx';
import type { StudyFormValues } from './study-form-values.ts';

type CheckStepRowProps = { index: number; cables: readonly Cable[]; onRemove: () => void };

/** One step of the ladder: its measured size, the check cable that makes it, and how often it is asked. */
export function CheckStepRow({ index, cables, onRemove }: CheckStepRowProps) {
  const { register, setValue } = useFormContext<StudyFormValues>();
  const step = `checks.steps.${index}` as const;
  const size = useController<StudyFormValues, `${typeof step}.milliDb`>({ name: `${step}.milliDb` });
  const cableId = useWatch<StudyFormValues, `${typeof step}.cableId`>({ name: `${step}.cableId` });
  const trials = useWatch<StudyFormValues, `${typeof step}.trials`>({ name: `${step}.trials` }) ?? 0;
  const milliDb = size.field.value ?? Number.NaN;
  const { plan } = usePlan();
  const cable = cables.find(({ id }) => id === cableId);
  const living = (cable?.specimens ?? []).filter(({ archived }) => !archived);
  const fewest = plan === null ? null : fewestForStep(plan);
  const isTooFew = plan !== null && fewest !== null && trials * plan.sessions < fewest;

  function takeUp(chosenId: string) {
    const specimens = cables.find(({ id }) => id === chosenId)?.specimens.filter(({ archived }) => !archived) ?? [];
    setValue(
      `${step}.specimenIds`,
      specimens.map(({ id }) => id),
      { shouldDirty: true },
    );
  }

  return (
    <li className="flex flex-col gap-3 border-b border-rule pb-4">
      <div className="grid grid-cols-2 gap-4">
        <NumberField
          ref={size.field.ref}
          name={size.field.name}
          onBlur={size.field.onBlur}
          value={Number.isFinite(milliDb) ? milliDb / 1000 : ''}
          onChange={(event) =>
            size.field.onChange(event.target.value === '' ? Number.NaN : Math.round(Number(event.target.value) * 1000))
          }
          label={`Step ${index + 1}, measured`}
          unit="dB"
          min={0.01}
          max={20}
        />
        <NumberField
          {...register(`${step}.trials`, { valueAsNumber: true })}
          label="Trials"
          unit="per session"
          step={1}
          min={1}
          max={30}
        />
      </div>
      {isTooFew ? (
        <p className="border-l-4 border-amber pl-3">
          Even with every answer right {trials * plan.sessions} in all cannot show that it was heard. It takes at least{' '}
          {fewest}.
        </p>
      ) : null}
      <SelectField
        {...register(`${step}.cableId`, {
          onChange: (event: { target: { value: string } }) => takeUp(event.target.value),
        })}
        label={`Check cable of step ${index + 1}`}
        placeholder="Choose a check cable"
        options={cables.map(({ id, name }) => ({ value: id, label: name }))}
        hint={
          cables.length === 0
            ? 'There is none yet. Add a cable of the kind “check cable” with its specimen.'
            : undefined
        }
      />
      {cable ? <SpecimenChoice name={`${step}.specimenIds`} cableName={cable.name} specimens={living} /> : null}
      <div className="-ml-4">
        <Button variant="quiet" onClick={onRemove} aria-label={`Remove step ${index + 1}`}>
          Remove
        </Button>
      </div>
    </li>
  );
}
