import { zodResolver } from '@hookform/resolvers/zod';
import { useRef } from 'react';
import { useForm } from 'react-hook-form';
import type { z } from 'zod';
import {
  confirmationIds,
  confirmations,
  type OwnPublication,
  type PublicationDraft,
  publicationDraft,
} from '#shared/contracts/publications.ts';
import { showProblem } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { CheckboxField } from '../../ui/checkbox-field.tsx';
import { Form } from '../../ui/form.tsx';
import { LeaveGuard } from '../../ui/leave-guard.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';
import { usePublish } from './publications.queries.ts';

type PublishFormProps = {
  organisationId: string;
  studyId: string;
  onPublished: (published: OwnPublication) => void;
};

type Typed = z.input<typeof publicationDraft>;

/** Nothing is ticked and nothing filled in beforehand: each is stated on purpose. */
const empty = {
  paid: '',
  supplied: '',
  ties: '',
  confirmations: Object.fromEntries(confirmationIds.map((name) => [name, false])),
} as unknown as Typed;

export function PublishForm({ organisationId, studyId, onPublished }: PublishFormProps) {
  const form = useForm<Typed, unknown, PublicationDraft>({
    resolver: zodResolver(publicationDraft),
    defaultValues: empty,
  });
  const publish = usePublish(organisationId, studyId);
  const isPublished = useRef(false);
  const { isDirty, isSubmitting } = form.formState;

  async function submit(draft: PublicationDraft) {
    try {
      const published = await publish.mutateAsync(draft);
      isPublished.current = true;
      onPublished(published);
    } catch (error) {
      showProblem(form, error);
    }
  }

  return (
    <Form
      form={form}
      onSubmit={submit}
      aria-label="Publish"
      className="max-w-3xl"
      actions={
        <Button type="submit" variant="primary" busy={isSubmitting} busyLabel="Publishing" className="self-start">
          Publish for good
        </Button>
      }
    >
      <LeaveGuard isUnsaved={() => isDirty && !isPublished.current} />
      <TextAreaField label="Who paid for the study" {...form.register('paid')} />
      <TextAreaField
        label="Who supplied the specimens"
        hint="And how they were chosen: bought in a shop, taken from stock, picked by the maker."
        {...form.register('supplied')}
      />
      <TextAreaField
        label="Ties of the people to the maker"
        hint="Who works for whom, who sells what, who was paid. Type “none” if there are none."
        {...form.register('ties')}
      />
      <fieldset className="flex flex-col gap-1 border-t border-rule pt-4">
        <legend className="float-left w-full pb-1 text-lg font-bold">What you confirm</legend>
        {confirmationIds.map((name) => (
          <CheckboxField key={name} label={confirmations[name]} {...form.register(`confirmations.${name}`)} />
        ))}
      </fieldset>
    </Form>
  );
}
