import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { type InvitationAnswer, invitationAnswer } from '#shared/contracts/links.ts';
import { showProblem } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { Form } from '../../ui/form.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { useAcceptInvitation } from './invitations.queries.ts';

type AcceptFormProps = { token: string; email: string; onJoined: (organisationId: string) => void };

/** For an address without an account: name and password make one. */
export function AcceptForm({ token, email, onJoined }: AcceptFormProps) {
  const form = useForm<InvitationAnswer>({
    resolver: zodResolver(invitationAnswer),
    defaultValues: { token, name: '', password: '' },
  });
  const accept = useAcceptInvitation();

  async function submit(typed: InvitationAnswer) {
    try {
      onJoined((await accept.mutateAsync(typed)).organisationId);
    } catch (error) {
      showProblem(form, error);
    }
  }

  return (
    <Form
      form={form}
      onSubmit={submit}
      aria-label="Your account"
      actions={
        <Button
          type="submit"
          variant="primary"
          busy={form.formState.isSubmitting}
          busyLabel="Joining"
          className="self-start"
        >
          Accept and join
        </Button>
      }
    >
      <TextField label="E-mail" type="email" autoComplete="username" readOnly value={email} />
      <TextField
        label="Your name"
        hint="As others will read it beside what you do."
        autoComplete="name"
        {...form.register('name')}
      />
      <TextField
        label="Password"
        hint="At least 12 characters; a few words are easy to remember."
        type="password"
        autoComplete="new-password"
        {...form.register('password')}
      />
    </Form>
  );
}
