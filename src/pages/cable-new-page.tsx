import { useNavigate } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { CableForm } from '../features/cables/cable-form.tsx';
import { emptyCable } from '../features/cables/cable-form-values.ts';
import { useCreateCable } from '../features/cables/cables.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { useToast } from '../ui/toast.tsx';

export function Component() {
  const { organisationId } = usePresence().membership;
  const create = useCreateCable(organisationId);
  const navigate = useNavigate();
  const showToast = useToast();
  const listTo = paths.cables(organisationId);

  return (
    <>
      <PageHeader
        title="Add a cable"
        lede="The design first; its specimens, the pieces with a mark of their own, come next."
        back={{ to: listTo, label: 'All cables' }}
      />
      <CableForm
        values={emptyCable}
        save={create.mutateAsync}
        onSaved={(cable) => {
          showToast(`${cable.name} is saved. Add its specimens.`, 'held');
          void navigate(paths.cable(organisationId, cable.id), { replace: true });
        }}
        saveWord="Save and add specimens"
        cancel={
          <LinkButton variant="quiet" to={listTo}>
            Cancel
          </LinkButton>
        }
      />
    </>
  );
}
