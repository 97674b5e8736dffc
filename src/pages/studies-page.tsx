import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, redirect, useSearchParams } from 'react-router-dom';
import { studiesApi } from '#shared/contracts/studies.ts';
import { paths } from '../app/paths.ts';
import { cableQueries } from '../features/cables/cables.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { FirstStudy } from '../features/studies/overview/first-study.tsx';
import { StudyFilter } from '../features/studies/overview/study-filter.tsx';
import { StudyTable } from '../features/studies/overview/study-table.tsx';
import { studyQueries } from '../features/studies/studies.queries.ts';
import { lastPageAddress, readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { Button } from '../ui/button.tsx';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';

export async function loader({ params, request }: LoaderFunctionArgs) {
  const organisationId = param(params, 'organisationId');
  const url = new URL(request.url);
  const query = readListQuery(studiesApi.list, url.searchParams);
  const [studies] = await Promise.all([
    queryClient.ensureQueryData(studyQueries.list(organisationId, query)),
    queryClient.ensureQueryData(cableQueries.choices(organisationId)),
  ]);
  const last = lastPageAddress(url, studies);
  return last === null ? null : redirect(last);
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const [search] = useSearchParams();
  const changeAddress = useListAddress();
  const query = readListQuery(studiesApi.list, search);
  const { data: studies } = useSuspenseQuery(studyQueries.list(organisationId, query));
  const { data: choices } = useSuspenseQuery(cableQueries.choices(organisationId));
  const isNarrowed = query.q !== '' || query.state !== 'any';

  return (
    <>
      <PageHeader
        title="Studies"
        lede="Planned and sealed before anybody listens, read only once they are closed."
        actions={
          studies.total > 0 || isNarrowed ? (
            <>
              <LinkButton variant="primary" to={paths.newStudy(organisationId)}>
                Plan a study
              </LinkButton>
              <LinkButton to={paths.rigPresets(organisationId)}>Rig presets</LinkButton>
            </>
          ) : null
        }
      />
      {studies.total > 0 || isNarrowed ? <StudyFilter query={query} onChange={changeAddress} /> : null}
      <StudyTable
        rows={studies.rows}
        page={studies.page}
        pageCount={studies.pages}
        onPage={(page) => changeAddress({ page })}
        sort={query.sort}
        onSort={(sort) => changeAddress({ sort })}
        hrefOf={(id) => paths.study(organisationId, id)}
        empty={
          isNarrowed ? (
            <EmptyState
              title="No study fits."
              action={<Button onClick={() => changeAddress({ q: '', state: '' })}>Show all studies</Button>}
            >
              Search looks at neutral titles.
            </EmptyState>
          ) : (
            <FirstStudy
              cableCount={choices.cables.length}
              newCableTo={paths.newCable(organisationId)}
              newStudyTo={paths.newStudy(organisationId)}
            />
          )
        }
      />
    </>
  );
}
