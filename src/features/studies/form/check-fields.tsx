import { useFieldArray, useFormContext, useWatch } from 'react-hook-form';
import type { Cable } from '#shared/contracts/cables.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { Button } from '../../../ui/button.tsx';
import { CheckboxField } from '../../../ui/checkbox-field.tsx';
import { NumberField } from '../../../ui/number-field.tsx';
import { SelectField } from '../../../ui/select-field.tsx';
import { CheckCost } from './check-cost.tsx';
import { CheckStepRow } from './check-step-row.tsx';
import { FormSection } from './form-section.tsx';
import type { StudyFormValues } from './study-form-values.ts';

const mostSteps = 5;
const number = { valueAsNumber: true } as const;

/** A new step: as many trials as show a known difference at 5 % with one answer wrong. */
const newStep = (milliDb: number) => ({ milliDb, cableId: '', specimenIds: [], trials: 8 });
const usualLadder = [1000, 500, 300, 200, 100] as const;

/** Known differences among the trials: whether this set-up and these listeners would have shown one. */
export function CheckFields({ cables }: { cables: readonly Cable[] }) {
  const { setValue, clearErrors } = useFormContext<StudyFormValues>();
  const checks = useWatch<StudyFormValues, 'checks'>({ name: 'checks' });
  const [method, attribute] = useWatch<StudyFormValues, ['method', 'attribute']>({ name: ['method', 'attribute'] });
  const refusal = methodOf(method).takesNoSteps({ attribute });
  const isAsked = checks !== undefined;

  function turn(isOn: boolean) {
    clearErrors('checks');
    const first = refusal === null ? [newStep(1000)] : [];
    setValue('checks', isOn ? { reference: 0, steps: first, same: 2, excludes: false } : undefined, {
      shouldDirty: true,
    });
  }

  return (
    <FormSection
      title="Known differences"
      lede="A test that finds nothing says little, unless the same people with the same changes heard a difference that is known to be there."
    >
      <SelectField
        label="Put known differences among the trials"
        value={isAsked ? 'yes' : 'no'}
        onChange={(event) => turn(event.target.value === 'yes')}
        options={[
          { value: 'no', label: 'no' },
          { value: 'yes', label: 'yes, as check trials' },
        ]}
        hint={
          isAsked
            ? 'Nobody can tell them from the others.'
            : 'A check cable is the reference cable with a measured series resistor in a matching sleeve. It is coded with the others.'
        }
      />
      {isAsked ? <CheckPlan cables={cables} refusal={refusal} /> : null}
    </FormSection>
  );
}

function CheckPlan({ cables, refusal }: { cables: readonly Cable[]; refusal: string | null }) {
  const { register, formState, control } = useFormContext<StudyFormValues>();
  const { fields, append, remove } = useFieldArray({ control, name: 'checks.steps' });
  const chosen = useWatch<StudyFormValues, 'cables'>({ name: 'cables' });
  const errors = formState.errors.checks;
  const nameOf = (place: 0 | 1) => cables.find(({ id }) => id === chosen[place].cableId)?.name;
  const checkCables = cables.filter(({ kind }) => kind === 'check');
  return (
    <>
      <SelectField
        {...register('checks.reference', { setValueAs: Number })}
        label="Reference cable"
        options={[
          { value: '0', label: nameOf(0) ?? 'the one cable' },
          { value: '1', label: nameOf(1) ?? 'the other cable' },
        ]}
        hint="A check trial compares it with a check cable, by the same method and question as every other."
      />
      {refusal === null ? null : <p className="border-l-4 border-amber pl-3">{refusal}.</p>}
      {fields.length > 0 ? (
        <ol className="flex flex-col gap-5">
          {fields.map((row, index) => (
            <CheckStepRow key={row.id} index={index} cables={checkCables} onRemove={() => remove(index)} />
          ))}
        </ol>
      ) : null}
      {errors?.steps?.root?.message || errors?.steps?.message ? (
        <p role="alert" className="border-l-4 border-amber pl-3 font-semibold text-amber">
          {errors.steps.root?.message ?? errors.steps.message}
        </p>
      ) : null}
      {refusal === null ? (
        <div>
          <Button
            onClick={() => append(newStep(usualLadder[fields.length] ?? 100), { shouldFocus: false })}
            disabled={fields.length >= mostSteps}
          >
            Add a step
          </Button>
        </div>
      ) : null}
      <NumberField
        {...register('checks.same', number)}
        label="Trials of the same with the same"
        unit="per session"
        step={1}
        min={0}
        max={20}
        hint="The reference cable against itself. No answer is right; the answers show habits."
      />
      {fields.length > 0 ? (
        <CheckboxField
          {...register('checks.excludes')}
          label="Also give a second result without listeners who do not hear the largest step"
          hint="Decided by the check trials alone, at closing. The result of all listeners comes first and stays the finding."
          error={errors?.excludes?.message}
        />
      ) : null}
      <CheckCost />
    </>
  );
}
