import { zodResolver } from '@hookform/resolvers/zod';
import { type ReactNode, useCallback, useRef } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import type { SessionDraft, SessionRow } from '#shared/contracts/sessions.ts';
import type { Member } from '#shared/contracts/users.ts';
import { timeZone } from '../../lib/format.ts';
import { isManaging, roleWords } from '../../lib/role-words.ts';
import { showProblem } from '../../lib/show-problem.ts';
import { Actions } from '../../ui/actions.tsx';
import { Button } from '../../ui/button.tsx';
import { Form } from '../../ui/form.tsx';
import { LeaveGuard } from '../../ui/leave-guard.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { ProctorCaution } from './proctor-caution.tsx';
import { emptySession, type SessionFormValues, typedSession } from './session-form-values.ts';

type SessionFormProps = {
  members: readonly Member[];
  codeHolderId: string;
  save: (draft: SessionDraft) => Promise<SessionRow>;
  /** Where to go once it is saved; nothing typed is lost until then. */
  onSaved: (session: SessionRow) => void;
  /** The way out without saving. */
  cancel: ReactNode;
};

export function SessionForm({ members, codeHolderId, save, onSaved, cancel }: SessionFormProps) {
  const form = useForm<SessionFormValues, unknown, SessionDraft>({
    resolver: zodResolver(typedSession),
    defaultValues: emptySession(),
  });
  const proctorId = useWatch({ control: form.control, name: 'proctorId' });
  const { isDirty, isSubmitting } = form.formState;
  const isSaved = useRef(false);
  const isUnsaved = useCallback(() => isDirty && !isSaved.current, [isDirty]);

  async function submit(draft: SessionDraft) {
    try {
      const session = await save(draft);
      isSaved.current = true;
      onSaved(session);
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
        aria-label="Session"
        className="max-w-2xl"
        actions={
          <Actions>
            <Button type="submit" variant="primary" busy={isSubmitting} busyLabel="Planning">
              Plan this session
            </Button>
            {cancel}
          </Actions>
        }
      >
        <TextField
          label="Date and time"
          type="datetime-local"
          hint={`In your time zone, ${timeZone()}; mail and calendars tell it in this zone`}
          className="max-w-80"
          {...form.register('plannedAt')}
        />
        <TextField
          label="Room"
          hint="Listeners see it: where to come, nothing about cables"
          autoComplete="off"
          {...form.register('room')}
        />
        <SelectField
          label="Proctor"
          placeholder="Choose"
          hint="Prepares the room, runs the session and fits the cables that the screen names."
          options={proctorOptions(members)}
          {...form.register('proctorId')}
        />
        <ProctorCaution proctor={members.find(({ id }) => id === proctorId)} codeHolderId={codeHolderId} />
      </Form>
    </>
  );
}

/** Proctors first; they are the ones who have seen no cable page. */
function proctorOptions(members: readonly Member[]) {
  return members
    .filter(({ role }) => role !== 'reviewer')
    .toSorted((first, second) => Number(isManaging(first.role)) - Number(isManaging(second.role)))
    .map(({ id, name, role }) => ({ value: id, label: `${name}, ${roleWords[role].toLowerCase()}` }));
}
