import { useState } from 'react';
import { Outlet, useNavigate } from 'react-router-dom';
import { OrganisationSwitch } from '../features/organisations/organisation-switch.tsx';
import { usePresence } from '../features/sign-in/membership.ts';
import { PersonMenu } from '../features/sign-in/person-menu.tsx';
import { SignOutEverywhere } from '../features/sign-in/sign-out-everywhere.tsx';
import { DayLayout } from './layouts/day-layout.tsx';
import { navigationLinks } from './navigation-links.ts';
import { paths } from './paths.ts';

/** The bar with an organisation's places and whoever is signed in, around every page of it. */
export function OrganisationFrame() {
  const presence = usePresence();
  const navigate = useNavigate();
  const [isAsked, setAsked] = useState(false);
  const { organisationId, role } = presence.membership;
  const leave = () => void navigate(paths.signIn());

  const menu = (
    <PersonMenu
      presence={presence}
      accountTo={paths.account()}
      helpTo={paths.help()}
      onSignedOut={leave}
      onSignOutEverywhere={() => setAsked(true)}
    />
  );
  return (
    <DayLayout
      homeTo={paths.home(organisationId)}
      links={navigationLinks(role, organisationId)}
      organisation={
        presence.person.memberships.length > 1 ? (
          <OrganisationSwitch
            current={presence.membership}
            memberships={presence.person.memberships}
            homeOf={paths.home}
          />
        ) : null
      }
      person={{ label: presence.person.name, menu }}
    >
      <Outlet />
      <SignOutEverywhere isOpen={isAsked} onOpenChange={setAsked} onSignedOut={leave} />
    </DayLayout>
  );
}
