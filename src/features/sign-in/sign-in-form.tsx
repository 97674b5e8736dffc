import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { type Credentials, credentials } from '#shared/contracts/sign-in.ts';
import { Problem } from '#shared/problem.ts';
import { showProblem } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { Form } from '../../ui/form.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { useSignIn } from './sign-in.queries.ts';

type SignInFormProps = {
  /** The one address that will do, where it is settled. */
  email?: string;
  onSignedIn: () => void;
};

export function SignInForm({ email, onSignedIn }: SignInFormProps) {
  const form = useForm<Credentials>({
    resolver: zodResolver(credentials),
    defaultValues: { email: email ?? '', password: '' },
  });
  const signIn = useSignIn();
  const isBusy = form.formState.isSubmitting;

  async function submit(typed: Credentials) {
    try {
      await signIn.mutateAsync(typed);
      onSignedIn();
    } catch (error) {
      if (error instanceof Problem && error.code === 'wrong-credentials')
        form.setError('password', { type: error.code, message: error.message });
      else showProblem(form, error);
    }
  }

  return (
    <Form
      form={form}
      onSubmit={submit}
      aria-label="Sign in"
      actions={
        <Button type="submit" variant="primary" busy={isBusy} busyLabel="Signing in" className="self-start">
          Sign in
        </Button>
      }
    >
      <TextField
        label="E-mail"
        type="email"
        autoComplete="username"
        readOnly={email !== undefined}
        autoCapitalize="none"
        spellCheck={false}
        {...form.register('email')}
      />
      <TextField label="Password" type="password" autoComplete="current-password" {...form.register('password')} />
    </Form>
  );
}
