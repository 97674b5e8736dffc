import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useParams } from 'react-router-dom';
import { signedHeadsApi } from '#shared/contracts/signed-heads.ts';
import { paths } from '../app/paths.ts';
import { publicationQueries } from '../features/publications/publications.queries.ts';
import { ReportView } from '../features/reports/report-view.tsx';
import { reportQueries } from '../features/reports/reports.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { addressOf } from '../lib/call.ts';
import { queryClient } from '../lib/query-client.ts';
import { isManaging } from '../lib/role-words.ts';
import { param } from '../lib/route-params.ts';
import { LinkButton } from '../ui/link-button.tsx';
import { ReportCables } from './report-cables.tsx';

export async function loader({ params }: LoaderFunctionArgs) {
  const organisationId = param(params, 'organisationId');
  const id = param(params, 'id');
  await Promise.all([
    queryClient.ensureQueryData(reportQueries.detail(organisationId, id)),
    queryClient.ensureQueryData(publicationQueries.ofStudy(organisationId, id)),
  ]);
  return null;
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const id = param(useParams(), 'id');
  const { data: report } = useSuspenseQuery(reportQueries.detail(organisationId, id));
  return (
    <ReportView
      report={report}
      back={{ to: paths.reports(organisationId), label: 'All reports' }}
      actions={<Publishing id={id} />}
      compared={<ReportCables organisationId={organisationId} studyId={id} />}
      proofs={addressOf(signedHeadsApi.ofStudy, { organisationId, id })}
    />
  );
}

/** The way to the public page, or to making one. */
function Publishing({ id }: { id: string }) {
  const { organisationId, role } = usePresence().membership;
  const { data } = useSuspenseQuery(publicationQueries.ofStudy(organisationId, id));
  if (data.publication !== null)
    return <LinkButton to={paths.publication(data.publication.id)}>Open the public page</LinkButton>;
  return isManaging(role) ? (
    <LinkButton variant="primary" to={paths.publish(organisationId, id)}>
      Publish the result
    </LinkButton>
  ) : null;
}
