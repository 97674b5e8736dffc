import type { Membership } from '#shared/contracts/sign-in.ts';
import { roleWords } from '../../lib/role-words.ts';
import { Menu, MenuLink } from '../../ui/menu.tsx';

type OrganisationSwitchProps = {
  current: Membership;
  memberships: readonly Membership[];
  homeOf: (organisationId: string) => string;
};

/** The organisation one is in, and the way to the others. */
export function OrganisationSwitch({ current, memberships, homeOf }: OrganisationSwitchProps) {
  return (
    <Menu label={current.organisation} of="choose another organisation">
      {memberships.map(({ organisationId, organisation, role }) => (
        <MenuLink
          key={organisationId}
          to={homeOf(organisationId)}
          isCurrent={organisationId === current.organisationId}
        >
          <span className="flex flex-col py-2">
            <span className="font-semibold">{organisation}</span>
            <span>{roleWords[role]}</span>
          </span>
        </MenuLink>
      ))}
    </Menu>
  );
}
