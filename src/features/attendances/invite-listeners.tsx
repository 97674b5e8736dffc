import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { attendanceDraft } from '#shared/contracts/attendances.ts';
import { formatCount } from '../../lib/format.ts';
import { showProblem } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { Form } from '../../ui/form.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';
import { useToast } from '../../ui/toast.tsx';
import { useInviteListeners } from './attendances.queries.ts';

type InviteListenersProps = { organisationId: string; sessionId: string };
type Typed = { addresses: string };

/** Addresses are pasted as they come; a wrong one is named with its line, and nothing typed is lost. */
export function InviteListeners({ organisationId, sessionId }: InviteListenersProps) {
  const form = useForm<Typed, unknown, { addresses: string[] }>({
    resolver: zodResolver(attendanceDraft),
    defaultValues: { addresses: '' },
  });
  const invite = useInviteListeners(organisationId, sessionId);
  const showToast = useToast();

  async function submit() {
    try {
      showToast(wordsOf(await invite.mutateAsync(form.getValues('addresses'))), 'held');
      form.reset({ addresses: '' });
    } catch (error) {
      showProblem(form, error);
    }
  }

  return (
    <Form
      form={form}
      onSubmit={submit}
      aria-label="Invite listeners"
      className="max-w-2xl"
      actions={
        <Button
          type="submit"
          variant="primary"
          busy={form.formState.isSubmitting}
          busyLabel="Inviting"
          className="self-start"
        >
          Invite them
        </Button>
      }
    >
      <TextAreaField
        label="E-mail addresses"
        hint="One a line, or with commas between them. Seats are offered in this order; whoever comes after the last seat goes on the waiting list."
        rows={4}
        autoCapitalize="none"
        autoComplete="off"
        spellCheck={false}
        {...form.register('addresses')}
      />
    </Form>
  );
}

function wordsOf({ invited, waiting, already }: { invited: number; waiting: number; already: number }): string {
  const parts = [
    `${formatCount(invited, 'listener')} invited`,
    ...(waiting === 0 ? [] : [`${waiting} on the waiting list`]),
    ...(already === 0 ? [] : [`${already} invited before`]),
  ];
  return `${parts.join(', ')}.`;
}
