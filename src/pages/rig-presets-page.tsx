import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, redirect, useSearchParams } from 'react-router-dom';
import { rigPresetsApi } from '#shared/contracts/rig-presets.ts';
import { paths } from '../app/paths.ts';
import { PresetFilter } from '../features/rig-presets/preset-filter.tsx';
import { PresetTable } from '../features/rig-presets/preset-table.tsx';
import { rigPresetQueries } from '../features/rig-presets/rig-presets.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { lastPageAddress, readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { PageHeader } from '../ui/page-header.tsx';

const queryIn = (search: URLSearchParams) => readListQuery(rigPresetsApi.list, search);

export async function loader({ params, request }: LoaderFunctionArgs) {
  const url = new URL(request.url);
  const list = rigPresetQueries.list(param(params, 'organisationId'), queryIn(url.searchParams));
  const beyond = lastPageAddress(url, await queryClient.fetchQuery(list));
  return beyond === null ? null : redirect(beyond);
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const [search] = useSearchParams();
  const change = useListAddress();
  const query = queryIn(search);
  const { data: presets } = useSuspenseQuery(rigPresetQueries.list(organisationId, query));

  return (
    <>
      <PageHeader
        title="Rig presets"
        lede="How a cable is changed at each kind of rig: the steps, their least waits, the cautions. A study takes one whole into its protocol."
        back={{ to: paths.studies(organisationId), label: 'All studies' }}
      />
      <PresetFilter query={query} onChange={change} />
      <PresetTable
        organisationId={organisationId}
        rows={presets.rows}
        page={presets.page}
        pageCount={presets.pages}
        onPage={(page) => change({ page })}
        sort={query.sort}
        onSort={(sort) => change({ sort })}
        editTo={(id) => paths.editRigPreset(organisationId, id)}
        copyTo={(id) => paths.newRigPreset(organisationId, id)}
        empty={
          <EmptyState
            title={query.q === '' ? 'Every preset is archived' : `Nothing found for “${query.q}”`}
            action={<LinkButton to="?archived=yes">Show archived ones too</LinkButton>}
          >
            Names and kinds of rig were searched. Bring one back, or copy it and change the copy.
          </EmptyState>
        }
      />
    </>
  );
}
