import type { LoaderFunctionArgs } from 'react-router-dom';
import { type Presence, presenceIn } from '../features/sign-in/membership.ts';
import { signInQueries } from '../features/sign-in/sign-in.queries.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';

/** Nothing of an organisation is shown before it is known who looks. */
export async function loadOrganisation({ params }: LoaderFunctionArgs): Promise<Presence> {
  const me = await queryClient.ensureQueryData(signInQueries.me());
  return presenceIn(me, param(params, 'organisationId'));
}
