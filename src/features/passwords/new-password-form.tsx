import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { type PasswordChoice, passwordChoice } from '#shared/contracts/links.ts';
import { showProblem } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { Form } from '../../ui/form.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { useResetPassword } from './passwords.queries.ts';

type NewPasswordFormProps = { token: string; email: string; onSet: () => void };

export function NewPasswordForm({ token, email, onSet }: NewPasswordFormProps) {
  const form = useForm<PasswordChoice>({
    resolver: zodResolver(passwordChoice),
    defaultValues: { token, password: '' },
  });
  const reset = useResetPassword();

  async function submit(typed: PasswordChoice) {
    try {
      await reset.mutateAsync(typed);
      onSet();
    } catch (error) {
      showProblem(form, error);
    }
  }

  return (
    <Form
      form={form}
      onSubmit={submit}
      aria-label="New password"
      actions={
        <Button
          type="submit"
          variant="primary"
          busy={form.formState.isSubmitting}
          busyLabel="Setting"
          className="self-start"
        >
          Set the password
        </Button>
      }
    >
      <TextField label="E-mail" type="email" autoComplete="username" readOnly value={email} />
      <TextField
        label="New password"
        hint="At least 12 characters; a few words are easy to remember."
        type="password"
        autoComplete="new-password"
        {...form.register('password')}
      />
    </Form>
  );
}
