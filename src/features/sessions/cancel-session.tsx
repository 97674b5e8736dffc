import { useState } from 'react';
import type { SessionRow } from '#shared/contracts/sessions.ts';
import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import { useCancelSession } from './sessions.queries.ts';

/** The end of a session that has not begun. */
export function CancelSession({ organisationId, session }: { organisationId: string; session: SessionRow }) {
  const [isAsked, setAsked] = useState(false);
  const cancel = useCancelSession(organisationId, session.id);
  return (
    <>
      <Button variant="quiet" onClick={() => setAsked(true)}>
        Cancel the session
      </Button>
      <ConfirmDialog
        isOpen={isAsked}
        onOpenChange={(next) => {
          cancel.reset();
          setAsked(next);
        }}
        title={`Cancel session ${session.number}?`}
        consequence="It keeps its number and stays on the record with your reason. Whoever is invited is told, and their calendar entry goes. Another session can be planned in its place. This cannot be undone."
        confirmWord="Cancel the session"
        keepWord="Keep it"
        reason={{ label: 'Reason', hint: 'It goes on the record. Name no cable and no listener.' }}
        busy={cancel.isPending}
        {...(cancel.error === null ? {} : { problem: problemText(cancel.error) })}
        onConfirm={(reason) => cancel.mutate(reason, { onSuccess: () => setAsked(false) })}
      />
    </>
  );
}
