import { useSuspenseQuery } from '@tanstack/react-query';
import { Link, type LoaderFunctionArgs, useSearchParams } from 'react-router-dom';
import { publicationsApi } from '#shared/contracts/publications.ts';
import { paths } from '../app/paths.ts';
import { PublicationList } from '../features/publications/publication-list.tsx';
import { publicationQueries } from '../features/publications/publications.queries.ts';
import { readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { ListFilter } from '../ui/list-filter.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { Pager } from '../ui/pager.tsx';

const listFor = (search: URLSearchParams) => publicationQueries.list(readListQuery(publicationsApi.list, search));

export async function loader({ request }: LoaderFunctionArgs) {
  await queryClient.ensureQueryData(listFor(new URL(request.url).searchParams));
  return null;
}

export function Component() {
  const [search] = useSearchParams();
  const changeAddress = useListAddress();
  const { data } = useSuspenseQuery(listFor(search));
  const words = search.get('q') ?? '';
  const isEverything = words === '' && data.total === 0;
  return (
    <>
      <PageHeader
        title="Published results"
        lede="Each stands at its address for good, with its record to check, whatever was found."
      />
      <p className="-mt-4 pb-8">
        Somebody gave you a file? <Link to={paths.verify()}>Check it in your browser</Link>.
      </p>
      {isEverything ? (
        <EmptyState title="Nothing is published here yet">
          A study that is closed can be published by its manager. It is listed here from then on.
        </EmptyState>
      ) : (
        <div className="flex max-w-4xl flex-col gap-6">
          <ListFilter
            key={words}
            label="Search findings, titles and publishers"
            words={words}
            onSearch={(q) => changeAddress({ q })}
          />
          {data.rows.length === 0 ? (
            <p className="text-soft">Nothing that is published matches these words.</p>
          ) : (
            <PublicationList rows={data.rows} hrefOf={paths.publication} />
          )}
          {data.pages > 1 ? (
            <Pager
              of="Published results"
              page={data.page}
              pageCount={data.pages}
              onPage={(page) => changeAddress({ page })}
            />
          ) : null}
        </div>
      )}
    </>
  );
}
