import { useState } from 'react';
import { type VoidReason, voidReasons } from '#shared/contracts/proctor-live.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import type { ConsoleDialogProps } from './console-dialog.ts';
import { voidWords } from './console-words.ts';
import { Refusal } from './refusal.tsx';

type VoidDialogProps = ConsoleDialogProps & { neverCounts: boolean };

/** Sets the open trial aside for one of the fixed reasons. */
export function VoidDialog({ neverCounts, isOpen, onOpenChange, actions }: VoidDialogProps) {
  const [reason, setReason] = useState<VoidReason | ''>('');
  const [note, setNote] = useState('');
  const change = (isShown: boolean) => {
    if (!isShown) {
      setReason('');
      setNote('');
    }
    onOpenChange(isShown);
  };
  const send = async () => {
    if (reason !== '' && (await actions.act({ kind: 'void-trial', reason, note }))) change(false);
  };
  return (
    <Dialog
      isOpen={isOpen}
      onOpenChange={change}
      title="Void this trial?"
      description={
        neverCounts
          ? 'It stays in the record with its reason. Begin it again when all is well.'
          : 'It stays in the record with its reason and does not count. While spares last, one takes its place at the end.'
      }
      actions={
        <Button variant="stop" disabled={reason === ''} busy={actions.isBusy} onClick={send} className="ml-9">
          Set the trial aside
        </Button>
      }
    >
      <SelectField
        label="Reason"
        placeholder="Choose a reason"
        value={reason}
        onChange={(event) => setReason(voidReasons.find((known) => known === event.target.value) ?? '')}
        options={voidReasons.map((value) => ({ value, label: voidWords[value] }))}
      />
      <TextField
        label="Note"
        optional
        hint="What happened, in a few words. No names."
        maxLength={300}
        value={note}
        onChange={(event) => setNote(event.target.value)}
      />
      <Refusal problem={actions.problem} />
    </Dialog>
  );
}
