import { useState } from 'react';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { TextField } from '../../ui/text-field.tsx';
import type { ConsoleDialogProps } from './console-dialog.ts';
import { Refusal } from './refusal.tsx';

/** For a label that cannot be scanned: both ends are read by eye, and the record says why. */
export function ByHandDialog({ code, isOpen, onOpenChange, actions }: ConsoleDialogProps & { code: string }) {
  const [reason, setReason] = useState('');
  const change = (isShown: boolean) => {
    if (!isShown) setReason('');
    onOpenChange(isShown);
  };
  const send = async () => {
    if (await actions.act({ kind: 'confirm-by-hand', reason })) change(false);
  };
  return (
    <Dialog
      isOpen={isOpen}
      onOpenChange={change}
      title={`Confirm ${code} by hand?`}
      description={`Read the sleeve at both ends: ${code.split('').join(' ')}. The record says that it was not scanned, and why.`}
      actions={
        <Button variant="primary" disabled={reason.trim().length < 3} busy={actions.isBusy} onClick={send}>
          Both ends read {code}
        </Button>
      }
    >
      <TextField
        label="Why is it not scanned?"
        hint="In a word or two, such as “label torn”. No names."
        maxLength={200}
        value={reason}
        onChange={(event) => setReason(event.target.value)}
      />
      <Refusal problem={actions.problem} />
    </Dialog>
  );
}
