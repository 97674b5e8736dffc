import { zodResolver } from '@hookform/resolvers/zod';
import { useCallback, useEffect } from 'react';
import { useForm } from 'react-hook-form';
import { type SpecimenDraft, specimenDraft } from '#shared/contracts/cables.ts';
import { showProblem } from '../../lib/show-problem.ts';
import { Actions } from '../../ui/actions.tsx';
import { Button } from '../../ui/button.tsx';
import { Form } from '../../ui/form.tsx';
import { LeaveGuard } from '../../ui/leave-guard.tsx';
import { TextField } from '../../ui/text-field.tsx';

type SpecimenFormProps = {
  'aria-label': string;
  values: SpecimenDraft;
  save: (draft: SpecimenDraft) => Promise<unknown>;
  /** The form is then as it began, ready for the next. */
  onSaved: (draft: SpecimenDraft) => void;
  saveWord: string;
  onCancel?: () => void;
};

/** One is open at a time; opened by a button (and so with a way to cancel) it takes the focus. */
export function SpecimenForm({ values, save, onSaved, saveWord, onCancel, 'aria-label': label }: SpecimenFormProps) {
  const form = useForm<SpecimenDraft>({ resolver: zodResolver(specimenDraft), defaultValues: values });
  const { setFocus } = form;
  const { isDirty, isSubmitting } = form.formState;
  const isUnsaved = useCallback(() => isDirty, [isDirty]);
  const isOpened = onCancel !== undefined;
  useEffect(() => {
    if (isOpened) setFocus('serial');
  }, [isOpened, setFocus]);

  async function submit(draft: SpecimenDraft) {
    try {
      await save(draft);
      form.reset(values);
      setFocus('serial');
      onSaved(draft);
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
        aria-label={label}
        actions={
          <Actions>
            <Button type="submit" variant="primary" busy={isSubmitting} busyLabel="Saving">
              {saveWord}
            </Button>
            {onCancel === undefined ? null : (
              <Button variant="quiet" onClick={onCancel}>
                {isDirty ? 'Cancel' : 'Close'}
              </Button>
            )}
          </Actions>
        }
      >
        <div className="grid gap-6 sm:grid-cols-[14rem_minmax(0,1fr)]">
          <TextField
            label="Mark on the piece"
            hint="A serial number, or a mark of yours"
            mono
            autoComplete="off"
            {...form.register('serial')}
          />
          <TextField
            label="Note"
            optional
            hint="Where it came from, what was done to it"
            autoComplete="off"
            {...form.register('note')}
          />
        </div>
      </Form>
    </>
  );
}
