import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, redirect, useSearchParams } from 'react-router-dom';
import { signingKeysApi } from '#shared/contracts/signing-keys.ts';
import { paths } from '../app/paths.ts';
import { auditQueries } from '../features/audits/audits.queries.ts';
import { LatestAudit } from '../features/audits/latest-audit.tsx';
import { usePresence } from '../features/sign-in/membership.ts';
import { signedHeadQueries } from '../features/signed-heads/signed-heads.queries.ts';
import { TimeState } from '../features/signed-heads/time-state.tsx';
import { CurrentKey } from '../features/signing-keys/current-key.tsx';
import { RetiredKeys } from '../features/signing-keys/retired-keys.tsx';
import { signingKeyQueries } from '../features/signing-keys/signing-keys.queries.ts';
import { lastPageAddress, readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';

const queryIn = (search: URLSearchParams) => readListQuery(signingKeysApi.list, search);

export async function loader({ params, request }: LoaderFunctionArgs) {
  const url = new URL(request.url);
  const organisationId = param(params, 'organisationId');
  const [keys] = await Promise.all([
    queryClient.fetchQuery(signingKeyQueries.list(organisationId, queryIn(url.searchParams))),
    queryClient.fetchQuery(signedHeadQueries.time(organisationId)),
    queryClient.fetchQuery(auditQueries.latest(organisationId)),
  ]);
  const beyond = lastPageAddress(url, keys);
  return beyond === null ? null : redirect(beyond);
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const [search] = useSearchParams();
  const change = useListAddress();
  const query = queryIn(search);
  const { data: keys } = useSuspenseQuery(signingKeyQueries.list(organisationId, query));
  const { data: time } = useSuspenseQuery(signedHeadQueries.time(organisationId));
  const { data: audit } = useSuspenseQuery(auditQueries.latest(organisationId));
  return (
    <>
      <PageHeader
        title="Proof"
        lede="The key that signs your records, who stamps the time on them, and whether they hold."
        back={{ to: paths.people(organisationId), label: 'People' }}
        actions={<LinkButton to={paths.registry(organisationId)}>Open the public registry</LinkButton>}
      />
      <div className="flex flex-col gap-14">
        <div className="grid gap-x-16 gap-y-14 lg:grid-cols-[minmax(0,1fr)_24rem] lg:items-start">
          <CurrentKey organisationId={organisationId} current={keys.current} />
          <div className="flex min-w-0 flex-col gap-12">
            <LatestAudit latest={audit.latest} />
            <TimeState time={time} />
          </div>
        </div>
        <RetiredKeys
          rows={keys.rows}
          words={query.q}
          onSearch={(q) => change({ q })}
          page={keys.page}
          pageCount={keys.pages}
          onPage={(page) => change({ page })}
          showAll={<LinkButton to="?">Show all retired keys</LinkButton>}
        />
      </div>
    </>
  );
}
