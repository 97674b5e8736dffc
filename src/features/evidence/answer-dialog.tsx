import { type FormEvent, useState } from 'react';
import { evidenceFileBytes } from '#shared/contracts/evidence.ts';
import { problemOf } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { FileDrop } from '../../ui/file-drop.tsx';
import { Notice } from '../../ui/notice.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';

type AnswerDialogProps = {
  /** The statement that is answered, in a word or two; null while the dialog is closed. */
  title: string | null;
  onClose: () => void;
  save: (answer: { note: string; file: File }) => Promise<unknown>;
};

/** Asks for a file that answers a statement, and for what it shows. */
export function AnswerDialog({ title, onClose, save }: AnswerDialogProps) {
  return (
    <Dialog
      isOpen={title !== null}
      onOpenChange={(isOpen) => (isOpen ? undefined : onClose())}
      title="Answer with evidence"
      description={`${title ?? ''}: an analysis, a certificate, a measurement. It is kept beside the statement.`}
    >
      <AnswerForm onDone={onClose} save={save} />
    </Dialog>
  );
}

function AnswerForm({ onDone, save }: { onDone: () => void; save: AnswerDialogProps['save'] }) {
  const [file, setFile] = useState<File | null>(null);
  const [note, setNote] = useState('');
  const [fault, setFault] = useState('');
  const [isBusy, setBusy] = useState(false);

  function take(taken: File) {
    setFault('');
    if (taken.size === 0) return setFault('This file is empty. Choose another.');
    if (taken.size > evidenceFileBytes) return setFault('A file may have at most 10 MB.');
    setFile(taken);
  }

  async function send(event: FormEvent) {
    event.preventDefault();
    if (file === null) return setFault('Choose a file.');
    if (note.trim().length < 3) return setFault('Say what the file shows.');
    setBusy(true);
    try {
      await save({ note, file });
      onDone();
    } catch (error) {
      const problem = problemOf(error);
      setFault([problem.message, ...problem.errors.map(({ detail }) => detail)].join(' '));
    } finally {
      setBusy(false);
    }
  }

  return (
    <form onSubmit={send} noValidate className="flex flex-col gap-4">
      <FileDrop
        label={file === null ? 'Choose a file' : `Chosen: ${file.name}`}
        note="Text, PDF, PNG, JPEG or WebP, at most 10 MB. Of a picture, what its camera wrote into it is left out."
        accept=".txt,.csv,.pdf,.png,.jpg,.jpeg,.webp"
        onFile={take}
      />
      <TextAreaField label="What it shows" rows={2} value={note} onChange={({ target }) => setNote(target.value)} />
      <div role="alert">{fault === '' ? null : <Notice tone="amber" title={fault} />}</div>
      <Button type="submit" variant="primary" busy={isBusy} busyLabel="Saving" className="self-start">
        Keep it
      </Button>
    </form>
  );
}
