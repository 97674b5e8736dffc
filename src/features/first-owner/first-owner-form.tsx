import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { type FirstOwnerDraft, firstOwnerDraft, linksApi } from '#shared/contracts/links.ts';
import { call } from '../../lib/call.ts';
import { showProblem } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { Form } from '../../ui/form.tsx';
import { TextField } from '../../ui/text-field.tsx';

export function FirstOwnerForm({ token, onCreated }: { token: string; onCreated: () => void }) {
  const client = useQueryClient();
  const create = useMutation({
    mutationFn: (body: FirstOwnerDraft) => call(linksApi.createFirstOwner, { body }),
    onSuccess: () => client.clear(),
  });
  const form = useForm<FirstOwnerDraft>({
    resolver: zodResolver(firstOwnerDraft),
    defaultValues: { token, organisation: '', name: '', email: '', password: '' },
  });

  async function submit(typed: FirstOwnerDraft) {
    try {
      await create.mutateAsync(typed);
      onCreated();
    } catch (error) {
      showProblem(form, error);
    }
  }

  return (
    <Form
      form={form}
      onSubmit={submit}
      aria-label="Organisation and owner"
      actions={
        <Button
          type="submit"
          variant="primary"
          busy={form.formState.isSubmitting}
          busyLabel="Creating"
          className="self-start"
        >
          Create the organisation
        </Button>
      }
    >
      <TextField
        label="Organisation"
        hint="Members and invitations show it; listeners never see it."
        autoComplete="organization"
        {...form.register('organisation')}
      />
      <TextField label="Your name" autoComplete="name" {...form.register('name')} />
      <TextField
        label="E-mail"
        hint="You sign in with it."
        type="email"
        autoComplete="username"
        autoCapitalize="none"
        spellCheck={false}
        {...form.register('email')}
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
