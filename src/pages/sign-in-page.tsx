import { useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { Link, type LoaderFunctionArgs, redirect, useLoaderData, useNavigate } from 'react-router-dom';
import type { PublicationRow } from '#shared/contracts/publications.ts';
import type { WhoAmI } from '#shared/contracts/sign-in.ts';
import { paths } from '../app/paths.ts';
import { LatestPublications } from '../features/publications/latest-publications.tsx';
import { publicationQueries } from '../features/publications/publications.queries.ts';
import { DemoPeople } from '../features/sign-in/demo-people.tsx';
import { signInQueries } from '../features/sign-in/sign-in.queries.ts';
import { SignInForm } from '../features/sign-in/sign-in-form.tsx';
import { queryClient } from '../lib/query-client.ts';
import { PageHeader } from '../ui/page-header.tsx';

type SignInPage = { demoPeople: WhoAmI['demoPeople']; published: readonly PublicationRow[]; next: string };

/** Asks the server afresh: what was known of the person may be exactly what has ended. */
export async function loader({ request }: LoaderFunctionArgs): Promise<SignInPage | Response> {
  const next = placeWithin(new URL(request.url));
  const [{ person, demoPeople }, { rows }] = await Promise.all([
    queryClient.fetchQuery({ ...signInQueries.me(), staleTime: 0 }),
    queryClient.fetchQuery(publicationQueries.list({})),
  ]);
  return person === null ? { demoPeople, published: rows, next } : redirect(next);
}

/** Where to go on; only addresses of this application. */
function placeWithin(here: URL): string {
  const next = here.searchParams.get('next') ?? paths.start();
  const there = URL.canParse(next, here.origin) ? new URL(next, here.origin) : here;
  const isWithin = next.startsWith('/') && there.origin === here.origin && there.pathname !== paths.signIn();
  return isWithin ? there.pathname + there.search : paths.start();
}

export function Component() {
  const { demoPeople, published, next } = useLoaderData<SignInPage>();
  const navigate = useNavigate();
  const client = useQueryClient();
  // Nothing that one person was shown is left for the next.
  useEffect(() => client.clear(), [client]);
  const goOn = () => void navigate(next, { replace: true });

  return (
    <div className="grid gap-x-20 gap-y-12 lg:grid-cols-[minmax(0,26rem)_minmax(0,1fr)]">
      <div className="flex flex-col gap-14">
        <div>
          <PageHeader
            title="Sign in"
            lede="Listeners need no account: their session code or personal link is enough."
          />
          <SignInForm onSignedIn={goOn} />
          <p className="pt-5">
            <Link to={paths.forgottenPassword()} className="inline-flex min-h-12 items-center">
              Forgotten your password?
            </Link>
          </p>
        </div>
        <LatestPublications
          title="Published here, for anybody to check"
          rows={published}
          allTo={paths.publications()}
          hrefOf={paths.publication}
        />
      </div>
      {demoPeople.length > 0 ? (
        <div className="max-w-2xl lg:pt-3">
          <DemoPeople people={demoPeople} onSignedIn={goOn} />
        </div>
      ) : null}
    </div>
  );
}
