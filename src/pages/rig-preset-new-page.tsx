import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useNavigate, useParams } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { PresetForm } from '../features/rig-presets/preset-form.tsx';
import { rigPresetQueries, useCreatePreset } from '../features/rig-presets/rig-presets.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { useToast } from '../ui/toast.tsx';

/** Begins from another preset, which stays as it is. */
export function loader({ params }: LoaderFunctionArgs) {
  return queryClient.fetchQuery(rigPresetQueries.detail(param(params, 'organisationId'), param(params, 'id')));
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const id = param(useParams(), 'id');
  const { data: kept } = useSuspenseQuery(rigPresetQueries.detail(organisationId, id));
  const create = useCreatePreset(organisationId);
  const navigate = useNavigate();
  const showToast = useToast();
  const listTo = paths.rigPresets(organisationId);

  return (
    <>
      <PageHeader title={`A copy of ${kept.preset.name}`} back={{ to: listTo, label: 'Rig presets' }} />
      <PresetForm
        values={{ ...kept.preset, name: `${kept.preset.name}, copy` }}
        save={create.mutateAsync}
        onSaved={({ preset }) => {
          showToast(`${preset.name} is saved.`, 'held');
          void navigate(listTo);
        }}
        saveWord="Save the copy"
        cancel={
          <LinkButton variant="quiet" to={listTo}>
            Cancel
          </LinkButton>
        }
      />
    </>
  );
}
