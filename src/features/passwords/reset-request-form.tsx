import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { type ResetRequest, resetRequest } from '#shared/contracts/links.ts';
import { showProblem } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { Form } from '../../ui/form.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { useAskForReset } from './passwords.queries.ts';

export function ResetRequestForm({ onAsked }: { onAsked: (email: string) => void }) {
  const form = useForm<ResetRequest>({ resolver: zodResolver(resetRequest), defaultValues: { email: '' } });
  const ask = useAskForReset();

  async function submit(typed: ResetRequest) {
    try {
      await ask.mutateAsync(typed);
      onAsked(typed.email);
    } catch (error) {
      showProblem(form, error);
    }
  }

  return (
    <Form
      form={form}
      onSubmit={submit}
      aria-label="Forgotten password"
      actions={
        <Button
          type="submit"
          variant="primary"
          busy={form.formState.isSubmitting}
          busyLabel="Sending"
          className="self-start"
        >
          Send me a link
        </Button>
      }
    >
      <TextField
        label="E-mail"
        hint="The address that you sign in with."
        type="email"
        autoComplete="username"
        autoCapitalize="none"
        spellCheck={false}
        {...form.register('email')}
      />
    </Form>
  );
}
