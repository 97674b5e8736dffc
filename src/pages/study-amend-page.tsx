import { useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { type LoaderFunctionArgs, redirect, useNavigate, useParams } from 'react-router-dom';
import type { AmendmentPreview, StudyDraft } from '#shared/contracts/studies.ts';
import { paths } from '../app/paths.ts';
import { cableQueries } from '../features/cables/cables.queries.ts';
import { organisationQueries } from '../features/organisations/organisations.queries.ts';
import { rigPresetQueries } from '../features/rig-presets/rig-presets.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { SealAmendment } from '../features/studies/amending/seal-amendment.tsx';
import { StudyForm } from '../features/studies/form/study-form.tsx';
import { studyQueries, usePreviewAmendment } from '../features/studies/studies.queries.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { Button } from '../ui/button.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { useToast } from '../ui/toast.tsx';

/** Fetched afresh: what is amended must be what is in force. What can be amended no more is only read. */
export async function loader({ params }: LoaderFunctionArgs) {
  const organisationId = param(params, 'organisationId');
  const id = param(params, 'id');
  const [study] = await Promise.all([
    queryClient.fetchQuery(studyQueries.detail(organisationId, id)),
    queryClient.ensureQueryData(cableQueries.choices(organisationId)),
    queryClient.ensureQueryData(organisationQueries.members(organisationId)),
    queryClient.fetchQuery(rigPresetQueries.choices(organisationId)),
  ]);
  return study.amending.allowed ? null : redirect(paths.study(organisationId, id));
}

/** First the form, then what it changes; going back keeps what was typed. */
export function Component() {
  const { organisationId } = usePresence().membership;
  const id = param(useParams(), 'id');
  const navigate = useNavigate();
  const toast = useToast();
  const preview = usePreviewAmendment(organisationId, id);
  const { data: study } = useSuspenseQuery(studyQueries.detail(organisationId, id));
  const { cables } = useSuspenseQuery(cableQueries.choices(organisationId)).data;
  const { members } = useSuspenseQuery(organisationQueries.members(organisationId)).data;
  const { presets } = useSuspenseQuery(rigPresetQueries.choices(organisationId)).data;
  const [typed, setTyped] = useState<StudyDraft>(study.draft);
  const [seen, setSeen] = useState<AmendmentPreview | null>(null);
  const studyTo = paths.study(organisationId, id);

  return (
    <>
      <PageHeader
        title={seen === null ? `Amend “${study.title}”` : `Seal the amendment of “${study.title}”?`}
        lede={
          seen === null
            ? 'The sealed protocol is kept. What you change here is sealed as its next version, with your reason.'
            : 'A sealed protocol is never edited. Read every line once more.'
        }
        back={{ to: studyTo, label: study.title }}
      />
      {seen === null ? (
        <StudyForm
          values={typed}
          cables={cables}
          members={members}
          rigPresets={presets}
          rigPresetsTo={paths.rigPresets(organisationId)}
          isManager={({ name }) => name === study.manager}
          save={async (draft) => {
            const shown = await preview.mutateAsync(draft);
            setTyped(draft);
            return shown;
          }}
          onSaved={setSeen}
          renderActions={(isAsking) => (
            <div className="flex flex-wrap gap-3">
              <Button type="submit" variant="primary" busy={isAsking} busyLabel="Comparing">
                See what changes
              </Button>
              <LinkButton to={studyTo}>Cancel</LinkButton>
            </div>
          )}
        />
      ) : (
        <SealAmendment
          organisationId={organisationId}
          studyId={id}
          draft={typed}
          preview={seen}
          onBack={() => setSeen(null)}
          onSealed={() => {
            toast(`Version ${seen.amends + 1} of the protocol is sealed.`, 'held');
            navigate(studyTo);
          }}
        />
      )}
    </>
  );
}
