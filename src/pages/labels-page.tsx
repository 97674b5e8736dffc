import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useParams } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { codesQueries } from '../features/codes/codes.queries.ts';
import { Labels } from '../features/codes/labels.tsx';
import { usePresence } from '../features/sign-in/membership.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';

export async function loader({ params }: LoaderFunctionArgs) {
  const organisationId = param(params, 'organisationId');
  await queryClient.ensureQueryData(codesQueries.status(organisationId, param(params, 'id')));
  return null;
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const id = param(useParams(), 'id');
  const { data: status } = useSuspenseQuery(codesQueries.status(organisationId, id));
  return <Labels organisationId={organisationId} status={status} codesTo={paths.codes(organisationId, id)} />;
}
