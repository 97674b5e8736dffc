import { redirect, useLoaderData } from 'react-router-dom';
import type { SignedInPerson } from '#shared/contracts/sign-in.ts';
import { paths } from '../app/paths.ts';
import { OrganisationList } from '../features/organisations/organisation-list.tsx';
import { signInQueries } from '../features/sign-in/sign-in.queries.ts';
import { queryClient } from '../lib/query-client.ts';
import { PageHeader } from '../ui/page-header.tsx';

/** Leads on at once wherever there is nothing to choose. */
export async function loader(): Promise<SignedInPerson | Response> {
  const { person } = await queryClient.ensureQueryData(signInQueries.me());
  if (person === null) return redirect(paths.signIn());
  const [only, ...others] = person.memberships;
  return only !== undefined && others.length === 0 ? redirect(paths.home(only.organisationId)) : person;
}

export function Component() {
  const { memberships } = useLoaderData<SignedInPerson>();
  return (
    <>
      <PageHeader title="Your organisations" />
      <OrganisationList memberships={memberships} homeOf={paths.home} />
    </>
  );
}
