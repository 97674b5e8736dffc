import { zodResolver } from '@hookform/resolvers/zod';
import { type ReactNode, useCallback, useRef } from 'react';
import { type Resolver, useForm } from 'react-hook-form';
import { type Cable, type CableDraft, cableKinds } from '#shared/contracts/cables.ts';
import { showProblem } from '../../lib/show-problem.ts';
import { Actions } from '../../ui/actions.tsx';
import { Button } from '../../ui/button.tsx';
import { Form } from '../../ui/form.tsx';
import { LeaveGuard } from '../../ui/leave-guard.tsx';
import { NumberField } from '../../ui/number-field.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { type CableFormValues, typedCable } from './cable-form-values.ts';
import { kindWords } from './cable-words.ts';
import { ConstructionFields } from './construction-fields.tsx';

type CableFormProps = {
  values: CableFormValues;
  save: (draft: CableDraft) => Promise<Cable>;
  /** Where to go once it is saved; nothing typed is lost until then. */
  onSaved: (cable: Cable) => void;
  saveWord: string;
  /** The way out without saving. */
  cancel: ReactNode;
};

const kindOptions = cableKinds.map((kind) => ({ value: kind, label: kindWords[kind] }));

export function CableForm({ values, save, onSaved, saveWord, cancel }: CableFormProps) {
  const form = useForm<CableFormValues, unknown, CableDraft>({
    resolver: zodResolver(typedCable) as Resolver<CableFormValues, unknown, CableDraft>,
    defaultValues: values,
  });
  const { isDirty, isSubmitting } = form.formState;
  const isSaved = useRef(false);
  const isUnsaved = useCallback(() => isDirty && !isSaved.current, [isDirty]);

  async function submit(draft: CableDraft) {
    try {
      const cable = await save(draft);
      isSaved.current = true;
      onSaved(cable);
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
        aria-label="Cable"
        className="max-w-2xl"
        actions={
          <Actions>
            <Button type="submit" variant="primary" busy={isSubmitting} busyLabel="Saving">
              {saveWord}
            </Button>
            {cancel}
          </Actions>
        }
      >
        <TextField
          label="Name"
          hint="The model as your team calls it. Listeners and the proctor never see it."
          autoComplete="off"
          {...form.register('name')}
        />
        <div className="grid gap-6 sm:grid-cols-2">
          <SelectField label="Kind" placeholder="Choose" options={kindOptions} {...form.register('kind')} />
          <NumberField
            label="Length"
            unit="m"
            min={0}
            hint="To the millimetre: 2.5 or 0.75"
            {...form.register('lengthMm')}
          />
        </div>
        <TextAreaField
          label="Description"
          optional
          rows={5}
          hint="Whatever the construction below has no field for, and who says so."
          {...form.register('description')}
        />
        <ConstructionFields />
      </Form>
    </>
  );
}
