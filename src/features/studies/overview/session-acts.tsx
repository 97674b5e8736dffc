import { LinkButton } from '../../../ui/link-button.tsx';
import type { UpcomingSession } from './upcoming-session.ts';

type SessionActsProps = {
  upcoming: UpcomingSession | null;
  planTo: string;
  /** Registered sessions that are not planned yet. */
  toPlan: number;
};

/** To the console for whoever leads the session that comes next; a further session for everybody else. */
export function SessionActs({ upcoming, planTo, toPlan }: SessionActsProps) {
  if (upcoming === null)
    return toPlan === 0 ? null : (
      <LinkButton variant="primary" to={planTo}>
        Plan a session
      </LinkButton>
    );
  return (
    <>
      {upcoming.consoleTo === null ? null : (
        <LinkButton variant="primary" to={upcoming.consoleTo}>
          Go to the console
        </LinkButton>
      )}
      {toPlan === 0 ? null : <LinkButton to={planTo}>Plan another session</LinkButton>}
    </>
  );
}
