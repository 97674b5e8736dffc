import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { useJoinByInvitation } from './invitations.queries.ts';

type JoinButtonProps = { token: string; organisation: string; onJoined: (organisationId: string) => void };

/** For whoever is signed in with the invited address. */
export function JoinButton({ token, organisation, onJoined }: JoinButtonProps) {
  const join = useJoinByInvitation();
  return (
    <div className="flex flex-col items-start gap-4">
      <div role="alert" className="empty:hidden">
        {join.error === null ? null : (
          <Notice tone="amber" title="This did not go through.">
            {problemText(join.error)}
          </Notice>
        )}
      </div>
      <Button
        variant="primary"
        busy={join.isPending}
        busyLabel="Joining"
        onClick={() => join.mutate(token, { onSuccess: ({ organisationId }) => onJoined(organisationId) })}
      >
        Join {organisation}
      </Button>
    </div>
  );
}
