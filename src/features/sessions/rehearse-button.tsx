import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { useBeginRehearsal } from './sessions.queries.ts';

type RehearseButtonProps = {
  organisationId: string;
  /** The session whose plan is rehearsed; null for a short one. */
  sessionId: string | null;
  label: string;
  onBegun: (rehearsalId: string) => void;
};

/** A run with invented codes, on no record. */
export function RehearseButton({ organisationId, sessionId, label, onBegun }: RehearseButtonProps) {
  const begin = useBeginRehearsal(organisationId);
  return (
    <span className="inline-flex flex-wrap items-center gap-3">
      <Button
        busy={begin.isPending}
        busyLabel="Preparing"
        onClick={() => begin.mutate(sessionId, { onSuccess: ({ id }) => onBegun(id) })}
      >
        {label}
      </Button>
      <span role="alert" className="text-amber empty:hidden">
        {begin.error ? problemText(begin.error) : ''}
      </span>
    </span>
  );
}
