import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useNavigate, useSearchParams } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { cableQueries } from '../features/cables/cables.queries.ts';
import { organisationQueries } from '../features/organisations/organisations.queries.ts';
import { rigPresetQueries } from '../features/rig-presets/rig-presets.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { StudyForm } from '../features/studies/form/study-form.tsx';
import { newStudyWith } from '../features/studies/form/study-form-values.ts';
import { FirstStudy } from '../features/studies/overview/first-study.tsx';
import { useCreateStudy } from '../features/studies/studies.queries.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { Button } from '../ui/button.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';

export async function loader({ params }: LoaderFunctionArgs) {
  const organisationId = param(params, 'organisationId');
  await Promise.all([
    queryClient.ensureQueryData(cableQueries.choices(organisationId)),
    queryClient.ensureQueryData(organisationQueries.members(organisationId)),
    queryClient.fetchQuery(rigPresetQueries.choices(organisationId)),
  ]);
  return null;
}

export function Component() {
  const { person, membership } = usePresence();
  const { organisationId } = membership;
  const navigate = useNavigate();
  const create = useCreateStudy(organisationId);
  const { cables } = useSuspenseQuery(cableQueries.choices(organisationId)).data;
  const { members } = useSuspenseQuery(organisationQueries.members(organisationId)).data;
  const [search] = useSearchParams();
  const chosen = ['first', 'second'].flatMap((name) => cables.filter(({ id }) => id === search.get(name)));
  const { presets } = useSuspenseQuery(rigPresetQueries.choices(organisationId)).data;

  return (
    <>
      <PageHeader
        title="Plan a study"
        lede="Nothing is fixed until you seal it. The plan follows as you type."
        back={{ to: paths.studies(organisationId), label: 'All studies' }}
      />
      {cables.length < 2 ? (
        <FirstStudy
          cableCount={cables.length}
          newCableTo={paths.newCable(organisationId)}
          newStudyTo={paths.newStudy(organisationId)}
        />
      ) : (
        <StudyForm
          values={newStudyWith(presets, chosen)}
          cables={cables}
          members={members}
          rigPresets={presets}
          rigPresetsTo={paths.rigPresets(organisationId)}
          isManager={({ id }) => id === person.id}
          save={(draft) => create.mutateAsync(draft)}
          onSaved={({ id }) => navigate(paths.study(organisationId, id))}
          renderActions={(isSaving) => (
            <div className="flex flex-wrap gap-3">
              <Button type="submit" variant="primary" busy={isSaving} busyLabel="Saving">
                Save the draft
              </Button>
              <LinkButton to={paths.studies(organisationId)}>Cancel</LinkButton>
            </div>
          )}
        />
      )}
    </>
  );
}
