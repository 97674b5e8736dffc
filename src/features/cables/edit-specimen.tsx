import type { Specimen } from '#shared/contracts/cables.ts';
import { useToast } from '../../ui/toast.tsx';
import { useUpdateSpecimen } from './cables.queries.ts';
import { SpecimenForm } from './specimen-form.tsx';

type EditSpecimenProps = { organisationId: string; cableId: string; specimen: Specimen; onClose: () => void };

export function EditSpecimen({ organisationId, cableId, specimen, onClose }: EditSpecimenProps) {
  const update = useUpdateSpecimen(organisationId, cableId, specimen.id);
  const showToast = useToast();
  return (
    <SpecimenForm
      aria-label={`Specimen ${specimen.serial}`}
      values={{ serial: specimen.serial, note: specimen.note }}
      save={update.mutateAsync}
      onSaved={({ serial }) => {
        showToast(`${serial} is saved.`, 'held');
        onClose();
      }}
      saveWord="Save this specimen"
      onCancel={onClose}
    />
  );
}
