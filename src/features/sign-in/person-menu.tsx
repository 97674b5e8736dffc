import type { ReactNode } from 'react';
import { roleWords } from '../../lib/role-words.ts';
import { problemText } from '../../lib/show-problem.ts';
import { MenuHeading, MenuItem, MenuLink, MenuSeparator } from '../../ui/menu.tsx';
import { useToast } from '../../ui/toast.tsx';
import type { Presence } from './membership.ts';
import { useSignOut } from './sign-in.queries.ts';

type PersonMenuProps = {
  presence: Presence;
  /** Where the person sees their own sign-ins. */
  accountTo: string;
  helpTo: string;
  onSignedOut: () => void;
  onSignOutEverywhere: () => void;
};

/** Who is signed in, as what and where, and the ways out. */
export function PersonMenu({ presence, accountTo, helpTo, onSignedOut, onSignOutEverywhere }: PersonMenuProps) {
  const { person, membership } = presence;
  const signOut = useSignOut();
  const showToast = useToast();

  function leave() {
    signOut.mutateAsync().then(onSignedOut, (error: unknown) => showToast(problemText(error), 'amber'));
  }

  return (
    <>
      <MenuHeading>
        <Line isStrong>{person.name}</Line>
        <Line>
          {roleWords[membership.role]}, {membership.organisation}
        </Line>
        <Line>{person.email}</Line>
      </MenuHeading>
      <MenuSeparator />
      <MenuLink to={accountTo}>Your sign-ins</MenuLink>
      <MenuLink to={helpTo}>How Fairlead works</MenuLink>
      <MenuItem onSelect={leave}>Sign out</MenuItem>
      <MenuItem onSelect={onSignOutEverywhere}>Sign out everywhere …</MenuItem>
    </>
  );
}

function Line({ isStrong = false, children }: { isStrong?: boolean; children: ReactNode }) {
  return <span className={isStrong ? 'block font-semibold text-ink' : 'block max-w-72'}>{children}</span>;
}
