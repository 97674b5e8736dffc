import { useState } from 'react';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';
import type { ConsoleDialogProps } from './console-dialog.ts';
import { Refusal } from './refusal.tsx';

const shortest = 3;

/** Puts on the record that something was not done as sealed. What is written stays until it is recorded. */
export function DeviationDialog({ isOpen, onOpenChange, actions }: ConsoleDialogProps) {
  const [text, setText] = useState('');
  const send = async () => {
    if (!(await actions.act({ kind: 'record-deviation', text: text.trim() }))) return;
    setText('');
    onOpenChange(false);
  };
  return (
    <Dialog
      isOpen={isOpen}
      onOpenChange={onOpenChange}
      title="Record a deviation"
      description="What differed from the sealed protocol, and why. It goes on the record with its time, and into the report."
      actions={
        <Button variant="primary" disabled={text.trim().length < shortest} busy={actions.isBusy} onClick={send}>
          Put it on the record
        </Button>
      }
    >
      <TextAreaField
        label="What differed, and why"
        maxLength={1000}
        value={text}
        onChange={(event) => setText(event.target.value)}
      />
      <Refusal problem={actions.problem} />
    </Dialog>
  );
}
