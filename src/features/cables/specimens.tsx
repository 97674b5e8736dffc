import { type ReactNode, useEffect, useRef, useState } from 'react';
import type { Cable, Specimen } from '#shared/contracts/cables.ts';
import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { useToast } from '../../ui/toast.tsx';
import { useAddSpecimen, useArchiveSpecimen } from './cables.queries.ts';
import { EditSpecimen } from './edit-specimen.tsx';
import { SpecimenForm } from './specimen-form.tsx';
import { editButtonId, SpecimenRow } from './specimen-row.tsx';

type SpecimensProps = { organisationId: string; cable: Cable };

const addButtonId = 'add-specimen';
const emptySpecimen = { serial: '', note: '' };

/** The physical pieces of a cable. One form is open at a time: for a new one, or in the row of the one that is edited. */
export function Specimens({ organisationId, cable }: SpecimensProps) {
  const [open, setOpen] = useState<string | null>(null);
  useFocusBack(open);
  const add = useAddSpecimen(organisationId, cable.id);
  const archive = useArchiveSpecimen(organisationId, cable.id);
  const showToast = useToast();
  const inUse = cable.specimens.filter(({ archived }) => !archived);
  const archived = cable.specimens.filter((specimen) => specimen.archived);
  const close = () => setOpen(null);

  function setArchived({ id, serial }: Specimen, isArchived: boolean) {
    const said = isArchived ? `${serial} is archived. It can be brought back below.` : `${serial} is back in use.`;
    archive.mutate(
      { specimenId: id, archived: isArchived },
      {
        onSuccess: () => showToast(said, 'held'),
        onError: (error) => showToast(problemText(error), 'amber'),
      },
    );
  }

  function renderRow(specimen: Specimen) {
    if (open === specimen.id)
      return <EditSpecimen organisationId={organisationId} cableId={cable.id} specimen={specimen} onClose={close} />;
    return (
      <SpecimenRow
        specimen={specimen}
        isWaiting={open !== null}
        isBusy={archive.isPending && archive.variables.specimenId === specimen.id}
        onEdit={() => setOpen(specimen.id)}
        onArchive={(isArchived) => setArchived(specimen, isArchived)}
      />
    );
  }

  const isFirst = inUse.length === 0;
  return (
    <section aria-labelledby="specimens" className="flex flex-col gap-6">
      <div>
        <h2 id="specimens" className="pb-1 text-xl">
          Specimens
        </h2>
        <p className="pb-4 text-soft">
          {isFirst
            ? `No piece of this cable is ${archived.length > 0 ? 'in use' : 'listed yet'}. A study needs at least one: give it the mark that is on it.`
            : 'Each is one physical piece. A study gives every piece it uses a blind code.'}
        </p>
        <SpecimenList specimens={inUse} renderRow={renderRow} />
      </div>
      {open === addButtonId || (isFirst && open === null) ? (
        <SpecimenForm
          aria-label="New specimen"
          values={emptySpecimen}
          save={add.mutateAsync}
          onSaved={({ serial }) => {
            setOpen(addButtonId);
            showToast(`${serial} is added.`, 'held');
          }}
          saveWord="Add this specimen"
          onCancel={isFirst ? undefined : close}
        />
      ) : (
        <Button id={addButtonId} className="self-start" disabled={open !== null} onClick={() => setOpen(addButtonId)}>
          Add a specimen
        </Button>
      )}
      {archived.length > 0 ? (
        <div className="pt-4">
          <h3 className="pb-3 text-base">Archived specimens</h3>
          <SpecimenList specimens={archived} renderRow={renderRow} />
        </div>
      ) : null}
    </section>
  );
}

type SpecimenListProps = {
  specimens: readonly Specimen[];
  renderRow: (specimen: Specimen) => ReactNode;
};

function SpecimenList({ specimens, renderRow }: SpecimenListProps) {
  if (specimens.length === 0) return null;
  return (
    <ul className="border-t-2 border-ink">
      {specimens.map((specimen) => (
        <li key={specimen.id} className="border-b border-rule py-4">
          {renderRow(specimen)}
        </li>
      ))}
    </ul>
  );
}

/** When a form closes, the focus returns to the button that opened it. */
function useFocusBack(open: string | null) {
  const lastOpen = useRef<string | null>(null);
  useEffect(() => {
    if (open === null && lastOpen.current !== null) {
      const opener = lastOpen.current === addButtonId ? addButtonId : editButtonId(lastOpen.current);
      document.getElementById(opener)?.focus();
    }
    lastOpen.current = open;
  }, [open]);
}
