import { useRouteLoaderData } from 'react-router-dom';
import type { Membership, SignedInPerson, WhoAmI } from '#shared/contracts/sign-in.ts';
import { Problem } from '#shared/problem.ts';

export const organisationRouteId = 'organisation';

/** Who looks at an organisation's pages and what they are there; fixed for as long as those pages are shown. */
export type Presence = {
  readonly person: SignedInPerson;
  readonly membership: Membership;
  readonly demoPeople: WhoAmI['demoPeople'];
};

/** @throws Problem `not-signed-in`, or `not-found` for an organisation that the person does not belong to */
export function presenceIn({ person, demoPeople }: WhoAmI, organisationId: string): Presence {
  if (person === null) throw new Problem('not-signed-in', 'Sign in to go on. You come back to this page.');
  const membership = person.memberships.find((candidate) => candidate.organisationId === organisationId);
  if (membership === undefined) throw new Problem('not-found', 'There is nothing at this address.');
  return { person, membership, demoPeople };
}

/** For pages below an organisation's navigation. */
export function usePresence(): Presence {
  const presence = useRouteLoaderData<Presence>(organisationRouteId);
  if (presence === undefined) throw new Error('usePresence needs the organisation route above it');
  return presence;
}
