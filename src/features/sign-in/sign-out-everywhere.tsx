import { problemText } from '../../lib/show-problem.ts';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import { useSignOutEverywhere } from './sign-in.queries.ts';

type SignOutEverywhereProps = {
  isOpen: boolean;
  onOpenChange: (isOpen: boolean) => void;
  onSignedOut: () => void;
};

export function SignOutEverywhere({ isOpen, onOpenChange, onSignedOut }: SignOutEverywhereProps) {
  const signOut = useSignOutEverywhere();
  return (
    <ConfirmDialog
      isOpen={isOpen}
      onOpenChange={(next) => {
        signOut.reset();
        onOpenChange(next);
      }}
      title="Sign out everywhere?"
      consequence="Every browser and device you are signed in on is signed out, this one too. A console you have open elsewhere stops; its session is kept as it is. You can sign in again at once."
      confirmWord="Sign out everywhere"
      keepWord="Stay signed in"
      busy={signOut.isPending}
      problem={signOut.error === null ? undefined : problemText(signOut.error)}
      onConfirm={() => signOut.mutate(undefined, { onSuccess: onSignedOut })}
    />
  );
}
