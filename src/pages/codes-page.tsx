import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useParams } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { codesQueries } from '../features/codes/codes.queries.ts';
import { CodesOverview } from '../features/codes/codes-overview.tsx';
import { usePresence } from '../features/sign-in/membership.ts';
import { queryClient } from '../lib/query-client.ts';
import { isManaging } from '../lib/role-words.ts';
import { param } from '../lib/route-params.ts';
import { PageHeader } from '../ui/page-header.tsx';

export async function loader({ params }: LoaderFunctionArgs) {
  const organisationId = param(params, 'organisationId');
  await queryClient.ensureQueryData(codesQueries.status(organisationId, param(params, 'id')));
  return null;
}

export function Component() {
  const { organisationId, role } = usePresence().membership;
  const id = param(useParams(), 'id');
  const { data: status } = useSuspenseQuery(codesQueries.status(organisationId, id));
  const back = isManaging(role)
    ? { to: paths.study(organisationId, id), label: status.title }
    : { to: paths.home(organisationId), label: 'Home' };

  return (
    <>
      <PageHeader title="Blind codes" lede={status.title} back={back} />
      <CodesOverview organisationId={organisationId} status={status} labelsTo={paths.labels(organisationId, id)} />
    </>
  );
}
