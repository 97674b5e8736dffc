import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { studiesApi } from '#shared/contracts/studies.ts';
import { showProblem } from '../../../lib/show-problem.ts';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { Form } from '../../../ui/form.tsx';
import { TextAreaField } from '../../../ui/text-area-field.tsx';
import { useToast } from '../../../ui/toast.tsx';
import { useDeviate } from '../studies.queries.ts';

/** The contract has a body; its type alone leaves that open. */
const deviation = studiesApi.deviate.body as NonNullable<typeof studiesApi.deviate.body>;

type RecordDeviationProps = { organisationId: string; studyId: string };

export function RecordDeviation({ organisationId, studyId }: RecordDeviationProps) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button onClick={() => setOpen(true)}>Record a deviation</Button>
      <Dialog
        isOpen={isOpen}
        onOpenChange={setOpen}
        title="Record a deviation"
        description="What differed from the sealed protocol, and why. It goes on the record with its time, cannot be taken back, and stands in the report."
      >
        <DeviationForm organisationId={organisationId} studyId={studyId} onRecorded={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

type DeviationFormProps = RecordDeviationProps & { onRecorded: () => void };

function DeviationForm({ organisationId, studyId, onRecorded }: DeviationFormProps) {
  const deviate = useDeviate(organisationId, studyId);
  const toast = useToast();
  const form = useForm({ resolver: zodResolver(deviation), defaultValues: { text: '' } });

  async function submit({ text }: { text: string }) {
    try {
      await deviate.mutateAsync(text);
      toast('The deviation is on the record.', 'held');
      onRecorded();
    } catch (problem) {
      showProblem(form, problem);
    }
  }

  return (
    <Form
      form={form}
      onSubmit={submit}
      actions={
        <div>
          <Button type="submit" variant="primary" busy={form.formState.isSubmitting} busyLabel="Recording">
            Record it
          </Button>
        </div>
      }
    >
      <TextAreaField
        {...form.register('text')}
        label="What differed, and why"
        rows={4}
        hint="Name no listener, and nothing of what you may have guessed about codes or answers."
      />
    </Form>
  );
}
