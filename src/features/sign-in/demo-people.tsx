import type { WhoAmI } from '#shared/contracts/sign-in.ts';
import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { useSignIn } from './sign-in.queries.ts';

type DemoPeopleProps = { people: WhoAmI['demoPeople']; onSignedIn: () => void };

/** The demo's people with one button each; the server tells of them only on its own machine. */
export function DemoPeople({ people, onSignedIn }: DemoPeopleProps) {
  const signIn = useSignIn();
  const chosen = signIn.isPending ? signIn.variables.email : null;

  return (
    <section aria-labelledby="demo-people" className="border-t-2 border-ink pt-5">
      <h2 id="demo-people" className="text-xl">
        This is the demo, on your own machine
      </h2>
      <p className="pt-1 text-soft">Its people, cables and studies are invented. Sign in as any of them.</p>
      <ul className="pt-3">
        {people.map(({ name, duty, email, password }) => (
          <li
            key={email}
            className="flex flex-wrap items-center justify-between gap-x-8 gap-y-3 border-b border-rule py-4"
          >
            <span className="min-w-0 flex-1 basis-64">
              <span className="block font-semibold">{name}</span>
              <span className="block text-soft">{duty}</span>
            </span>
            <Button
              busy={chosen === email}
              busyLabel="Signing in"
              disabled={chosen !== null && chosen !== email}
              onClick={() => signIn.mutate({ email, password }, { onSuccess: onSignedIn })}
            >
              Sign in as {name}
            </Button>
          </li>
        ))}
      </ul>
      <div role="alert" className="pt-4 empty:hidden">
        {signIn.error === null ? null : (
          <Notice tone="amber" title="This did not go through.">
            {problemText(signIn.error)}
          </Notice>
        )}
      </div>
    </section>
  );
}
