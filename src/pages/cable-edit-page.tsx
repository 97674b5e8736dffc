import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useNavigate, useParams } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { CableForm } from '../features/cables/cable-form.tsx';
import { valuesOf } from '../features/cables/cable-form-values.ts';
import { cableQueries, useUpdateCable } from '../features/cables/cables.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { useToast } from '../ui/toast.tsx';

/** A form begins from what the server holds now, not from what was seen a while ago. */
export function loader({ params }: LoaderFunctionArgs) {
  return queryClient.fetchQuery(cableQueries.detail(param(params, 'organisationId'), param(params, 'id')));
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const id = param(useParams(), 'id');
  const { data: cable } = useSuspenseQuery(cableQueries.detail(organisationId, id));
  const update = useUpdateCable(organisationId, id);
  const navigate = useNavigate();
  const showToast = useToast();
  const cableTo = paths.cable(organisationId, id);

  return (
    <>
      <PageHeader title={`Change ${cable.name}`} back={{ to: cableTo, label: cable.name }} />
      <CableForm
        values={valuesOf(cable)}
        save={update.mutateAsync}
        onSaved={(saved) => {
          showToast(`${saved.name} is saved.`, 'held');
          void navigate(cableTo, { replace: true });
        }}
        saveWord="Save changes"
        cancel={
          <LinkButton variant="quiet" to={cableTo}>
            Cancel
          </LinkButton>
        }
      />
    </>
  );
}
