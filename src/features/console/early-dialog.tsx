import { useState } from 'react';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';
import type { ConsoleDialogProps } from './console-dialog.ts';
import { Refusal } from './refusal.tsx';

const shortest = 3;

/** Goes on before the registered break is over; the reason is published. */
export function EarlyDialog({ isOpen, onOpenChange, actions, why }: ConsoleDialogProps & { why: string }) {
  const [reason, setReason] = useState('');
  const send = async () => {
    if (!(await actions.act({ kind: 'resume', reason: reason.trim() }))) return;
    setReason('');
    onOpenChange(false);
  };
  return (
    <Dialog
      isOpen={isOpen}
      onOpenChange={onOpenChange}
      title="Go on before the break is over"
      description={`${why} The reason goes on the record and into the report.`}
      actions={
        <Button variant="primary" disabled={reason.trim().length < shortest} busy={actions.isBusy} onClick={send}>
          Go on early
        </Button>
      }
    >
      <TextAreaField
        label="Why the session goes on now"
        maxLength={300}
        value={reason}
        onChange={(event) => setReason(event.target.value)}
      />
      <Refusal problem={actions.problem} />
    </Dialog>
  );
}
