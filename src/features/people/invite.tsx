import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { roles } from '#shared/contracts/endpoint.ts';
import { type InvitationDraft, invitationDraft } from '#shared/contracts/people.ts';
import { roleWords } from '../../lib/role-words.ts';
import { showProblem } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { Form } from '../../ui/form.tsx';
import { RadioGroupField } from '../../ui/radio-group-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { useToast } from '../../ui/toast.tsx';
import { useInvite } from './people.queries.ts';

const roleHints = {
  owner: 'Decides who belongs to the organisation',
  manager: 'Plans, seals and closes studies; sees the cables',
  proctor: 'Runs sessions; sees no cables',
  reviewer: 'Reads reports; can hold a study’s codes',
} as const;
const roleOptions = roles.map((role) => ({ value: role, label: roleWords[role], hint: roleHints[role] }));

/** A button that opens the form for an invitation. */
export function Invite({ organisationId }: { organisationId: string }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button variant="primary" onClick={() => setOpen(true)}>
        Invite somebody
      </Button>
      <Dialog
        isOpen={isOpen}
        onOpenChange={setOpen}
        title="Invite somebody"
        description="They get a link by e-mail that works once, for seven days."
      >
        <InviteForm organisationId={organisationId} onInvited={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

function InviteForm({ organisationId, onInvited }: { organisationId: string; onInvited: () => void }) {
  const form = useForm<InvitationDraft>({
    resolver: zodResolver(invitationDraft),
    defaultValues: { email: '' },
  });
  const invite = useInvite(organisationId);
  const showToast = useToast();

  async function submit(draft: InvitationDraft) {
    try {
      const { email } = await invite.mutateAsync(draft);
      showToast(`${email} is invited.`, 'held');
      onInvited();
    } catch (error) {
      showProblem(form, error);
    }
  }

  return (
    <Form
      form={form}
      onSubmit={submit}
      aria-label="Invitation"
      actions={
        <Button
          type="submit"
          variant="primary"
          busy={form.formState.isSubmitting}
          busyLabel="Sending"
          className="self-start"
        >
          Send the invitation
        </Button>
      }
    >
      <TextField
        label="E-mail"
        type="email"
        autoComplete="off"
        autoCapitalize="none"
        spellCheck={false}
        {...form.register('email')}
      />
      <RadioGroupField label="Role" options={roleOptions} {...form.register('role')} />
    </Form>
  );
}
