import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, redirect, useSearchParams } from 'react-router-dom';
import { reportsApi } from '#shared/contracts/reports.ts';
import { paths } from '../app/paths.ts';
import { ReportList } from '../features/reports/report-list.tsx';
import { reportQueries } from '../features/reports/reports.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { lastPageAddress, readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { isManaging } from '../lib/role-words.ts';
import { param } from '../lib/route-params.ts';
import { Button } from '../ui/button.tsx';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { ListFilter } from '../ui/list-filter.tsx';
import { PageHeader } from '../ui/page-header.tsx';

export async function loader({ params, request }: LoaderFunctionArgs) {
  const organisationId = param(params, 'organisationId');
  const url = new URL(request.url);
  const query = readListQuery(reportsApi.list, url.searchParams);
  const reports = await queryClient.ensureQueryData(reportQueries.list(organisationId, query));
  const last = lastPageAddress(url, reports);
  return last === null ? null : redirect(last);
}

export function Component() {
  const { organisationId, role } = usePresence().membership;
  const [search] = useSearchParams();
  const changeAddress = useListAddress();
  const query = readListQuery(reportsApi.list, search);
  const { data: reports } = useSuspenseQuery(reportQueries.list(organisationId, query));
  const isNarrowed = query.q !== '';

  return (
    <>
      <PageHeader title="Reports" lede="What closed studies came to, whatever it was." />
      {reports.total > 0 || isNarrowed ? (
        <ListFilter key={query.q} label="Search titles" words={query.q} onSearch={(q) => changeAddress({ q })} />
      ) : null}
      <ReportList
        rows={reports.rows}
        page={reports.page}
        pageCount={reports.pages}
        onPage={(page) => changeAddress({ page })}
        hrefOf={(studyId) => paths.report(organisationId, studyId)}
        empty={
          isNarrowed ? (
            <EmptyState
              title="No report fits."
              action={<Button onClick={() => changeAddress({ q: '' })}>Show all reports</Button>}
            >
              Search looks at the titles of the studies.
            </EmptyState>
          ) : (
            <EmptyState
              title="Reports of closed studies will be here."
              action={
                isManaging(role) ? <LinkButton to={paths.studies(organisationId)}>Go to the studies</LinkButton> : null
              }
            >
              Until a study is closed nobody sees a score. Then the registered analysis runs once, and its report
              appears.
            </EmptyState>
          )
        }
      />
    </>
  );
}
