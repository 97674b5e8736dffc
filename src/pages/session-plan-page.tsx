import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useNavigate, useParams } from 'react-router-dom';
import { isClosed, type Study } from '#shared/contracts/studies.ts';
import { paths } from '../app/paths.ts';
import { organisationQueries } from '../features/organisations/organisations.queries.ts';
import { SessionForm } from '../features/sessions/session-form.tsx';
import { usePlanSession } from '../features/sessions/sessions.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { studyQueries } from '../features/studies/studies.queries.ts';
import { formatDateTime } from '../lib/format.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { useToast } from '../ui/toast.tsx';

export async function loader({ params }: LoaderFunctionArgs) {
  const organisationId = param(params, 'organisationId');
  await Promise.all([
    queryClient.ensureQueryData(studyQueries.detail(organisationId, param(params, 'id'))),
    queryClient.ensureQueryData(organisationQueries.members(organisationId)),
  ]);
  return null;
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const studyId = param(useParams(), 'id');
  const { data: study } = useSuspenseQuery(studyQueries.detail(organisationId, studyId));
  const { data } = useSuspenseQuery(organisationQueries.members(organisationId));
  const plan = usePlanSession(organisationId, studyId);
  const navigate = useNavigate();
  const showToast = useToast();
  const studyTo = paths.study(organisationId, studyId);
  const hindrance = hindranceOf(study);

  return (
    <>
      <PageHeader title="Plan a session" lede={ledeOf(study)} back={{ to: studyTo, label: study.title }} />
      {hindrance === null ? (
        <SessionForm
          members={data.members}
          codeHolderId={study.draft.codeHolderId}
          save={plan.mutateAsync}
          onSaved={({ id, number, plannedAt }) => {
            showToast(`Session ${number} is planned for ${formatDateTime(plannedAt)}.`, 'held');
            void navigate(paths.session(organisationId, id), { replace: true });
          }}
          cancel={
            <LinkButton variant="quiet" to={studyTo}>
              Cancel
            </LinkButton>
          }
        />
      ) : (
        <EmptyState title={hindrance} action={<LinkButton to={studyTo}>Go to the study</LinkButton>} />
      )}
    </>
  );
}

function ledeOf({ draft, progress }: Study): string {
  const registered = `${draft.sessions} ${draft.sessions === 1 ? 'session is' : 'sessions are'} registered`;
  return `${registered}, ${progress.sessionsPlanned} planned so far. Once planned, a session keeps its number for good.`;
}

function hindranceOf({ state, progress }: Study): string | null {
  if (state === 'draft') return 'Seal the protocol first; a session belongs to a sealed study';
  if (isClosed(state)) return 'This study is closed; it takes no further session';
  if (progress.sessionsToPlan === 0)
    return 'Every registered session is planned; an abandoned one would leave its place';
  return null;
}
