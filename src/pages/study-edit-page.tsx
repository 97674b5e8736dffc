import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, redirect, useNavigate, useParams } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { cableQueries } from '../features/cables/cables.queries.ts';
import { organisationQueries } from '../features/organisations/organisations.queries.ts';
import { rigPresetQueries } from '../features/rig-presets/rig-presets.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { StudyForm } from '../features/studies/form/study-form.tsx';
import { studyQueries, useUpdateStudy } from '../features/studies/studies.queries.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { Button } from '../ui/button.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';

/** Fetched afresh: what is about to be edited must be what is stored. A sealed study is only read. */
export async function loader({ params }: LoaderFunctionArgs) {
  const organisationId = param(params, 'organisationId');
  const id = param(params, 'id');
  const [study] = await Promise.all([
    queryClient.fetchQuery(studyQueries.detail(organisationId, id)),
    queryClient.ensureQueryData(cableQueries.choices(organisationId)),
    queryClient.ensureQueryData(organisationQueries.members(organisationId)),
    queryClient.fetchQuery(rigPresetQueries.choices(organisationId)),
  ]);
  return study.state === 'draft' ? null : redirect(paths.study(organisationId, id));
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const id = param(useParams(), 'id');
  const navigate = useNavigate();
  const update = useUpdateStudy(organisationId, id);
  const { data: study } = useSuspenseQuery(studyQueries.detail(organisationId, id));
  const { cables } = useSuspenseQuery(cableQueries.choices(organisationId)).data;
  const { members } = useSuspenseQuery(organisationQueries.members(organisationId)).data;
  const { presets } = useSuspenseQuery(rigPresetQueries.choices(organisationId)).data;
  const studyTo = paths.study(organisationId, id);

  return (
    <>
      <PageHeader title={`Edit “${study.title}”`} back={{ to: studyTo, label: study.title }} />
      <StudyForm
        values={study.draft}
        cables={cables}
        members={members}
        rigPresets={presets}
        rigPresetsTo={paths.rigPresets(organisationId)}
        isManager={({ name }) => name === study.manager}
        save={(draft) => update.mutateAsync(draft)}
        onSaved={() => navigate(studyTo)}
        renderActions={(isSaving) => (
          <div className="flex flex-wrap gap-3">
            <Button type="submit" variant="primary" busy={isSaving} busyLabel="Saving">
              Save the changes
            </Button>
            <LinkButton to={studyTo}>Cancel</LinkButton>
          </div>
        )}
      />
    </>
  );
}
