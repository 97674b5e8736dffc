import type { WhoAmI } from '#shared/contracts/sign-in.ts';
import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { useToast } from '../../ui/toast.tsx';
import { useSignIn } from './sign-in.queries.ts';

type SignInAsProps = { person: WhoAmI['demoPeople'][number]; goTo: string };

/** Changes to another of the demo's people. The page is loaded anew, so that nothing the one saw is left for the other. */
export function SignInAs({ person: { name, email, password }, goTo }: SignInAsProps) {
  const signIn = useSignIn();
  const showToast = useToast();

  function change() {
    signIn.mutate(
      { email, password },
      {
        onSuccess: () => window.location.assign(goTo),
        onError: (error) => showToast(problemText(error), 'amber'),
      },
    );
  }

  return (
    <Button busy={signIn.isPending || signIn.isSuccess} busyLabel="Signing in" onClick={change}>
      Sign in as {name}
    </Button>
  );
}
