import { Link } from 'react-router-dom';
import type { Membership } from '#shared/contracts/sign-in.ts';
import { roleWords } from '../../lib/role-words.ts';
import { EmptyState } from '../../ui/empty-state.tsx';

type OrganisationListProps = {
  memberships: readonly Membership[];
  homeOf: (organisationId: string) => string;
};

export function OrganisationList({ memberships, homeOf }: OrganisationListProps) {
  if (memberships.length === 0)
    return (
      <EmptyState title="You are not a member of any organisation">
        Ask the owner of yours to add you. Your sign-in stays as it is.
      </EmptyState>
    );
  return (
    <ul className="max-w-2xl border-t-2 border-ink">
      {memberships.map(({ organisationId, organisation, role }) => (
        <li key={organisationId} className="flex flex-wrap items-baseline justify-between gap-x-8 border-b border-rule">
          <Link to={homeOf(organisationId)} className="inline-flex min-h-12 items-center text-lg font-semibold">
            {organisation}
          </Link>
          <span className="text-soft">{roleWords[role]}</span>
        </li>
      ))}
    </ul>
  );
}
