import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { useToast } from '../../ui/toast.tsx';
import { useSignOut } from './sign-in.queries.ts';

export function SignOutHere({ onSignedOut }: { onSignedOut: () => void }) {
  const signOut = useSignOut();
  const showToast = useToast();
  return (
    <Button
      variant="primary"
      busy={signOut.isPending}
      busyLabel="Signing out"
      onClick={() =>
        signOut.mutate(undefined, {
          onSuccess: onSignedOut,
          onError: (error) => showToast(problemText(error), 'amber'),
        })
      }
    >
      Sign out here
    </Button>
  );
}
