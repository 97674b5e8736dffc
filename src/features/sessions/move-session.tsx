import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import type { SessionMove, SessionRow } from '#shared/contracts/sessions.ts';
import { timeZone } from '../../lib/format.ts';
import { showProblem } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { Form } from '../../ui/form.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { useToast } from '../../ui/toast.tsx';
import { type MoveFormValues, moveOf, typedMove } from './session-form-values.ts';
import { useMoveSession } from './sessions.queries.ts';

type MoveSessionProps = { organisationId: string; session: SessionRow };

/** Another date or room, until seating opens. */
export function MoveSession({ organisationId, session }: MoveSessionProps) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button onClick={() => setOpen(true)}>Move it</Button>
      <Dialog
        isOpen={isOpen}
        onOpenChange={setOpen}
        title="Move this session"
        description="Whoever is invited gets a mail, and their calendar follows. At another time they are asked again whether they come."
      >
        <MoveForm organisationId={organisationId} session={session} onMoved={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

function MoveForm({ organisationId, session, onMoved }: MoveSessionProps & { onMoved: () => void }) {
  const form = useForm<MoveFormValues, unknown, SessionMove>({
    resolver: zodResolver(typedMove),
    defaultValues: moveOf(session),
  });
  const move = useMoveSession(organisationId, session.id);
  const showToast = useToast();

  async function submit(draft: SessionMove) {
    const isOtherTime = form.getFieldState('plannedAt').isDirty;
    try {
      await move.mutateAsync({ ...draft, timeZone: isOtherTime ? timeZone() : session.timeZone });
      showToast('The session has moved.', 'held');
      onMoved();
    } catch (error) {
      showProblem(form, error);
    }
  }

  return (
    <Form
      form={form}
      onSubmit={submit}
      aria-label="Move the session"
      actions={
        <Button
          type="submit"
          variant="primary"
          busy={form.formState.isSubmitting}
          busyLabel="Moving"
          className="self-start"
        >
          Move the session
        </Button>
      }
    >
      <TextField
        label="Date and time"
        type="datetime-local"
        hint={`In your time zone, ${timeZone()}`}
        {...form.register('plannedAt')}
      />
      <TextField label="Room" autoComplete="off" {...form.register('room')} />
    </Form>
  );
}
