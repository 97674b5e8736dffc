import { useSuspenseQuery } from '@tanstack/react-query';
import { Link, type LoaderFunctionArgs, redirect, useSearchParams } from 'react-router-dom';
import { cablesApi } from '#shared/contracts/cables.ts';
import { paths } from '../app/paths.ts';
import { CableFilter } from '../features/cables/cable-filter.tsx';
import { CableTable } from '../features/cables/cable-table.tsx';
import { cableQueries } from '../features/cables/cables.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { addressOf } from '../lib/call.ts';
import { lastPageAddress, readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';

const queryIn = (search: URLSearchParams) => readListQuery(cablesApi.list, search);

export async function loader({ params, request }: LoaderFunctionArgs) {
  const url = new URL(request.url);
  const list = cableQueries.list(param(params, 'organisationId'), queryIn(url.searchParams));
  const beyond = lastPageAddress(url, await queryClient.ensureQueryData(list));
  return beyond === null ? null : redirect(beyond);
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const [search] = useSearchParams();
  const change = useListAddress();
  const query = queryIn(search);
  const { data: cables } = useSuspenseQuery(cableQueries.list(organisationId, query));
  const isFiltered = query.q !== '' || query.kind !== 'any' || query.material !== 'any' || query.geometry !== 'any';
  const isEmpty = cables.total === 0 && !isFiltered;

  return (
    <>
      <PageHeader
        title="Cables"
        lede="Designs, and the physical pieces of them that are sleeved and listened to."
        actions={
          <>
            {cables.total > 1 ? <LinkButton to={paths.compareCables(organisationId)}>Compare two</LinkButton> : null}
            <LinkButton variant="primary" to={paths.newCable(organisationId)}>
              Add a cable
            </LinkButton>
          </>
        }
      />
      {isEmpty && query.archived === 'no' ? null : <CableFilter query={query} onChange={change} />}
      <CableTable
        rows={cables.rows}
        page={cables.page}
        pageCount={cables.pages}
        onPage={(page) => change({ page })}
        sort={query.sort}
        onSort={(sort) => change({ sort })}
        hrefOf={(id) => paths.cable(organisationId, id)}
        empty={isEmpty ? <FirstCable addTo={paths.newCable(organisationId)} /> : <NoneFound words={query.q} />}
      />
      <p className="flex flex-wrap gap-x-6 gap-y-2 pt-8 print:hidden">
        <Link to={paths.importCables(organisationId)}>Import cables from a table</Link>
        {cables.total > 0 ? (
          <Link to={addressOf(cablesApi.exportAll, { organisationId })} reloadDocument download>
            Export all as a table
          </Link>
        ) : null}
      </p>
    </>
  );
}

function FirstCable({ addTo }: { addTo: string }) {
  return (
    <EmptyState
      title="Your cables will be listed here"
      action={<LinkButton to={addTo}>Add the first cable</LinkButton>}
    >
      A study compares two of them. Add both, each with at least one specimen: the piece that is fitted.
    </EmptyState>
  );
}

function NoneFound({ words }: { words: string }) {
  return (
    <EmptyState
      title={words === '' ? 'Nothing found' : `Nothing found for “${words}”`}
      action={<LinkButton to="?">Show all cables</LinkButton>}
    >
      Names, descriptions, kinds and constructions were searched.
    </EmptyState>
  );
}
