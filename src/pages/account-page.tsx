import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, redirect, useSearchParams } from 'react-router-dom';
import { accountApi } from '#shared/contracts/account.ts';
import { paths } from '../app/paths.ts';
import { accountQueries } from '../features/account/account.queries.ts';
import { AttemptTable } from '../features/account/attempt-table.tsx';
import { PlaceList } from '../features/account/place-list.tsx';
import { signInQueries } from '../features/sign-in/sign-in.queries.ts';
import { lastPageAddress, readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';

const pageIn = (search: URLSearchParams) => readListQuery(accountApi.attempts, search).page;

export async function loader({ request }: LoaderFunctionArgs) {
  const url = new URL(request.url);
  const { person } = await queryClient.ensureQueryData(signInQueries.me());
  if (person === null) return redirect(paths.signIn(paths.account()));
  const [attempts] = await Promise.all([
    queryClient.fetchQuery(accountQueries.attempts(pageIn(url.searchParams))),
    queryClient.fetchQuery(accountQueries.places()),
  ]);
  const beyond = lastPageAddress(url, attempts);
  return beyond === null ? null : redirect(beyond);
}

export function Component() {
  const [search] = useSearchParams();
  const change = useListAddress();
  const { person } = useSuspenseQuery(signInQueries.me()).data;
  const { places } = useSuspenseQuery(accountQueries.places()).data;
  const { data: attempts } = useSuspenseQuery(accountQueries.attempts(pageIn(search)));
  return (
    <>
      <PageHeader
        title="Your sign-ins"
        lede={person === null ? undefined : `${person.name}, ${person.email}`}
        back={{ to: paths.start(), label: 'Your organisations' }}
        actions={<LinkButton to={paths.forgottenPassword()}>Set another password</LinkButton>}
      />
      <div className="flex flex-col gap-14">
        <section aria-labelledby="places" className="flex flex-col gap-4">
          <h2 id="places" className="text-xl">
            Where you are signed in
          </h2>
          <PlaceList places={places} />
        </section>
        <section aria-labelledby="attempts" className="flex flex-col gap-4">
          <h2 id="attempts" className="text-xl">
            Who tried to sign in as you
          </h2>
          <p className="max-w-3xl text-soft">
            The last 90 days. If a sign-in was not you, set another password: that signs out every browser.
          </p>
          <AttemptTable
            rows={attempts.rows}
            page={attempts.page}
            pageCount={attempts.pages}
            onPage={(page) => change({ page })}
          />
        </section>
      </div>
    </>
  );
}
