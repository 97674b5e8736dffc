import { zodResolver } from '@hookform/resolvers/zod';
import { type ReactNode, useCallback, useRef } from 'react';
import { useController, useForm } from 'react-hook-form';
import { cautions } from '#shared/contracts/proctor-live.ts';
import type { KeptPreset } from '#shared/contracts/rig-presets.ts';
import { type RigPreset, rigPreset, rigs } from '#shared/protocol/rig-preset.ts';
import { showProblem } from '../../lib/show-problem.ts';
import { Actions } from '../../ui/actions.tsx';
import { Button } from '../../ui/button.tsx';
import { CheckboxField } from '../../ui/checkbox-field.tsx';
import { FieldNotes } from '../../ui/field-notes.tsx';
import { useFieldWiring } from '../../ui/field-wiring.ts';
import { Form } from '../../ui/form.tsx';
import { LeaveGuard } from '../../ui/leave-guard.tsx';
import { RadioGroupField } from '../../ui/radio-group-field.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { cautionNames, rigWords } from './preset-words.ts';
import { StepFields } from './step-fields.tsx';

type PresetFormProps = {
  values: RigPreset;
  save: (preset: RigPreset) => Promise<KeptPreset>;
  /** Where to go once it is saved; nothing typed is lost until then. */
  onSaved: (kept: KeptPreset) => void;
  saveWord: string;
  /** The way out without saving. */
  cancel: ReactNode;
};

export function PresetForm({ values, save, onSaved, saveWord, cancel }: PresetFormProps) {
  const form = useForm<RigPreset>({ resolver: zodResolver(rigPreset), defaultValues: values });
  const { isDirty, isSubmitting } = form.formState;
  const isSaved = useRef(false);
  const isUnsaved = useCallback(() => isDirty && !isSaved.current, [isDirty]);

  async function submit(preset: RigPreset) {
    try {
      const kept = await save(preset);
      isSaved.current = true;
      onSaved(kept);
    } catch (error) {
      showProblem(form, error);
    }
  }

  return (
    <>
      <LeaveGuard isUnsaved={isUnsaved} />
      <Form
        form={form}
        onSubmit={submit}
        aria-label="Rig preset"
        className="max-w-3xl"
        actions={
          <Actions>
            <Button type="submit" variant="primary" busy={isSubmitting} busyLabel="Saving">
              {saveWord}
            </Button>
            {cancel}
          </Actions>
        }
      >
        <TextField label="Name" autoComplete="off" {...form.register('name')} />
        <RadioGroupField
          label="Where the cables are used"
          options={rigs.map((rig) => ({ value: rig, label: rigWords[rig] }))}
          {...form.register('kind')}
        />
        <StepFields />
        <TextAreaField
          label="Where levels are measured"
          rows={2}
          hint="In words, so that two people measure at the same place."
          {...form.register('levelsAt')}
        />
        <CautionFields />
      </Form>
    </>
  );
}

/** What the proctor must read and tick. */
function CautionFields() {
  const { field } = useController<RigPreset, 'cautions'>({ name: 'cautions' });
  const wiring = useFieldWiring({ name: 'cautions' });
  return (
    <fieldset className="flex min-w-0 flex-col gap-1">
      <legend className="mb-1 font-semibold">Cautions that the proctor reads and ticks before seating</legend>
      {cautions.map((caution) => (
        <CheckboxField
          key={caution}
          label={cautionNames[caution]}
          checked={field.value.includes(caution)}
          onChange={({ target }) =>
            field.onChange(cautions.filter((one) => (one === caution ? target.checked : field.value.includes(one))))
          }
          onBlur={field.onBlur}
        />
      ))}
      <FieldNotes wiring={wiring} />
    </fieldset>
  );
}
