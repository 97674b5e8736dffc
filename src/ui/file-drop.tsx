import { type DragEvent, useId, useState } from 'react';
import { classNames } from './class-names.ts';

type FileDropProps = {
  label?: string;
  /** What becomes of the file. */
  note?: string;
  /** As the `accept` of an input. */
  accept?: string;
  onFile: (file: File) => void;
};

/** Takes a file from the visitor, dropped or chosen. By itself it is read in the browser and sent nowhere. */
export function FileDrop({
  label = 'Check a file of your own',
  note = 'Drop it here or choose it. It stays in your browser.',
  accept = '.zip,.json,application/zip,application/json',
  onFile,
}: FileDropProps) {
  const id = useId();
  const [isOver, setOver] = useState(false);

  function take(files: FileList | null) {
    const [file] = files ?? [];
    if (file !== undefined) onFile(file);
  }

  function drop(event: DragEvent<HTMLLabelElement>) {
    event.preventDefault();
    setOver(false);
    take(event.dataTransfer.files);
  }

  return (
    <label
      htmlFor={id}
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
      className={classNames(
        'flex cursor-pointer flex-col gap-1 rounded border-2 border-dashed px-4 py-4 print:hidden has-focus-visible:outline-3 has-focus-visible:outline-offset-2 has-focus-visible:outline-ink',
        isOver ? 'border-ink bg-sheet' : 'border-edge',
      )}
    >
      <span className="font-semibold underline underline-offset-4">{label}</span>
      <span className="text-soft">{note}</span>
      <input
        id={id}
        type="file"
        accept={accept}
        className="sr-only"
        onChange={({ target }) => {
          take(target.files);
          // The same file may be chosen again after it was changed.
          target.value = '';
        }}
      />
    </label>
  );
}
