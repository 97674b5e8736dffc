import { Actions } from '../../ui/actions.tsx';
import { EmptyState } from '../../ui/empty-state.tsx';
import { LinkButton } from '../../ui/link-button.tsx';
import type { HomePlaces } from './home-places.ts';

/** What an organisation has so far, for whoever plans its studies. */
export type Inventory = { readonly cableCount: number; readonly studyCount: number };

const cablesOfAStudy = 2;

/** An empty list says what will be here, and offers whoever can take it the first step. */
export function NothingWaits({ inventory, places }: { inventory: Inventory; places: HomePlaces }) {
  if (inventory.cableCount < cablesOfAStudy)
    return (
      <EmptyState
        title={inventory.cableCount === 0 ? 'Begin with two cables' : 'One cable is here; add the other'}
        action={
          <LinkButton variant="primary" to={places.newCable}>
            {inventory.cableCount === 0 ? 'Add the first cable' : 'Add the second cable'}
          </LinkButton>
        }
      >
        A study compares two. Add both with a specimen each, then begin a study; what it needs from you next will be
        listed here.
      </EmptyState>
    );
  if (inventory.studyCount === 0)
    return (
      <EmptyState
        title="Your cables are here; begin a study"
        action={
          <LinkButton variant="primary" to={places.newStudy}>
            Begin a study
          </LinkButton>
        }
      >
        It fixes the question, the method and the number of trials before anybody listens.
      </EmptyState>
    );
  return (
    <EmptyState title="Nothing waits for you" action={<LinkButton to={places.newStudy}>Begin a study</LinkButton>}>
      Drafts to finish, sessions to plan, studies to close and reports to read will be listed here.
    </EmptyState>
  );
}

/** For an owner whom nobody has joined yet. */
export function NobodyElse({ places }: { places: HomePlaces }) {
  return (
    <EmptyState
      title="Begin with the people"
      action={
        <Actions>
          <LinkButton variant="primary" to={places.people}>
            Invite the others
          </LinkButton>
          <LinkButton to={places.newCable}>Add the first cable</LinkButton>
        </Actions>
      }
    >
      A blind study needs more than one person: besides whoever plans it, a proctor who runs its sessions and a code
      holder who alone knows which cable is which.
    </EmptyState>
  );
}

export function NoSessionWaits({ places }: { places: HomePlaces }) {
  return (
    <EmptyState
      title="No session waits for you"
      action={<LinkButton to={places.sessions}>See your sessions</LinkButton>}
    >
      When a manager plans a session with you as its proctor, it is listed here with the way to its console.
    </EmptyState>
  );
}

export function NoReportWaits({ places }: { places: HomePlaces }) {
  return (
    <EmptyState title="Nothing waits for you" action={<LinkButton to={places.reports}>See the reports</LinkButton>}>
      Reports to read will be listed here once a study is closed; so will codes to draw, when a study names you as its
      code holder.
    </EmptyState>
  );
}
