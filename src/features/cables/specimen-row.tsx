import type { Specimen } from '#shared/contracts/cables.ts';
import { Button } from '../../ui/button.tsx';

type SpecimenRowProps = {
  specimen: Specimen;
  /** While a form is open, rows wait for it. */
  isWaiting: boolean;
  isBusy: boolean;
  onEdit: () => void;
  onArchive: (archived: boolean) => void;
};

export const editButtonId = (specimenId: string) => `edit-${specimenId}`;

export function SpecimenRow({ specimen, isWaiting, isBusy, onEdit, onArchive }: SpecimenRowProps) {
  const { id, serial, note, archived } = specimen;
  const isIn = (word: string) => (
    <>
      {word}
      <span className="sr-only"> {serial}</span>
    </>
  );
  return (
    <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-2">
      <p className="min-w-0 flex-1 basis-56">
        <span className="block font-mono font-semibold [overflow-wrap:anywhere]">{serial}</span>
        {note === '' ? null : <span className="block text-soft">{note}</span>}
      </p>
      <div className="flex gap-3">
        {archived ? null : (
          <Button id={editButtonId(id)} disabled={isWaiting} onClick={onEdit}>
            {isIn('Edit')}
          </Button>
        )}
        <Button busy={isBusy} busyLabel="Saving" disabled={isWaiting} onClick={() => onArchive(!archived)}>
          {isIn(archived ? 'Bring back' : 'Archive')}
        </Button>
      </div>
    </div>
  );
}
