import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useParams, useSearchParams } from 'react-router-dom';
import { registryApi, registryStates, registryStateWords, registryWords } from '#shared/contracts/registry.ts';
import { paths } from '../app/paths.ts';
import { EntryList } from '../features/registry/entry-list.tsx';
import { KeptFileCheck } from '../features/registry/kept-file.tsx';
import { LogHead } from '../features/registry/log-head.tsx';
import { registryQueries } from '../features/registry/registry.queries.ts';
import { readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { ListFilter } from '../ui/list-filter.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { Pager } from '../ui/pager.tsx';
import { SelectField } from '../ui/select-field.tsx';

const listFor = (organisationId: string, search: URLSearchParams) =>
  registryQueries.list(organisationId, readListQuery(registryApi.list, search));

export async function loader({ params, request }: LoaderFunctionArgs) {
  const { searchParams } = new URL(request.url);
  await queryClient.ensureQueryData(listFor(param(params, 'organisationId'), searchParams));
  return null;
}

const stateOptions = [
  { value: 'any', label: 'Any state' },
  ...registryStates.map((state) => ({ value: state, label: registryStateWords[state] })),
];

export function Component() {
  const organisationId = param(useParams(), 'organisationId');
  const [search] = useSearchParams();
  const changeAddress = useListAddress();
  const { data } = useSuspenseQuery(listFor(organisationId, search));
  const { q, state } = readListQuery(registryApi.list, search);
  const { rows, page, pages, organisation, head } = data;
  return (
    <>
      <PageHeader title={`Sealed protocols of ${organisation}`} lede={registryWords.what} />
      {head === null ? (
        <EmptyState title="Nothing is sealed here yet">
          A protocol is entered in the moment it is sealed, before anybody listens, and stays for good.
        </EmptyState>
      ) : (
        <div className="grid gap-x-16 gap-y-12 lg:grid-cols-[minmax(0,1fr)_21rem] lg:items-start">
          <section aria-labelledby="entries" className="flex min-w-0 flex-col">
            <h2 id="entries" className="pb-4 text-xl">
              Entries, newest first
            </h2>
            <ListFilter
              key={q}
              label="Search digests, and titles of closed studies"
              words={q}
              onSearch={(words) => changeAddress({ q: words })}
            >
              <SelectField
                label="State"
                options={stateOptions}
                value={state}
                onChange={({ target }) => changeAddress({ state: target.value === 'any' ? '' : target.value })}
              />
            </ListFilter>
            {rows.length === 0 ? (
              <EmptyState title="No entry is like that" action={<LinkButton to="?">Show all</LinkButton>}>
                Digests were searched, and titles of studies that are closed.
              </EmptyState>
            ) : (
              <EntryList organisationId={organisationId} rows={rows} publicationTo={paths.publication} />
            )}
            {pages > 1 ? (
              <div className="pt-6">
                <Pager
                  of="Entries"
                  page={page}
                  pageCount={pages}
                  onPage={(wanted) => changeAddress({ page: wanted })}
                />
              </div>
            ) : null}
          </section>
          <div className="flex min-w-0 flex-col gap-10">
            <KeptFileCheck organisationId={organisationId} />
            <LogHead organisationId={organisationId} head={head} />
          </div>
        </div>
      )}
    </>
  );
}
